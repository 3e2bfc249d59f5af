import { describe, expect, it } from 'vitest';
import { calibratedC } from '~/lib/sensors/calibration';

describe('a calibration sheet', () => {
  const sheet = [
    { atC: 1000, offsetC: 4 },
    { atC: 500, offsetC: 2 },
  ];

  it('takes off what the thermocouple reads too high, between its points in proportion', () => {
    expect(calibratedC(sheet, 500)).toBe(498);
    expect(calibratedC(sheet, 750)).toBe(747);
    expect(calibratedC(sheet, 1000)).toBe(996);
  });

  it('holds its last offset beyond its ends, and changes nothing without points', () => {
    expect(calibratedC(sheet, 20)).toBe(18);
    expect(calibratedC(sheet, 1200)).toBe(1196);
    expect(calibratedC([], 700)).toBe(700);
    expect(calibratedC(sheet, NaN)).toBeNaN();
  });
});
