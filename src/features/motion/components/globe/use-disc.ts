/** Where places of the held-still frame fall on a globe of the panel's size, in CSS pixels; the inverse too. */
import { useMemo } from 'react';
import { discOf } from '../../globe/ground-globe';
import { turn, turnBack, viewMatrix, type Vec } from '../../globe/matrix';
import { place, viewOf, type XY } from '../../globe/pen';
import { useWorkbench } from '../bench';
import type { Size } from '../use-size';

export interface Projector {
  readonly at: (v: Vec) => XY | null;
  readonly under: (xy: XY) => Vec | null;
}

export function useDisc({ width, height }: Size): Projector {
  const centre = useWorkbench((state) => state.centre);
  const zoom = useWorkbench((state) => state.zoom);
  return useMemo(() => {
    const disc = discOf({ centre, zoom, width, height, scale: 1, moving: false });
    const view = viewMatrix(centre);
    return {
      at: (v) => {
        const turned = turn(view, v);
        return turned[2] > 0 ? place(disc, turned) : null;
      },
      under: (xy) => {
        const { v, onGlobe } = viewOf(disc, xy);
        return onGlobe ? turnBack(view, v) : null;
      },
    };
  }, [centre, zoom, width, height]);
}
