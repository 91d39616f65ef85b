/** The overview's globe: one age, the drift path of the project's point, and a caption that says which. */
import { age as ageText } from '../../format';
import { useBench, useWorkbench } from '../bench';
import { BlockList } from '../globe/BlockList';
import { GlobeCanvas } from '../globe/GlobeCanvas';
import { useFrameName } from '../globe/GlobePanel';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

interface Props extends PictureProps {
  /** "draft", "v7". */
  readonly version: string;
}

export default function OverviewGlobe({ version, ...props }: Props) {
  return (
    <PictureFrame {...props}>
      <figure>
        <div className="aspect-[1.2]">
          <GlobeCanvas
            shortNames
            label={`${props.payload.title}: drag to turn`}
            describedBy="overview-blocks"
          />
        </div>
        <Caption version={version} />
        <BlockList id="overview-blocks" />
      </figure>
    </PictureFrame>
  );
}

function Caption({ version }: { version: string }) {
  const { point, scene } = useBench();
  const age = useWorkbench((state) => state.age);
  const frame = useFrameName(true);
  const path = point ? ` Ochre: drift path of ${point.subject}.` : '';
  const coasts = scene.lines.some(({ kind }) => kind === 'layer')
    ? ' Dashed: present coast, for location only.'
    : '';
  return (
    <figcaption className="t-caption text-ink-2 pt-2 text-center">
      {ageText(age)}, {frame}, {version}.{path}
      {coasts}
    </figcaption>
  );
}
