/** Codes of blocks are slugs: lower-case letters, digits and single hyphens, 64 at most. */
export const isSlug = (text: string): boolean => text.length <= 64 && /^[a-z0-9]+(?:-[a-z0-9]+)*$/.test(text);

/** The nearest slug to a name, for a hint; empty where nothing is left of it. */
export const toSlug = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 64);
