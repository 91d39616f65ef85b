/** A globe to look at beside a form: no names, no gestures, a description for who doesn't see it. */
import { GlobeCanvas } from '../globe/GlobeCanvas';
import { PictureFrame } from './Frame';
import type { PictureProps } from './payload';

interface Props extends PictureProps {
  readonly label: string;
}

export default function StillGlobe({ label, ...props }: Props) {
  return (
    <PictureFrame {...props}>
      <GlobeCanvas still label={label} />
    </PictureFrame>
  );
}
