import { PAPERS } from '../choices';
import type { SliceQuery } from '../contract';

const PT_PER_MM = 72 / 25.4;

/** Of a sheet in points. */
export function paperSize({ paper, orientation }: Pick<SliceQuery, 'paper' | 'orientation'>): {
  readonly width: number;
  readonly height: number;
} {
  const [long, short] = PAPERS[paper];
  const [w, h] = orientation === 'landscape' ? [long, short] : [short, long];
  return { width: w * PT_PER_MM, height: h * PT_PER_MM };
}
