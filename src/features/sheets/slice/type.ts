/** The type of a sheet's text: one scale for all of it, smaller on small paper. */
import type { Paper } from '../choices';
import { INK_2 } from './palette';
import type { TextStyle } from './svg';

export const PAPER_SCALE: Readonly<Record<Paper, number>> = { a3: 1, a4: 1, a5: 0.85 };

export interface SheetType {
  readonly scale: number;
  readonly title: TextStyle;
  readonly subtitle: TextStyle;
  readonly caption: TextStyle;
  readonly caution: TextStyle;
  readonly small: TextStyle;
}

export const sheetType = (scale: number): SheetType => ({
  scale,
  title: { family: 'Source Serif 4', size: 17 * scale, weight: 600 },
  subtitle: { family: 'Inter', size: 8.5 * scale, fill: INK_2 },
  caption: { family: 'Source Serif 4', size: 9 * scale },
  caution: { family: 'Source Serif 4', size: 9 * scale, italic: true },
  small: { family: 'Inter', size: 7 * scale },
});
