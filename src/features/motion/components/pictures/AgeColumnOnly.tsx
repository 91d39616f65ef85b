/** The age column by itself, as the margin of a page. */
import { layoutOf } from '../../log/layout';
import { useBench } from '../bench';
import { AgeColumn } from '../log/AgeColumn';
import { useSize } from '../use-size';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

const HEAD = 64;
const FIRST = { width: 86, height: 900 };

export default function AgeColumnOnly(props: PictureProps) {
  return (
    <PictureFrame {...props}>
      <Column />
    </PictureFrame>
  );
}

function Column() {
  const { scene } = useBench();
  const [box, { width, height }] = useSize<HTMLDivElement>(FIRST);
  const layout = layoutOf({ width, height, oldest: scene.oldest, head: HEAD, links: 0, strips: ['age'] });
  const [strip] = layout.strips;
  return (
    <div ref={box} className="relative size-full overflow-hidden" aria-hidden="true">
      <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="absolute inset-0">
        {strip && <AgeColumn layout={layout} strip={strip} title="Age" unit="Ma" />}
      </svg>
    </div>
  );
}
