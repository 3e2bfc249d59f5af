import { describe, expect, it } from 'vitest';
import { allRoutes } from '~/lib/contracts';
import { ROLES } from '~/lib/contracts/common';
import { ACCESS, judge, ruleOf } from '~/lib/server/auth/access';
import { sourceFiles } from '../helpers/source-files';

/** The router's pattern of a file in `src/pages`. */
const patternOf = (path: string): string =>
  path
    .replace(/^src\/pages/, '')
    .replace(/\.(astro|ts)$/, '')
    .replace(/\/index$/, '') || '/';

const pages = sourceFiles('src/pages', /\.(astro|ts)$/);
/** The refusal of every unknown address under /api, which must stay unlisted. */
const CATCH_ALL = '/api/[...rest]';
const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;

describe('the access table', () => {
  it('has one rule for every page and endpoint', () => {
    const patterns = pages.map(({ path }) => patternOf(path)).filter((pattern) => pattern !== CATCH_ALL);
    expect(patterns.length).toBeGreaterThan(20);
    expect(patterns.filter((pattern) => !ruleOf(pattern))).toEqual([]);
    expect(ruleOf(CATCH_ALL)).toBeUndefined();
  });

  it('has no rule for what is not there, and none twice', () => {
    const patterns = new Set(pages.map(({ path }) => patternOf(path)));
    expect(ACCESS.filter((rule) => !patterns.has(rule.path)).map((rule) => rule.path)).toEqual([]);
    expect(new Set(ACCESS.map((rule) => rule.path)).size).toBe(ACCESS.length);
  });

  it('names exactly the methods that each endpoint has', () => {
    for (const { path, text } of pages.filter((page) => page.path.startsWith('src/pages/api/'))) {
      const pattern = patternOf(path);
      if (pattern === CATCH_ALL) continue;
      const exported = METHODS.filter((method) => new RegExp(`export const ${method}\\b`).test(text));
      expect({ pattern, methods: Object.keys(ruleOf(pattern)?.methods ?? {}).sort() }).toEqual({
        pattern,
        methods: [...exported].sort(),
      });
      expect(text, `${path} refuses other methods as a problem`).toMatch(
        /export const ALL = methodNotAllowed\(/,
      );
    }
  });

  it('covers every call of the contract', () => {
    const missing = allRoutes.filter(
      (route) => !ruleOf(route.path.replaceAll('{', '[').replaceAll('}', ']'))?.methods[route.method],
    );
    expect(missing.map((route) => `${route.method} ${route.path}`)).toEqual([]);
  });

  it('lets nobody in who has not signed in, but to the door', () => {
    const open = ACCESS.filter((rule) => Object.values(rule.methods).includes('anyone')).map(
      (rule) => rule.path,
    );
    expect(open.sort()).toEqual(
      [
        '/404',
        '/500',
        '/sign-in',
        '/sign-out',
        '/set-up',
        '/api/health',
        '/api/openapi.json',
        '/api/setup',
        '/api/auth/sign-in',
      ].sort(),
    );
  });

  it('refuses what it does not list, whoever asks', () => {
    expect(judge('/nowhere', 'GET', ROLES)).toBe('unlisted');
    expect(judge('/api/kilns/[id]', 'DELETE', ROLES)).toBe('wrong-method');
    expect(judge('/api/kilns/[id]', 'DELETE', null)).toBe('sign-in-first');
    expect(judge('/api/kilns', 'POST', ['student'])).toBe('wrong-role');
    expect(judge('/api/kilns', 'POST', ['student', 'technician'])).toBe('allowed');
    expect(judge('/api/kilns', 'POST', [])).toBe('wrong-role');
  });
});
