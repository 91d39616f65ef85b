/** The type of a sheet's text. */
import { INK_2 } from './palette';
import type { TextStyle } from './svg';

export const TITLE: TextStyle = { family: 'Source Serif 4', size: 17, weight: 600 };
export const SUBTITLE: TextStyle = { family: 'Inter', size: 8.5, fill: INK_2 };
export const CAPTION: TextStyle = { family: 'Source Serif 4', size: 9 };
export const CAUTION: TextStyle = { family: 'Source Serif 4', size: 9, italic: true };
export const SMALL: TextStyle = { family: 'Inter', size: 7 };
