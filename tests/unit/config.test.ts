import { describe, expect, it } from 'vitest';
import { parseConfig } from '~/lib/server/config';

const DEMO = { DATABASE_APP_URL: 'postgres://a:b@127.0.0.1/x', HOLDFAST_SECRET: 's'.repeat(32) };
const PRODUCTION = { ...DEMO, HOLDFAST_MODE: 'production', HOLDFAST_ORIGIN: 'https://firing.example' };

describe('the environment', () => {
  it('is demo mode with no origin of its own, if not told otherwise', () => {
    expect(parseConfig(DEMO)).toMatchObject({ mode: 'demo', origin: null, maxUploadBytes: 2 ** 30 });
    expect(parseConfig({ ...DEMO, HOLDFAST_MODE: '' })).toMatchObject({ mode: 'demo' });
    expect(parseConfig({ ...DEMO, HOLDFAST_ORIGIN: 'https://firing.example' }).origin).toBeNull();
  });

  it('gives production the origin without a path', () => {
    expect(parseConfig({ ...PRODUCTION, HOLDFAST_ORIGIN: 'https://firing.example/' }).origin).toBe(
      'https://firing.example',
    );
  });

  it.each([
    ['no secret', { HOLDFAST_SECRET: undefined }, /HOLDFAST_SECRET/],
    ['a short secret', { HOLDFAST_SECRET: 'short' }, /at least 32 characters/],
    ['no origin', { HOLDFAST_ORIGIN: undefined }, /HOLDFAST_ORIGIN/],
    ['an origin that is not https', { HOLDFAST_ORIGIN: 'http://firing.example' }, /https/],
    ['another mode', { HOLDFAST_MODE: 'prod' }, /HOLDFAST_MODE/],
    ['no database', { DATABASE_APP_URL: undefined }, /DATABASE_APP_URL/],
    ['an upload limit that is no number', { HOLDFAST_MAX_UPLOAD_BYTES: 'much' }, /HOLDFAST_MAX_UPLOAD_BYTES/],
  ])('refuses production with %s, and says so', (_, change, message) => {
    expect(() => parseConfig({ ...PRODUCTION, ...change })).toThrow(message);
  });

  it('never says what the secret was', () => {
    expect(() => parseConfig({ ...PRODUCTION, HOLDFAST_SECRET: 'tell-nobody' })).toThrow(
      /^((?!tell-nobody)[\s\S])*$/,
    );
  });
});
