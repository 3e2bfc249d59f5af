import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { needBuild } from '../../db/up/build.mjs';

const client = join(await needBuild(), 'client');
const files = readdirSync(client, { withFileTypes: true, recursive: true })
  .filter((entry) => entry.isFile() && /\.(js|mjs|css|html)$/.test(entry.name))
  .map((entry) => ({ name: entry.name, text: readFileSync(join(entry.parentPath, entry.name), 'utf8') }));
const naming = (pattern: RegExp) => files.filter(({ text }) => pattern.test(text)).map(({ name }) => name);

describe('what is sent to the browser', () => {
  it('is there at all', () => {
    expect(files.filter(({ name }) => name.endsWith('.js')).length).toBeGreaterThan(3);
  });

  it('holds nothing of the database, of passwords or of the server', () => {
    expect(naming(/sequelize|pg_catalog|scram-sha-256|bcrypt|DATABASE_APP_URL|HOLDFAST_SECRET/i)).toEqual([]);
    expect(naming(/from ?["'](node:|pg["'])|require\(["'](pg|fs|crypto)["']\)/)).toEqual([]);
  });

  it('compiles no code from text, which the policy of the site forbids', () => {
    expect(naming(/\beval\(|new Function\(["'`]/)).toEqual([]);
  });

  it('is never a page made at build time, which the middleware would not see', () => {
    expect(files.filter(({ name }) => name.endsWith('.html'))).toEqual([]);
  });

  it('carries no source maps', () => {
    expect(naming(/sourceMappingURL/)).toEqual([]);
  });
});
