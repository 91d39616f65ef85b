import type { z } from 'zod';
import { KernelError } from '~/kernel/errors';
import { constraintProblem } from './constraint-problems';
import { log } from './log';
import { PROBLEMS, type ProblemName } from './problems';

/** One wrong value: where it stands, what was read, what is wrong, what to do. */
export interface FieldError {
  readonly path?: string;
  readonly line?: number;
  readonly column?: string;
  readonly read: string;
  readonly problem: string;
  readonly hint?: string;
}

interface Facts {
  readonly detail?: string;
  readonly errors?: readonly FieldError[];
  readonly headers?: Readonly<Record<string, string>>;
  /** Further members of the answer (RFC 9457 §3.2). */
  readonly members?: Readonly<Record<string, unknown>>;
}

export class Problem extends Error {
  override readonly name: ProblemName;
  readonly status: number;
  readonly title: string;

  constructor(
    name: ProblemName,
    readonly facts: Facts = {},
  ) {
    super(facts.detail ?? PROBLEMS[name].title);
    this.name = name;
    this.status = PROBLEMS[name].status;
    this.title = PROBLEMS[name].title;
  }
}

/** A value shortened to what a reader can take in. */
export function shown(value: unknown): string {
  if (value === undefined) return '';
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return text.length > 80 ? `${text.slice(0, 79)}…` : text;
}

/** Each issue of a contract as a row-level error; `root` is what was parsed. */
export function fieldErrors(error: z.ZodError, root: unknown): FieldError[] {
  return error.issues.slice(0, 100).map((issue) => {
    let value = root;
    for (const key of issue.path) value = (value as Record<PropertyKey, unknown> | null | undefined)?.[key];
    return { path: issue.path.map(String).join('.'), read: shown(value), problem: issue.message };
  });
}

/** The first errors in one line. */
export const inBrief = (errors: readonly FieldError[]): string =>
  errors
    .slice(0, 3)
    .map(({ path, problem }) => (path ? `${path}: ${problem}` : problem))
    .join('; ');

/** What any thrown value is to the outside. Whatever is not foreseen is logged and answered without its text. */
export function toProblem(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (error instanceof KernelError) return kernelProblem(error);
  const constraint = constraintProblem(error);
  if (constraint) {
    log.warn({ constraint: constraint.constraint }, 'constraint refused a change');
    return new Problem(constraint.name, constraint.facts);
  }
  log.error({ err: error }, 'unexpected error');
  return new Problem('Unexpected', {
    detail: 'It has been written to the log. Try again, and tell the site admin if it stays.',
  });
}

function kernelProblem(error: KernelError): Problem {
  const { quantity, value, message, hint, loop } = error;
  return new Problem(error.name, {
    detail: message,
    errors: [{ path: quantity, read: shown(value), problem: message, hint }],
    ...(loop ? { members: { loop } } : {}),
  });
}

/** RFC 9457, with the permanent name beside the standard members. */
export function problemResponse(problem: Problem): Response {
  const { name, status, title, facts } = problem;
  const body = {
    type: `/docs/api#${name}`,
    name,
    title,
    status,
    ...(facts.detail ? { detail: facts.detail } : {}),
    errors: facts.errors ?? [],
    ...facts.members,
  };
  return new Response(JSON.stringify(body), {
    status,
    headers: {
      'Content-Type': 'application/problem+json',
      'Cache-Control': 'no-store',
      ...(status === 401 ? { 'WWW-Authenticate': 'Bearer realm="Driftwright"' } : {}),
      ...facts.headers,
    },
  });
}
