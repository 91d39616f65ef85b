/** Names as far as there is room, and how many more there are: all of them stand in the slice's GeoJSON. */
export function shortList(names: readonly string[], shown: number, comma: ',' | ';'): string {
  const more = names.length - shown;
  if (more <= 0) return names.join(`${comma} `);
  if (shown === 0) return `${more}, see the GeoJSON`;
  return `${names.slice(0, shown).join(`${comma} `)}${comma === ';' ? ';' : ''} and ${more} more, see the GeoJSON`;
}
