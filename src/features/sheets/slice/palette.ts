/** Colours of printed sheets: the light values of the design tokens on white, since a file carries no style sheet. */
import type { Evidence } from '../../../kernel/rotations/types';

export const INK = '#1C2530';
export const INK_2 = '#4B555F';
export const RULE = '#BFB7A5';
export const GRATICULE = '#D3CCBB';
export const OUTLINE = '#27313C';
export const COAST = '#5F6A70';
export const OCHRE = '#A65E1A';
export const OCHRE_INK = '#8A4B12';
export const PAPER = '#FFFFFF';
const EV_INK = '#3E4A52';

const rect = (size: string, fill: string): string => `<rect ${size} fill="${fill}"/>`;
const dot = `fill="${EV_INK}" fill-opacity="0.72"`;
const line = `stroke="${EV_INK}" stroke-width="0.55" stroke-opacity="0.72" fill="none"`;

/** The four evidence patterns in user space at print size (0.8 of the screen's). */
export const EVIDENCE_PATTERNS: Record<Evidence, string> = {
  published:
    `<pattern id="ev-published" width="5.6" height="5.6" patternUnits="userSpaceOnUse">` +
    rect('width="5.6" height="5.6"', '#DCDCD6') +
    `<circle cx="1.4" cy="1.4" r="0.5" ${dot}/><circle cx="4.2" cy="4.2" r="0.5" ${dot}/></pattern>`,
  fitted:
    `<pattern id="ev-fitted" width="4.4" height="4.4" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">` +
    rect('width="4.4" height="4.4"', '#CBDCD5') +
    `<path d="M0 2.2H4.4" ${line}/></pattern>`,
  posed:
    `<pattern id="ev-posed" width="7.2" height="5.6" patternUnits="userSpaceOnUse">` +
    rect('width="7.2" height="5.6"', '#EADBC0') +
    `<path d="M0.4 1.4H4M4 4.2H7.6M-3.2 4.2H0.4" ${line}/></pattern>`,
  unconstrained:
    `<pattern id="ev-unconstrained" width="8.8" height="8.8" patternUnits="userSpaceOnUse">` +
    rect('width="8.8" height="8.8"', PAPER) +
    `<path d="M2.2 1v2.4M1 2.2h2.4M6.6 5.4v2.4M5.4 6.6h2.4" ${line}/></pattern>`,
};
