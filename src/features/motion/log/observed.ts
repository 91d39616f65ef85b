/** Palaeolatitudes that directions give through the geocentric axial dipole, tan I = 2 tan φ. */
import type { Direction } from '../../ledger/contract';

export interface Observed {
  readonly id: string;
  readonly site: string;
  readonly age: number;
  readonly ageMin: number;
  readonly ageMax: number;
  readonly lat: number;
  /** From I ± α95, so unequal about `lat`; both `lat` where α95 is not given. */
  readonly lower: number;
  readonly upper: number;
  readonly n: number | null;
  /** Sediments may record an inclination too shallow; the mark is hollow. */
  readonly mayBeShallow: boolean;
}

const RADIANS = Math.PI / 180;
/** Words for rocks that compact after they are magnetised. */
const SEDIMENT = /stone|shale|red bed|chalk|marl|clay|silt|sand|conglomerate|sediment/i;

/** φ of an inclination, both in degrees. Inverse: I = atan(2 tan φ). */
export const dipoleLatitude = (inclination: number): number =>
  Math.atan(Math.tan(inclination * RADIANS) / 2) / RADIANS;

const limit = (inclination: number): number => dipoleLatitude(Math.max(-90, Math.min(90, inclination)));

/** Directions of a block that state an age and an inclination. A reversed one lies in the other hemisphere. */
export function observedOn(directions: readonly Direction[], block: string): Observed[] {
  return directions.flatMap((direction) => {
    const { inclination, age_ma, age_min_ma, age_max_ma, alpha95 } = direction;
    const age = age_ma ?? (age_min_ma !== null && age_max_ma !== null ? (age_min_ma + age_max_ma) / 2 : null);
    if (direction.block !== block || inclination === null || age === null) return [];
    const read = direction.polarity === 'reversed' ? -inclination : inclination;
    const half = alpha95 ?? 0;
    return [
      {
        id: direction.id,
        site: direction.site,
        age,
        ageMin: age_min_ma ?? age,
        ageMax: age_max_ma ?? age,
        lat: dipoleLatitude(read),
        lower: limit(read - half),
        upper: limit(read + half),
        n: direction.n,
        mayBeShallow: SEDIMENT.test(direction.rock ?? ''),
      },
    ];
  });
}
