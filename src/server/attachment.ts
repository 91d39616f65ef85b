/** A file to keep, never shown inline: its name is quoted for old clients and encoded for the others (RFC 6266). */
export function attachment(
  body: string | Uint8Array,
  type: string,
  name: string,
  headers: Record<string, string> = {},
): Response {
  const plain = name.replace(/[^\x20-\x7e]|["\\]/g, '_');
  return new Response(body as BodyInit, {
    headers: {
      'Content-Type': type,
      'Content-Disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name)}`,
      'Cache-Control': 'private, no-cache',
      ...headers,
    },
  });
}
