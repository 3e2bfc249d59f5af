import { describe, expect, it } from 'vitest';
import {
  formatClock,
  formatDuration,
  formatEnergy,
  formatInterval,
  formatLength,
  formatMass,
  formatNumber,
  formatRate,
  formatTemperature,
  rate,
  THIN_SPACE,
} from '~/lib/units';

const spaced = (text: string) => text.replaceAll(THIN_SPACE, '_');

describe('numbers on the page', () => {
  it.each([
    [1234, 0, '1234'],
    [12345, 0, '12_345'],
    [1234567.891, 2, '1_234_567.89'],
    [-20, 0, '−20'],
    [-0.2, 0, '0'],
    [Number.NaN, 0, '–'],
  ])('writes %d with %d decimals', (value, decimals, expected) => {
    expect(spaced(formatNumber(value, decimals))).toBe(expected);
  });

  it('sets a unit after a thin space', () => {
    expect(spaced(formatTemperature(260, 'C'))).toBe('260_°C');
    expect(spaced(formatTemperature(260, 'F'))).toBe('500_°F');
    expect(spaced(formatEnergy(28.44))).toBe('28.4_kWh');
  });

  it('does not shift differences and rates by 32', () => {
    expect(spaced(formatInterval(10, 'F'))).toBe('18_°F');
    expect(spaced(formatRate(120, 'F'))).toBe('216_°F/h');
    expect(spaced(formatRate(120, 'C'))).toBe('120_°C/h');
    expect(rate('flat-out', 'F')).toEqual({ number: 'flat-out', unit: '' });
  });

  it('chooses a readable unit of mass and length', () => {
    expect(spaced(formatMass(0.85, 'kg'))).toBe('850_g');
    expect(spaced(formatMass(2.5, 'kg'))).toBe('2.50_kg');
    expect(spaced(formatMass(2.26796185, 'lb'))).toBe('5.00_lb');
    expect(spaced(formatLength(0.0095, 'mm'))).toBe('9.5_mm');
    expect(spaced(formatLength(0.45, 'mm'))).toBe('450_mm');
    expect(spaced(formatLength(0.0381, 'in'))).toBe('1.50_in');
  });

  it.each([
    [0, '0_s'],
    [45, '45_s'],
    [1200, '20_min'],
    [5400, '1_h 30_min'],
    [21600, '6_h'],
    [259200, '3_d'],
    [273600, '3_d 4_h'],
    [-1200, '−20_min'],
  ])('writes %d s as a length of time', (durationS, expected) => {
    expect(spaced(formatDuration(durationS))).toBe(expected);
  });

  it('writes run time as hours and minutes', () => {
    expect(formatClock(48600)).toBe('13:30');
    expect(formatClock(299)).toBe('0:05');
    expect(formatClock(-3600)).toBe('−1:00');
  });
});
