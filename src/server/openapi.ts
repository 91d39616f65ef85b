/** The API as OpenAPI 3.1, made from what the endpoints say of themselves. */
import { z } from 'zod';
import { PROJECT_POLICY, type ProjectAction } from './policy';
import type { DescribedRoute, RouteSpec } from './route';

const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
const FILES = import.meta.glob<Record<string, unknown>>('../pages/api/**/*.ts');

interface Parameter {
  readonly name: string;
  readonly in: 'path' | 'query' | 'header';
  readonly required: boolean;
  readonly schema: unknown;
  readonly description?: string;
}

export interface Operation {
  readonly summary: string;
  readonly description: string;
  readonly parameters: readonly Parameter[];
  readonly requestBody?: unknown;
  readonly responses: Readonly<Record<string, unknown>>;
  readonly security?: readonly unknown[];
}

export interface OpenApi {
  readonly openapi: '3.1.0';
  readonly info: { readonly title: string; readonly version: string; readonly description: string };
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>;
  readonly components: unknown;
}

/** `../pages/api/projects/[slug]/blocks/index.ts` is `/api/projects/{slug}/blocks`. */
export const addressOf = (file: string): string =>
  file
    .replace(/^.*\/pages/, '')
    .replace(/(?:\/index)?\.ts$/, '')
    .replace(/\[(\w+)\]/g, '{$1}');

const schemaOf = (shape: z.ZodType, io: 'input' | 'output'): unknown =>
  z.toJSONSchema(shape, { io, unrepresentable: 'any' });

function queryParameters(shape: z.ZodType | undefined): Parameter[] {
  if (!shape) return [];
  const { properties = {}, required = [] } = schemaOf(shape, 'input') as {
    properties?: Record<string, unknown>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, schema]) => ({
    name,
    in: 'query',
    required: required.includes(name),
    schema,
  }));
}

function parametersOf(path: string, spec: RouteSpec): Parameter[] {
  const inPath = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]): Parameter => ({
    name: name!,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  const revision: Parameter = {
    name: 'If-Match',
    in: 'header',
    required: spec.edits === true,
    schema: { type: 'string' },
    description: 'The revision that the edit was made on, in quotes.',
  };
  return [...inPath, ...queryParameters(spec.query), ...(spec.edits ? [revision] : [])];
}

const PROBLEM = {
  content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
};

function operationOf(path: string, spec: RouteSpec): Operation {
  const rule = (PROJECT_POLICY as Record<string, { roles: readonly string[]; visitors?: string }>)[
    spec.action as ProjectAction
  ];
  const who = rule
    ? `Roles: ${rule.roles.join(', ')}${rule.visitors ? `; visitors ${rule.visitors}` : ''}.`
    : `Action: ${spec.action}.`;
  const accepted = spec.accepts ?? spec.body;
  const content = {
    ...(spec.answer ? { 'application/json': { schema: schemaOf(spec.answer, 'output') } } : {}),
    ...Object.fromEntries([spec.streams ?? []].flat().map((type) => [type, {}])),
  };
  const answer = Object.keys(content).length > 0 ? { content } : {};
  const body = accepted
    ? { 'application/json': { schema: schemaOf(accepted, 'input') } }
    : spec.reads && Object.fromEntries(spec.reads.map((type) => [type, { schema: { type: 'object' } }]));
  return {
    summary: spec.summary,
    description: who,
    parameters: parametersOf(path, spec),
    ...(body ? { requestBody: { required: true, content: body } } : {}),
    responses: {
      [String(spec.status ?? 200)]: { description: 'Done.', ...answer },
      default: { description: 'A problem (RFC 9457).', ...PROBLEM },
    },
  };
}

const describes = (value: unknown): value is DescribedRoute => typeof value === 'function' && 'spec' in value;

let made: Promise<OpenApi> | undefined;

export const openapiDocument = (): Promise<OpenApi> => (made ??= makeDocument());

async function makeDocument(): Promise<OpenApi> {
  const paths: Record<string, Record<string, Operation>> = {};
  for (const [file, load] of Object.entries(FILES).sort(([a], [b]) => (a < b ? -1 : 1))) {
    const path = addressOf(file);
    const module = await load();
    for (const method of METHODS) {
      const route = module[method];
      if (describes(route)) (paths[path] ??= {})[method.toLowerCase()] = operationOf(path, route.spec);
    }
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Driftwright',
      version: '1',
      description:
        'Build, defend and print plate reconstructions. Ages in Ma, angles in degrees, rates in mm/yr; names carry their unit.',
    },
    paths,
    components: {
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'driftwright_session' },
        token: { type: 'http', scheme: 'bearer' },
      },
      schemas: { Problem: PROBLEM_SCHEMA },
    },
  };
}

const text = { type: 'string' };
const PROBLEM_SCHEMA = {
  type: 'object',
  required: ['type', 'title', 'status'],
  properties: {
    type: text,
    title: text,
    status: { type: 'integer' },
    detail: text,
    errors: {
      type: 'array',
      items: {
        type: 'object',
        properties: {
          path: text,
          line: { type: 'integer' },
          column: text,
          read: text,
          problem: text,
          hint: text,
        },
      },
    },
  },
};
