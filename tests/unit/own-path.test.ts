import { expect, test } from 'vitest';
import { ownPath } from '~/lib/server/http/page';

test.each(['/', '/runs', '/runs/new?version=1&kiln=2', '/profiles/a/versions/3#steps'])(
  'signing in leads on to a page of the site: %s',
  (path) => {
    expect(ownPath(path)).toBe(path);
  },
);

test.each([
  null,
  '',
  'runs',
  '//elsewhere.example',
  '/\\elsewhere.example',
  'https://elsewhere.example',
  'javascript:alert(1)',
  '/a\nb',
  '/a b',
  `/${'a'.repeat(3000)}`,
])('signing in never leads elsewhere: %j', (path) => {
  expect(ownPath(path)).toBe('/');
});
