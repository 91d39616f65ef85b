/** The landing page's log: latitude and speed, with an age line that runs on to the globe. */
import { Log } from '../log/Log';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

interface Props extends PictureProps {
  /** id of the element that holds the globe; the age line reaches to its limb. */
  readonly reachTo?: string;
  readonly hint?: string;
}

const STRIPS = ['age', 'latitude', 'speed'] as const;

export default function LandingLog({ reachTo, hint = 'drag the line and the blocks move', ...props }: Props) {
  return (
    <PictureFrame {...props}>
      <Log
        strips={STRIPS}
        heading="plain"
        first={{ width: 362, height: 900 }}
        reachTo={reachTo}
        hint={hint}
      />
    </PictureFrame>
  );
}
