import type { APIContext, MiddlewareHandler } from 'astro';
import { identify } from '~/features/accounts/session';
import { settings } from '~/server/env';
import { secured } from '~/server/headers';
import { methodsOf } from '~/server/methods';
import { isSecure, requireKnownHost, requireOwnOrigin } from '~/server/origin';
import { Problem, problemResponse, toProblem } from '~/server/problem';
import { ready } from '~/server/start';

/** What no endpoint answers below /api gets a problem document, not a page. */
async function answered(context: APIContext, response: Response): Promise<Response> {
  const { routePattern, request, url } = context;
  const type = response.headers.get('content-type') ?? '';
  if (!url.pathname.startsWith('/api/') || response.status !== 404 || type.includes('json')) return response;
  const methods = await methodsOf(routePattern);
  if (methods.length === 0)
    return problemResponse(new Problem('NotFound', { detail: 'No such address. See /docs/api.' }));
  const Allow = methods.join(', ');
  if (request.method === 'OPTIONS') return new Response(null, { status: 204, headers: { Allow } });
  return problemResponse(
    new Problem('MethodNotAllowed', {
      detail: `${request.method} is not among ${Allow}.`,
      headers: { Allow },
    }),
  );
}

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
    requireKnownHost(request, settings());
    const theme = cookies.get('theme')?.value;
    locals.theme = theme === 'light' || theme === 'dark' ? theme : null;
    const { actor, session } = await identify(context);
    locals.actor = actor;
    locals.user = actor.user;
    locals.session = session;
    if (actor.via !== 'token') requireOwnOrigin(request, settings());
    return secured(await answered(context, await next()), secure);
  } catch (error) {
    return secured(await failed(context, toProblem(error)), secure);
  }
};

/** An unforeseen error of a page is told as a page. */
async function failed(context: APIContext, problem: Problem): Promise<Response> {
  const { request, url } = context;
  const wantsPage = request.headers.get('accept')?.includes('text/html') ?? false;
  if (problem.name !== 'Unexpected' || url.pathname.startsWith('/api/') || !wantsPage)
    return problemResponse(problem);
  try {
    const page = await context.rewrite('/500');
    return new Response(page.body, { status: problem.status, headers: page.headers });
  } catch {
    return problemResponse(problem);
  }
}
