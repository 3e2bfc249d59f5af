import { describe, expect, it } from 'vitest';
import { sourceFiles } from '../helpers/source-files';

const source = sourceFiles('src', /\.(ts|tsx|astro)$/);
const database = sourceFiles('db', /\.(ts|mjs)$/);
const tests = sourceFiles('tests', /\.(ts|tsx)$/);
const paths = (files: readonly { path: string }[]) => files.map(({ path }) => path);

describe('the source', () => {
  it('reads the environment in one file', () => {
    const readers = source.filter(({ text }) => /process\.env|import\.meta\.env/.test(text));
    expect(paths(readers)).toEqual(['src/lib/server/config.ts']);
  });

  it('prerenders nothing, so that the middleware sees every page', () => {
    expect(paths(source.filter(({ text }) => /prerender\s*=\s*true/.test(text)))).toEqual([]);
  });

  it('sets no HTML from text and spreads no attributes of unknown names in pages', () => {
    expect(
      paths(
        source.filter(({ text }) =>
          /set:html|dangerouslySetInnerHTML|define:vars|transition:|server:defer/.test(text),
        ),
      ),
    ).toEqual([]);
  });

  it('has no file named for nothing in particular', () => {
    const vague = [...source, ...database].filter(({ path }) =>
      /(^|\/)(utils?|misc|helpers?|common-utils)(\.|\/)/.test(path),
    );
    expect(paths(vague)).toEqual([]);
  });

  it('keeps a file to one subject: none longer than 350 lines', () => {
    const long = [...source, ...database, ...tests].filter(({ text }) => text.split('\n').length > 351);
    expect(paths(long)).toEqual([]);
  });

  it('silences no check', () => {
    // Spelled apart, so that this file does not find itself.
    const silencers = new RegExp(
      ['eslint-' + 'disable', '@ts-' + 'ignore', '@ts-' + 'nocheck', '@ts-' + 'expect-error'].join('|'),
    );
    expect(paths([...source, ...database, ...tests].filter(({ text }) => silencers.test(text)))).toEqual([]);
  });

  it('leaves no test out', () => {
    const left = new RegExp(`\\b(it|test|describe)\\.(${['skip', 'only', 'todo'].join('|')})\\b`);
    expect(paths(tests.filter(({ text }) => left.test(text)))).toEqual([]);
  });

  it('declares the attributes of models, whose columns a class field would hide', () => {
    const models = source.filter(
      ({ path, text }) => path.includes('/server/models/') && / extends Model</.test(text),
    );
    expect(models.length).toBeGreaterThan(8);
    for (const { path, text } of models) {
      const bodies = [...text.matchAll(/ extends Model<[\s\S]*?\{\n([\s\S]*?)\n\}/g)].map(
        ([, body = '']) => body,
      );
      const fields = bodies.flatMap((body) => body.split('\n')).filter((line) => /^ {2}\w+[!?]?:/.test(line));
      expect({ path, fields }).toEqual({ path, fields: [] });
    }
  });

  it('names no path of the machine it was written on', () => {
    const foreign = /(['"`(\s]|^)\/(work|home|root)\/|\.\.\/shared\b/m;
    expect(paths([...source, ...database].filter(({ text }) => foreign.test(text)))).toEqual([]);
  });
});
