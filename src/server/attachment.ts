import { plain } from '~/plain';

/** RFC 8187: what encodeURIComponent leaves of the marks with a meaning of their own is encoded too. */
const extended = (name: string): string =>
  encodeURIComponent(plain(name)).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`);

/** A file to keep, never shown inline: its name is quoted for old clients and encoded for the others (RFC 6266). */
export function attachment(
  body: string | Uint8Array,
  type: string,
  name: string,
  headers: Record<string, string> = {},
): Response {
  const ascii = name.replace(/[^\x20-\x7e]|["\\]/g, '_');
  return new Response(body as BodyInit, {
    headers: {
      'Content-Type': type,
      'Content-Disposition': `attachment; filename="${ascii}"; filename*=UTF-8''${extended(name)}`,
      'Cache-Control': 'private, no-cache',
      ...headers,
    },
  });
}
