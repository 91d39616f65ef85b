import { SLUG_LENGTH } from '../../../slug';

/** The nearest slug to a name, for a hint; empty where nothing is left of it. */
export const toSlug = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, SLUG_LENGTH);
