import type { APIContext, APIRoute } from 'astro';
import { z } from 'zod';
import { localPath } from '~/paths';
import { isPlain, plain } from '~/plain';
import { openProject, type Access } from './access';
import type { Actor } from './actor';
import { isForm, readForm, readJson } from './body';
import { requireSite, type Action, type ProjectAction, type SiteAction } from './policy';
import { fieldErrors, inBrief, Problem, problemResponse, toProblem } from './problem';

type Shape = z.ZodType | undefined;
type Parsed<S extends Shape> = S extends z.ZodType ? z.output<S> : undefined;

/** What an endpoint says of itself: checked before its handler runs, and published as OpenAPI. */
export interface RouteSpec<A extends Action = Action, Q extends Shape = Shape, B extends Shape = Shape> {
  readonly action: A;
  readonly summary: string;
  readonly query?: Q;
  readonly body?: B;
  /** Shape of the body for the API reference, where rows are checked one by one after parsing. */
  readonly accepts?: z.ZodType;
  /** Shape of the JSON answer, for the API reference. */
  readonly answer?: z.ZodType;
  readonly status?: number;
  readonly limitBytes?: number;
  /** The page that posts this as a plain form, by the fields posted: problems go back to it as `?error=Name`. */
  readonly form?: (fields: Readonly<Record<string, string>>) => string;
  /** Media types of answers that are not JSON. */
  readonly streams?: string | readonly string[];
  /** The edit names the revision it was made on (`If-Match`); or may, where it can also hold for any. */
  readonly edits?: boolean | 'optional';
  /** Media types read, where the handler reads the body itself. */
  readonly reads?: readonly string[];
}

interface Call<Q extends Shape, B extends Shape> {
  readonly context: APIContext;
  readonly request: Request;
  readonly actor: Actor;
  readonly params: Readonly<Record<string, string>>;
  readonly query: Parsed<Q>;
  readonly body: Parsed<B>;
  /** True where a browser posted a plain form and awaits a page. */
  readonly posted: boolean;
}

type Answer = Response | object | undefined;
export type DescribedRoute = APIRoute & { readonly spec: RouteSpec };

/** An endpoint outside any project. The handler's return is sent as JSON; undefined is 204. */
export function route<Q extends Shape = undefined, B extends Shape = undefined>(
  spec: RouteSpec<SiteAction, Q, B>,
  handler: (call: Call<Q, B>) => Answer | Promise<Answer>,
): DescribedRoute {
  return describe(spec, async (context, fields) => {
    requireSite(context.locals.actor, spec.action);
    return handler(await read(spec, context, fields));
  });
}

/** An endpoint below /api/projects/{slug}: the project is opened for the action first. */
export function projectRoute<Q extends Shape = undefined, B extends Shape = undefined>(
  spec: RouteSpec<ProjectAction, Q, B>,
  handler: (call: Call<Q, B> & { readonly access: Access }) => Answer | Promise<Answer>,
): DescribedRoute {
  return describe(spec, async (context, fields) => {
    const access = await openProject(context.locals.actor, context.params['slug'] ?? '', spec.action);
    return handler({ ...(await read(spec, context, fields)), access });
  });
}

type Fields = Record<string, string>;

function describe(
  spec: RouteSpec,
  run: (context: APIContext, fields: Fields) => Promise<Answer>,
): DescribedRoute {
  const answer: APIRoute = async (context) => {
    const fields: Fields = {};
    try {
      if (!Object.values(context.params).every((value) => isPlain(value ?? '')))
        throw new Problem('NotFound');
      const result = await run(context, fields);
      if (result instanceof Response) return result;
      if (result === undefined) return new Response(null, { status: 204 });
      return json(result, spec.status ?? 200);
    } catch (error) {
      const problem = toProblem(error);
      if (spec.form && isForm(context.request)) return backToForm(spec.form(fields), problem);
      return problemResponse(problem);
    }
  };
  return Object.assign(answer, { spec });
}

async function read<Q extends Shape, B extends Shape>(
  spec: RouteSpec<Action, Q, B>,
  context: APIContext,
  fields: Fields,
): Promise<Call<Q, B>> {
  const { request, params, url, locals } = context;
  const query = Object.fromEntries(url.searchParams);
  for (const [name, value] of Object.entries(query))
    if (!isPlain(value))
      throw new Problem('InvalidQuery', { detail: `${plain(name)} holds control characters.` });
  const posted = spec.form !== undefined && isForm(request);
  let raw: unknown;
  if (posted) raw = Object.assign(fields, await readForm(request, spec.limitBytes));
  else if (spec.body) raw = await readJson(request, spec.limitBytes);
  requireKnown(spec.query, url.searchParams);
  return {
    context,
    request,
    actor: locals.actor,
    params: params as Record<string, string>,
    query: parse(spec.query as Q, query, 'InvalidQuery'),
    body: parse(spec.body as B, raw, 'InvalidRows'),
    posted,
  };
}

/** A name misspelt would be an answer to another question, and of one given twice only one can be meant. */
function requireKnown(shape: Shape, given: URLSearchParams): void {
  if (!(shape instanceof z.ZodObject)) return;
  const known = Object.keys(shape.shape);
  const errors = [...new Set(given.keys())].flatMap((name) => {
    const read = given.getAll(name);
    if (!known.includes(name))
      return {
        path: plain(name),
        read: plain(read[0] ?? ''),
        problem: `no such name here; known are ${known.join(', ')}`,
      };
    return read.length > 1 ? { path: name, read: read.join(', '), problem: 'given more than once' } : [];
  });
  if (errors.length > 0) throw new Problem('InvalidQuery', { detail: inBrief(errors), errors });
}

function parse<S extends Shape>(shape: S, value: unknown, name: 'InvalidQuery' | 'InvalidRows'): Parsed<S> {
  if (!shape) return undefined as Parsed<S>;
  const result = shape.safeParse(value);
  if (result.success) return result.data as Parsed<S>;
  const errors = fieldErrors(result.error, value);
  throw new Problem(name, { detail: inBrief(errors), errors });
}

export const json = (value: unknown, status = 200, headers: Record<string, string> = {}): Response =>
  new Response(JSON.stringify(value), {
    status,
    headers: { 'Content-Type': 'application/json', 'Cache-Control': 'private, no-cache', ...headers },
  });

function backToForm(page: string, problem: Problem): Response {
  const address = `${page}${page.includes('?') ? '&' : '?'}error=${problem.name}`;
  return new Response(null, { status: 303, headers: { Location: address, 'Cache-Control': 'no-store' } });
}

/** Where a posted form goes on to: a path of this site, never another address. */
export const onward = (next: string | undefined, otherwise: string): Response =>
  new Response(null, {
    status: 303,
    headers: { Location: localPath(next, otherwise), 'Cache-Control': 'no-store' },
  });
