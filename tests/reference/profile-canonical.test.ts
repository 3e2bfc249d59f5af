import { describe, expect, it } from 'vitest';
import vectors from '../../fixtures/references/profile-rfc8785.json' with { type: 'json' };
import { canonicalJson } from '~/lib/profile/canonical';

const fromBits = (hex: string): number => {
  const view = new DataView(new ArrayBuffer(8));
  view.setBigUint64(0, BigInt(`0x${hex}`));
  return view.getFloat64(0);
};

describe(`${vectors.title}, against ${vectors.source}`, () => {
  it.each(vectors.numbers)('the number $ieee754 is written $json', ({ ieee754, json }) => {
    expect(canonicalJson(fromBits(ieee754))).toBe(json);
  });

  it.each(vectors.objects)('$name', ({ input, canonical }) => {
    expect(canonicalJson(JSON.parse(input))).toBe(canonical);
  });

  it.each(['7ff0000000000000', 'fff0000000000000', '7fffffffffffffff'])('refuses the number %s', (bits) => {
    expect(() => canonicalJson(fromBits(bits))).toThrow(TypeError);
  });

  it('refuses text that is not Unicode', () => {
    expect(() => canonicalJson('\ud800')).toThrow(TypeError);
    expect(() => canonicalJson({ '\udead': 1 })).toThrow(TypeError);
    expect(() => canonicalJson('\ude02\ud83d')).toThrow(TypeError);
  });

  it('refuses what JSON cannot hold', () => {
    expect(() => canonicalJson({ a: undefined })).toThrow(TypeError);
    expect(() => canonicalJson(() => 1)).toThrow(TypeError);
  });
});
