/** The tokens that canvases draw with, read from the page so that both themes have one source. */
export const TOKENS = [
  'paper', 'sheet', 'globe', 'ink', 'ink-2', 'ink-3', 'frame', 'edge', 'rule', 'rule-2', 'grat', 'ochre', 'ochre-ink',
  'ochre-band', 'kelp', 'madder', 'ev-ink', 'ev-published', 'ev-fitted', 'ev-posed', 'ev-unconstrained', 'outline', 'coast',
] as const; // prettier-ignore
export type Token = (typeof TOKENS)[number];
export type Palette = Readonly<Record<Token | 'sans' | 'serif', string>>;

export function readPalette(element: Element): Palette {
  const style = getComputedStyle(element);
  const read = (name: string) => style.getPropertyValue(`--${name}`).trim();
  return Object.fromEntries([...TOKENS, 'sans', 'serif'].map((name) => [name, read(name)])) as Palette;
}
