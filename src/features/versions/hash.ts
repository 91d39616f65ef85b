/** A hash as people read it: the first eight digits in two groups. */
export const shortHash = (sha256: string): string => `${sha256.slice(0, 4)} ${sha256.slice(4, 8)}`;
