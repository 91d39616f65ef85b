import { type Algorithm, hash, verify } from '@node-rs/argon2';

const ARGON2ID = 2 as Algorithm;

/** OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, two passes, one lane. */
const OPTIONS = {
  algorithm: ARGON2ID,
  memoryCost: 19_456,
  timeCost: 2,
  parallelism: 1,
};

/** The hash of an account that nobody signs in to by password. */
export const NO_PASSWORD = '!';

export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), OPTIONS);

let decoy: Promise<string> | undefined;

/**
 * Takes as long for an account that does not exist, or has no password, as for one that does: a decoy is
 * verified in its place, so that the answer's time tells nothing.
 */
export async function passwordMatches(stored: string | undefined, password: string): Promise<boolean> {
  const usable = stored !== undefined && stored !== NO_PASSWORD;
  const against = usable ? stored : await (decoy ??= hash(crypto.randomUUID(), OPTIONS));
  const matches = await verify(against, password.normalize('NFKC'), OPTIONS);
  return usable && matches;
}
