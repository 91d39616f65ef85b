import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits for a cookie, a link or a token; only the hash of one is ever stored. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

export const sha256 = (value: string | Uint8Array): string =>
  createHash('sha256').update(value).digest('hex');
