/** Codes of blocks and addresses of projects, as a pattern for forms and the database: the whole text must match. */
export const SLUG_PATTERN = '[a-z0-9]+(-[a-z0-9]+)*';
export const SLUG_LENGTH = 64;

const WHOLE = new RegExp(`^${SLUG_PATTERN}$`);

export const isSlug = (text: string): boolean => text.length <= SLUG_LENGTH && WHOLE.test(text);
