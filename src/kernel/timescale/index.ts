export { CHRONOSTRATIGRAPHIC_CHART, RANKS, unitAt, unitsBetween } from './units';
export { type Chart, type GeologicalUnit, type Rank } from './units';
