import type { MiddlewareHandler } from 'astro';
import { identify } from '~/features/accounts/session';
import { settings } from '~/server/env';
import { secured } from '~/server/headers';
import { isSecure, requireOwnOrigin } from '~/server/origin';
import { Problem, problemResponse, toProblem } from '~/server/problem';
import { ready } from '~/server/start';

/** Every request: start if need be, refuse what another site sent, say who asks, add the headers. */
export const onRequest: MiddlewareHandler = async (context, next) => {
  if (context.isPrerendered) return next();
  try {
    await ready();
  } catch {
    return secured(problemResponse(new Problem('NotReady', { detail: 'Its console says why.' })), false);
  }
  const { request, locals, cookies } = context;
  const secure = isSecure(request, settings());
  try {
    const theme = cookies.get('theme')?.value;
    locals.theme = theme === 'light' || theme === 'dark' ? theme : null;
    const { actor, session } = await identify(context);
    locals.actor = actor;
    locals.user = actor.user;
    locals.session = session;
    if (actor.via !== 'token') requireOwnOrigin(request, settings());
    return secured(await next(), secure);
  } catch (error) {
    return secured(problemResponse(toProblem(error)), secure);
  }
};
