import { describe, expect, it } from 'vitest';
import { FIRST_SHOWN, switchedLayers } from '~/components/islands/profile-strip/layers-shown';

describe('layers on the strip', () => {
  it('are switched on and off', () => {
    const on = switchedLayers(new Set(FIRST_SHOWN), 'power');
    expect(on.has('power')).toBe(true);
    expect(switchedLayers(on, 'power')).toEqual(new Set(FIRST_SHOWN));
  });

  it('are never more than two with a scale of their own: the oldest gives way', () => {
    const two = switchedLayers(switchedLayers(new Set(FIRST_SHOWN), 'power'), 'gas');
    const third = switchedLayers(two, 'heat-work');
    expect([...third].filter((id) => ['power', 'gas', 'water', 'heat-work'].includes(id))).toEqual([
      'gas',
      'heat-work',
    ]);
    expect(third.has('core')).toBe(true);
  });
});
