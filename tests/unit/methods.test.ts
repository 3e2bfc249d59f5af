import { describe, expect, it } from 'vitest';
import { METHOD_OF_CAUTION, METHODS } from '~/lib/methods';
import { CAUTION_CODES } from '~/lib/thermal/estimate-schema';

describe('the methods', () => {
  it('are each named once, with where they hold, how good they are, what they leave out and where they come from', () => {
    expect(new Set(METHODS.map(({ id }) => id)).size).toBe(METHODS.length);
    for (const { id, says, validity, accuracy, leavesOut, sources } of METHODS) {
      expect(id).toMatch(/^[a-z]+(-[a-z]+)*$/);
      for (const text of [says, validity, accuracy, leavesOut]) expect(text.length).toBeGreaterThan(5);
      expect(sources.length).toBeGreaterThan(0);
    }
  });

  it.each(CAUTION_CODES)('explain the caution %s', (code) => {
    expect(METHODS.map(({ id }) => id)).toContain(METHOD_OF_CAUTION[code]);
  });
});
