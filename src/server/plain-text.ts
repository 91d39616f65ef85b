/** Text that every part of the product can hold: database, XML, PDF and pages. */
import { isPlain } from '~/plain';
import { Problem, shown } from './problem';

/** Bodies here are rows of fields; nothing that is meant nests deeper. */
const DEEPEST = 64;

/** @throws Problem `InvalidRequest` for a body that nests too deep, `InvalidRows` naming the first text that is not plain */
export function requirePlain(body: unknown): void {
  const open: { value: unknown; path: readonly string[] }[] = [{ value: body, path: [] }];
  for (let next = open.pop(); next !== undefined; next = open.pop()) {
    const { value, path } = next;
    if (typeof value === 'string' && !isPlain(value)) throw notPlain(path.join('.'), value);
    if (typeof value !== 'object' || value === null) continue;
    if (path.length >= DEEPEST)
      throw new Problem('InvalidRequest', { detail: `The body nests deeper than ${DEEPEST} levels.` });
    for (const [key, inner] of Object.entries(value)) {
      if (!isPlain(key)) throw notPlain([...path, '?'].join('.'), key);
      open.push({ value: inner, path: [...path, key] });
    }
  }
}

function notPlain(path: string, value: string): Problem {
  const problem = 'holds control characters or half a character';
  return new Problem('InvalidRows', {
    detail: `${path}: ${problem}`,
    errors: [
      { path, read: shown(value), problem, hint: 'Type the text again, without what cannot be seen.' },
    ],
  });
}
