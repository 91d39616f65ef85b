import { sha256 } from './secrets';

const YEAR = 31_536_000;

/** What never changes under its address; `shared` only where anyone may see it. */
export const immutable = (shared: boolean) => `${shared ? 'public' : 'private'}, max-age=${YEAR}, immutable`;

export function matches(header: string | null, etag: string): boolean {
  if (!header) return false;
  return header.split(',').some((tag) => ['*', etag].includes(tag.trim().replace(/^W\//, '')));
}

/** An answer that never changes, with a strong ETag of its content, or 304 to whoever has it. */
export function immutableResponse(
  request: Request,
  body: string | Uint8Array,
  type: string,
  shared: boolean,
): Response {
  const etag = `"${sha256(body).slice(0, 32)}"`;
  const headers = { 'Content-Type': type, 'Cache-Control': immutable(shared), ETag: etag };
  if (matches(request.headers.get('if-none-match'), etag))
    return new Response(null, { status: 304, headers });
  return new Response(body as BodyInit, { headers });
}
