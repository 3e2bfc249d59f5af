import { describe, expect, it } from 'vitest';
import { allRoutes } from '~/lib/contracts';
import { testApp } from '../helpers/app';

type Json = Record<string, unknown>;
interface Operation {
  operationId: string;
  parameters: { name: string; in: string; required: boolean; schema: Json }[];
  requestBody?: { content: Record<string, { schema: Json }> };
  responses: Record<string, { content: Record<string, { schema: Json }> }>;
  security: Json[];
}

const app = await testApp();
const { body: document } = await app.visitor().get('/api/openapi.json').expect(200);
const paths = document.paths as Record<string, Record<string, Operation>>;

describe('the OpenAPI document', () => {
  it('is OpenAPI 3.1 and says what it is of', () => {
    expect(document.openapi).toMatch(/^3\.1\./);
    expect(document.info).toMatchObject({ title: 'Holdfast' });
    expect(document.info.version).toMatch(/^\d+\.\d+\.\d+$/);
  });

  it('describes every call of the contract, and none beside', () => {
    const described = Object.entries(paths).flatMap(([path, item]) =>
      Object.keys(item).map((method) => `${method.toUpperCase()} ${path}`),
    );
    expect(described.sort()).toEqual(allRoutes.map((route) => `${route.method} ${route.path}`).sort());
  });

  it.each(allRoutes.map((route) => [`${route.method} ${route.path}`, route] as const))(
    'describes %s whole',
    (_, route) => {
      const operation = paths[route.path]?.[route.method.toLowerCase()];
      if (!operation) throw new Error('not described');
      const named = (place: string) =>
        operation.parameters.filter((each) => each.in === place).map((each) => each.name);
      expect(named('path')).toEqual([...route.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name));
      expect(named('header').includes('If-Match')).toBe(route.revision);
      expect(named('header').includes('Origin')).toBe(route.method !== 'GET');
      expect(operation.requestBody !== undefined).toBe(
        route.body !== undefined || route.rawBody !== undefined,
      );
      const answer = operation.responses[String(route.status)]?.content['application/json']?.schema;
      // A schema that describes nothing would be an empty object.
      expect(Object.keys(answer ?? {}).length).toBeGreaterThan(0);
      for (const [status, response] of Object.entries(operation.responses))
        if (Number(status) >= 400)
          expect(Object.keys(response.content)).toEqual(['application/problem+json']);
    },
  );

  it('names each operation once', () => {
    const names = Object.values(paths).flatMap((item) =>
      Object.values(item).map((operation) => operation.operationId),
    );
    expect(new Set(names).size).toBe(names.length);
  });

  it('refers to the schemas that it holds: to each of them, and to nothing else', () => {
    const references = [...JSON.stringify(document).matchAll(/"\$ref":"([^"]+)"/g)].map(
      ([, target = '']) => target,
    );
    const held = Object.keys(document.components.schemas as Json).map(
      (name) => `#/components/schemas/${name}`,
    );
    expect(held).not.toEqual([]);
    expect([...new Set(references)].sort()).toEqual(held.sort());
  });

  it('bounds what may be sent: no text without an end, in any body', () => {
    const endless: string[] = [];
    const walk = (schema: unknown, where: string): void => {
      if (typeof schema !== 'object' || schema === null) return;
      const { type, maxLength, format, pattern, enum: choices, const: only } = schema as Json;
      if (type === 'string' && !maxLength && !format && !pattern && !choices && only === undefined)
        endless.push(where);
      for (const [name, value] of Object.entries(schema)) walk(value, `${where}.${name}`);
    };
    for (const [path, item] of Object.entries(paths))
      for (const [method, operation] of Object.entries(item))
        walk(operation.requestBody?.content['application/json']?.schema, `${method} ${path}`);
    expect(endless).toEqual([]);
  });

  it('says which calls need no session', () => {
    const open = Object.entries(paths).flatMap(([path, item]) =>
      Object.entries(item)
        .filter(([, operation]) => operation.security.length === 0)
        .map(([method]) => `${method} ${path}`),
    );
    expect(open.sort()).toEqual(['get /api/health', 'post /api/auth/sign-in', 'post /api/setup']);
  });
});
