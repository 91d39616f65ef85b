/** The columns of the ledgers that are edited, in the order in which they stand. */
import { BLOCK_KINDS } from '../../../kernel/rotations/types';
import {
  ageColumn,
  codeColumn,
  evidenceColumn,
  numberColumn,
  textColumn,
  wordColumn,
  type Column,
} from './column';

export const rotationColumns = (codes: readonly string[]): readonly Column[] => [
  codeColumn('block', 'Block', '84px', codes),
  ageColumn('age_ma', 'Age', '50px', false),
  codeColumn('relative_to', 'Relative to', '84px', codes),
  numberColumn('pole_lat', 'Pole lat', '°N', '60px', {
    least: -90,
    most: 90,
    beyond: 'latitude beyond 90°: moved decimal point?',
  }),
  numberColumn('pole_lon', 'Pole lon', '°E', '66px', {
    least: -360,
    most: 360,
    beyond: 'longitude beyond 360°',
  }),
  numberColumn('angle_deg', 'Angle', '°', '54px', { least: -720, most: 720, beyond: 'more than two turns' }),
  evidenceColumn('112px'),
  textColumn('source', 'Source', 'minmax(136px, 1.4fr)'),
  textColumn('chron', 'Chron', '64px', 40),
  numberColumn('age_two_sigma_ma', 'Age ± 2σ', 'Myr', '70px', {
    least: 0,
    most: 1000,
    blank: true,
    beyond: 'from 0 to 1000 Myr',
  }),
  textColumn('note', 'Note', 'minmax(140px, 1.4fr)'),
];

export const BLOCK_COLUMNS: readonly Column[] = [
  codeColumn('code', 'Code', 'minmax(96px, 0.9fr)'),
  { ...textColumn('name', 'Name', 'minmax(140px, 1.3fr)', 120), read: readName },
  wordColumn('kind', 'Kind', '86px', BLOCK_KINDS),
  ageColumn('appears_ma', 'Appears', '112px', true),
  ageColumn('disappears_ma', 'Disappears', '96px', true),
  evidenceColumn('124px'),
  textColumn('source', 'Source', 'minmax(120px, 1.2fr)'),
  textColumn('note', 'Note', 'minmax(120px, 1.2fr)'),
];

function readName(text: string): ReturnType<Column['read']> {
  const name = text.trim();
  if (name === '') return { ok: false, problem: 'blank' };
  return name.length > 120 ? { ok: false, problem: 'more than 120 characters' } : { ok: true, value: name };
}

/** Fields of a new row; what the columns do not show is blank. */
export const BLANK_ROTATION = {
  block: '', relative_to: '', age_ma: null, pole_lat: null, pole_lon: null, angle_deg: null, chron: null,
  age_two_sigma_ma: null, evidence: 'unconstrained', covariance: null, cov_dof: null, source: null, note: null,
}; // prettier-ignore

export const BLANK_BLOCK = {
  code: '', name: '', kind: 'terrane', appears_ma: null, disappears_ma: null, evidence: 'unconstrained', source: null, note: null,
}; // prettier-ignore
