import { version } from '../../../package.json' with { type: 'json' };
import { problemSchema } from '~/lib/contracts/common';
import { allRoutes } from '~/lib/contracts';
import { bodyMayBeLeftOut, type Route } from '~/lib/contracts/route';
import { z } from '~/lib/zod';
import { ruleOf } from './auth/access';
import { PROBLEMS } from './errors';

type Json = Record<string, unknown>;

const REVISION_HEADER: Json = {
  name: 'If-Match',
  in: 'header',
  required: true,
  description: 'The revision that is being changed, quoted.',
  schema: { type: 'string', pattern: '^"\\d+"$' },
};
const ORIGIN_HEADER: Json = {
  name: 'Origin',
  in: 'header',
  required: true,
  description: 'The address of this site; any other is refused.',
  schema: { type: 'string', format: 'uri' },
};

/** The HTTP contract as an OpenAPI 3.1 document, made from the schemas that endpoints parse with and clients are typed by. */
export function openApiDocument(routes: readonly Route[] = allRoutes): Json {
  const paths: Record<string, Json> = {};
  for (const route of routes) (paths[route.path] ??= {})[route.method.toLowerCase()] = operation(route);
  return {
    openapi: '3.1.0',
    info: {
      title: 'Holdfast',
      version,
      description:
        'Plan, prove and record the firings of a metal-casting studio. Temperatures are in °C, times in seconds, masses in kg; ' +
        'every number’s name ends in its unit. All figures are estimates that support a trained person’s judgement.',
    },
    paths,
    components: {
      schemas: { Problem: schemaOf(problemSchema, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'holdfast_session' } },
    },
  };
}

/** Dates and transforms have no JSON of their own; what goes over the wire is described by the other side of the schema. */
const schemaOf = (schema: z.ZodType, io: 'input' | 'output'): Json => {
  const { $schema: _dialect, ...json } = z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    reused: 'inline',
  });
  return json;
};

function operation(route: Route): Json {
  const open = isOpen(route);
  return {
    operationId: nameOf(route),
    summary: route.summary,
    tags: [route.path.split('/')[2]],
    parameters: [
      ...pathParameters(route.path),
      ...queryParameters(route),
      ...(route.revision ? [REVISION_HEADER] : []),
      ...(route.method === 'GET' ? [] : [ORIGIN_HEADER]),
    ],
    ...requestBody(route),
    responses: responses(route, open),
    security: open ? [] : [{ session: [] }],
  };
}

function isOpen(route: Route): boolean {
  const pattern = route.path.replaceAll('{', '[').replaceAll('}', ']');
  return ruleOf(pattern)?.methods[route.method] === 'anyone';
}

/** `POST /api/runs/{id}/logs` is `postRunsIdLogs`. */
const nameOf = (route: Route): string =>
  route.method.toLowerCase() +
  route.path
    .slice('/api/'.length)
    .split(/[^A-Za-z0-9]+/)
    .filter(Boolean)
    .map((word) => word.charAt(0).toUpperCase() + word.slice(1))
    .join('');

const pathParameters = (path: string): Json[] =>
  [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: name === 'n' ? { type: 'integer', minimum: 1 } : { type: 'string', format: 'uuid' },
  }));

function queryParameters(route: Route): Json[] {
  if (!route.query) return [];
  const schema = schemaOf(route.query, 'input');
  const required = (schema['required'] ?? []) as string[];
  return Object.entries((schema['properties'] ?? {}) as Record<string, Json>).map(([name, property]) => ({
    name,
    in: 'query',
    required: required.includes(name),
    // A number in an address is text that is read as one; of those the library only knows the result.
    schema: Object.keys(property).length === 0 ? { type: 'string' } : property,
  }));
}

function requestBody(route: Route): Json {
  const json = route.body && { 'application/json': { schema: schemaOf(route.body, 'input') } };
  const raw = route.rawBody && {
    [route.rawBody]: {
      schema: {
        type: 'object',
        properties: {
          file: { type: 'string', contentMediaType: 'application/octet-stream' },
          mapping: { type: 'string' },
        },
        required: ['file'],
      },
    },
  };
  const required = !bodyMayBeLeftOut(route);
  return json || raw ? { requestBody: { required, content: { ...json, ...raw } } } : {};
}

function responses(route: Route, open: boolean): Json {
  const content = { 'application/json': { schema: schemaOf(route.response, 'output') } };
  const usual: Json = { description: route.summary, content };
  const all: Json = { [String(route.status)]: usual };
  for (const status of problemStatuses(route, open))
    all[String(status)] ??= {
      description: titleOf(status),
      content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
    };
  return all;
}

function problemStatuses(route: Route, open: boolean): number[] {
  const body = route.body || route.rawBody;
  return [
    ...(open ? [] : [401, 403]),
    ...(route.method === 'GET' ? [] : [403]),
    ...(route.path.includes('{') ? [404] : []),
    ...(route.revision ? [412, 428] : []),
    ...(body ? [400, 413, 415, 422] : []),
    ...(route.query ? [422] : []),
    ...route.problems,
    500,
    503,
  ];
}

const titleOf = (status: number): string =>
  Object.values(PROBLEMS)
    .filter(([each]) => each === status)
    .map(([, title]) => title)
    .join('; ') || 'Refused';
