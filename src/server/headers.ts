/** On every answer, pages and API alike; server.mjs sets the same ones on static files. */
export const SECURITY_HEADERS: Readonly<Record<string, string>> = {
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'strict-origin-when-cross-origin',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=()',
};
const HSTS = 'max-age=31536000; includeSubDomains';
/** What is not a page loads nothing at all, should a browser ever show it as one. */
const DATA_CSP = "default-src 'none'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'; sandbox";

/** The answer with the headers added; some responses come with headers that cannot be written. */
export function secured(response: Response, secure: boolean): Response {
  const headers = new Headers(response.headers);
  for (const [name, value] of Object.entries(SECURITY_HEADERS))
    if (!headers.has(name)) headers.set(name, value);
  if (!headers.has('Cache-Control')) headers.set('Cache-Control', 'private, no-cache');
  if (secure) headers.set('Strict-Transport-Security', HSTS);
  const isPage = headers.get('content-type')?.startsWith('text/html') ?? false;
  if (!isPage && !headers.has('Content-Security-Policy')) headers.set('Content-Security-Policy', DATA_CSP);
  return new Response(response.body, { status: response.status, statusText: response.statusText, headers });
}
