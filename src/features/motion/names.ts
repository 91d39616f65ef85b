/** How blocks are named in running text and in narrow headings. */
interface Named {
  readonly code: string;
  readonly name: string;
  readonly kind: string;
}

/** "Spin axis" reads "spin axis" inside a sentence; a block keeps its capital. */
export const inText = (block: Named): string =>
  block.kind === 'frame' ? block.name.charAt(0).toLowerCase() + block.name.slice(1) : block.name;

const KINDS =
  /\s+(craton|terrane|block|plate|microplate|microcontinent|continent|arc|plateau|ridge|margin|basin|island|islands|shield)$/;

/** "Old Harrow craton" is "Old Harrow" where room is short: a last word that only says the kind goes without. */
export function shortName(block: Named): string {
  if (block.kind === 'frame') return inText(block);
  return block.name.replace(KINDS, '');
}

/** On the map "terrane", "block" and "microcontinent" go without saying; a craton, arc or plateau is named as one. */
export const mapName = (block: Named): string => block.name.replace(/ (terrane|block|microcontinent)$/, '');

/** The shortest name that still says which block; an arc or plateau keeps its word. */
export const blockName = (block: Named): string =>
  block.name.replace(/ (craton|terrane|block|microcontinent)$/, '');

/** "Spin axis frame", "Old Harrow held still"; inside a sentence "spin axis frame". */
export const frameName = (block: Named, within = false): string =>
  block.kind === 'frame' ? `${within ? inText(block) : block.name} frame` : `${shortName(block)} held still`;

/** "MK" for "Mara Kell". */
export function initials(name: string): string {
  const words = name.trim().split(/\s+/);
  const first = words[0]?.charAt(0) ?? '';
  const last = words.length > 1 ? (words[words.length - 1]?.charAt(0) ?? '') : '';
  return (first + last).toUpperCase();
}
