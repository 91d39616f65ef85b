import { requirePlain } from './plain-text';
import { Problem } from './problem';

export const DEFAULT_LIMIT_BYTES = 1024 * 1024;

/** The media type without its parameters, in lower case. */
export const mediaType = (request: Request): string =>
  (request.headers.get('content-type') ?? '').split(';')[0]!.trim().toLowerCase();

const tooLarge = (limit: number) =>
  new Problem('BodyTooLarge', {
    detail: `At most ${Math.round(limit / 1024)} kB are read here. Send it in parts.`,
  });

/** The body, counted while it streams in: a stated length is believed only when it is too large. */
export async function readBytes(request: Request, limit = DEFAULT_LIMIT_BYTES): Promise<Uint8Array> {
  if (Number(request.headers.get('content-length') ?? 0) > limit) throw tooLarge(limit);
  const parts: Uint8Array[] = [];
  let length = 0;
  if (request.body) {
    for await (const part of request.body as unknown as AsyncIterable<Uint8Array>) {
      length += part.byteLength;
      if (length > limit) throw tooLarge(limit);
      parts.push(part);
    }
  }
  return Buffer.concat(parts, length);
}

const isJson = (type: string) => type === 'application/json' || type.endsWith('+json');

/** @throws Problem `UnsupportedMediaType`, `BodyTooLarge`, `InvalidRequest`, or `InvalidRows` for text that is not plain */
export async function readJson(request: Request, limit?: number): Promise<unknown> {
  const type = mediaType(request);
  if (!isJson(type))
    throw new Problem('UnsupportedMediaType', {
      detail: `Send application/json; this is ${type || 'of no stated type'}.`,
    });
  const text = decode(await readBytes(request, limit));
  let body: unknown;
  try {
    body = JSON.parse(text);
  } catch {
    throw new Problem('InvalidRequest', { detail: 'The body is not JSON.' });
  }
  requirePlain(body);
  return body;
}

export const isForm = (request: Request): boolean =>
  mediaType(request) === 'application/x-www-form-urlencoded';

/** Fields of a posted form; a repeated field keeps its last value. */
export async function readForm(request: Request, limit?: number): Promise<Record<string, string>> {
  const fields = Object.fromEntries(new URLSearchParams(decode(await readBytes(request, limit))));
  requirePlain(fields);
  return fields;
}

function decode(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new Problem('InvalidRequest', { detail: 'The body is not UTF-8.' });
  }
}
