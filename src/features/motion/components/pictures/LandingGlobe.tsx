/** The landing page's globe, moved by the log's age line, with its caption. */
import { age as ageText } from '../../format';
import { useWorkbench } from '../bench';
import { BlockList } from '../globe/BlockList';
import { GlobeCanvas } from '../globe/GlobeCanvas';
import { useFrameName } from '../globe/GlobePanel';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

interface Props extends PictureProps {
  /** "v7". */
  readonly version: string;
}

export default function LandingGlobe({ version, ...props }: Props) {
  return (
    <PictureFrame {...props}>
      <figure className="flex size-full flex-col">
        <div className="min-h-0 grow">
          <GlobeCanvas
            label={`${props.payload.title}: drag to turn, arrows turn, plus and minus zoom`}
            describedBy="landing-blocks"
          />
        </div>
        <Caption title={props.payload.title} version={version} />
        <BlockList id="landing-blocks" />
      </figure>
    </PictureFrame>
  );
}

function Caption({ title, version }: { title: string; version: string }) {
  const age = useWorkbench((state) => state.age);
  const frame = useFrameName(true);
  return (
    <figcaption className="t-caption text-ink-2 mx-auto max-w-[36em] pt-1 text-center">
      {title}, {version}, at {ageText(age)}, {frame}. Dashed: present coast, for location only. A
      reconstruction is a model, not an observation.
    </figcaption>
  );
}
