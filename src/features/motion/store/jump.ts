/** What `/` understands: an age in Ma, a unit of the chart, or a block. */
import { CHRONOSTRATIGRAPHIC_CHART } from '../../../kernel/timescale';
import { shortAge } from '../format';
import type { Scene } from '../scene/scene';

export type Jump =
  | { readonly kind: 'age'; readonly age: number; readonly label: string; readonly detail: string }
  | { readonly kind: 'block'; readonly code: string; readonly label: string; readonly detail: string };

const MOST = 9;

/** "62.4", "62,4 Ma", "62400 ka" is not an age here; null for what is no number or below zero. */
export function parseAge(text: string): number | null {
  const match = /^\s*(\d+(?:[.,]\d+)?)\s*(?:Ma)?\s*$/i.exec(text);
  return match?.[1] === undefined ? null : Number(match[1].replace(',', '.'));
}

/** Matches for what was typed, the likeliest first. "plate" finds every block. */
export function jumpsFor(text: string, scene: Scene): Jump[] {
  const words = text.trim().toLowerCase();
  const age = parseAge(text);
  if (age !== null) {
    const label = `${shortAge(age)} Ma`;
    return age <= scene.oldest ? [{ kind: 'age', age, label, detail: 'age' }] : [];
  }
  const blocks = scene.blocks
    .filter(({ outlines }) => outlines.length > 0)
    .filter(
      ({ name, code, kind }) => words === '' || `${name} ${code} ${kind} plate`.toLowerCase().includes(words),
    )
    .map(({ code, name, kind }): Jump => ({ kind: 'block', code, label: name, detail: kind }));
  const units = words === '' ? [] : CHRONOSTRATIGRAPHIC_CHART.units
    .filter(({ name, older_ma, rank }) => rank !== 'eon' && older_ma <= scene.oldest && name.toLowerCase().includes(words))
    .map(({ name, older_ma, rank }): Jump => ({ kind: 'age', age: older_ma, label: `Base of ${name}`, detail: `${rank}, ${shortAge(older_ma)} Ma` })); // prettier-ignore
  return [...blocks, ...units].slice(0, MOST);
}
