import { isLoopback, type Settings } from './env';
import { Problem } from './problem';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Whether the browser spoke TLS, to us or to the proxy in front that we were told to trust. */
export function isSecure(request: Request, settings: Settings): boolean {
  if (settings.TRUST_PROXY && request.headers.get('x-forwarded-proto') === 'https') return true;
  return settings.PUBLIC_URL?.startsWith('https:') ?? false;
}

/** The origin that links in mails start with. Never taken from a request, whose Host anyone may write. */
export const publicOrigin = (settings: Settings): string =>
  settings.PUBLIC_URL
    ? new URL(settings.PUBLIC_URL).origin
    : `http://${settings.HOST.includes(':') ? `[${settings.HOST}]` : settings.HOST}:${settings.PORT}`;

/**
 * Refuses a name that is not ours: a foreign one that points at this machine would make another site's pages our own
 * origin (DNS rebinding). On a public interface without PUBLIC_URL any name is taken, since none is known.
 * @throws Problem `UnknownHost`
 */
export function requireKnownHost(request: Request, settings: Settings): void {
  const host = new URL(`http://${request.headers.get('host') ?? new URL(request.url).host}`).hostname;
  const publicName = settings.PUBLIC_URL ? new URL(settings.PUBLIC_URL).hostname : null;
  if (isLoopback(host) || host === publicName || host === settings.HOST) return;
  if (publicName === null && !isLoopback(settings.HOST)) return;
  throw new Problem('UnknownHost', { detail: `This is ${publicOrigin(settings)}, not ${host}.` });
}

/**
 * Refuses what another site makes a browser send: any unsafe method, whatever the content type. Origin must be
 * our own; a client that sends none (not a browser, or an old one) must not say that it comes from elsewhere.
 * @throws Problem `ForeignOrigin`
 */
export function requireOwnOrigin(request: Request, settings: Settings): void {
  if (SAFE.has(request.method)) return;
  const origin = request.headers.get('origin');
  if (origin === null) {
    const site = request.headers.get('sec-fetch-site');
    if (site !== null && site !== 'same-origin' && site !== 'none') throw new Problem('ForeignOrigin');
    return;
  }
  const host = request.headers.get('host') ?? new URL(request.url).host;
  const own = [`${isSecure(request, settings) ? 'https' : 'http'}://${host}`];
  if (settings.PUBLIC_URL) own.push(new URL(settings.PUBLIC_URL).origin);
  if (!own.includes(origin))
    throw new Problem('ForeignOrigin', { detail: 'Open the page on this site and try again.' });
}
