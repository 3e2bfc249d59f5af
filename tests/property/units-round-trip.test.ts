import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatDuration,
  formatLength,
  formatMass,
  formatNumber,
  formatRate,
  formatTemperature,
  parseDuration,
  parseLength,
  parseMass,
  parseNumber,
  parseRate,
  parseTemperature,
} from '~/lib/units';

const scale = fc.constantFrom('C' as const, 'F' as const);
const valueOf = (parsed: { ok: true; value: unknown } | { ok: false; issue: string }) =>
  parsed.ok ? Number(parsed.value) : NaN;

describe('what is written can be typed back', () => {
  it('numbers, within half of their last digit', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e7, max: 1e7, noNaN: true }),
        fc.integer({ min: 0, max: 4 }),
        (value, decimals) => {
          const back = valueOf(parseNumber(formatNumber(value, decimals)));
          expect(Math.abs(back - value)).toBeLessThanOrEqual(0.5 * 10 ** -decimals + 1e-9);
        },
      ),
    );
  });

  it('temperatures and rates, in either scale, whatever the other person has chosen', () => {
    fc.assert(
      fc.property(fc.integer({ min: -20, max: 1400 }), scale, scale, (tempC, written, assumed) => {
        expect(valueOf(parseTemperature(formatTemperature(tempC, written, 2), assumed))).toBeCloseTo(
          tempC,
          2,
        );
      }),
    );
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 2000 }), scale, scale, (rateCPerH, written, assumed) => {
        expect(valueOf(parseRate(formatRate(rateCPerH, written, 2), assumed))).toBeCloseTo(rateCPerH, 2);
      }),
    );
  });

  it('lengths of time, to the minute below 72 h', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 72 * 60 - 1 }), (minutes) => {
        expect(valueOf(parseDuration(formatDuration(minutes * 60), 'min'))).toBe(minutes * 60);
      }),
    );
  });

  it('masses and lengths, within the digits shown', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 500, noNaN: true }),
        fc.constantFrom('kg' as const, 'lb' as const),
        (massKg, unit) => {
          expect(Math.abs(valueOf(parseMass(formatMass(massKg, unit), 'kg')) - massKg)).toBeLessThan(0.0501);
        },
      ),
    );
    fc.assert(
      fc.property(
        fc.double({ min: 0.001, max: 5, noNaN: true }),
        fc.constantFrom('mm' as const, 'in' as const),
        (lengthM, unit) => {
          expect(Math.abs(valueOf(parseLength(formatLength(lengthM, unit), 'mm')) - lengthM)).toBeLessThan(
            6e-4,
          );
        },
      ),
    );
  });
});

describe('any text at all', () => {
  it('is either understood as a finite number or refused with a reason, never a throw', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 30 }), (text) => {
        for (const parsed of [
          parseTemperature(text, 'C'),
          parseRate(text, 'F'),
          parseDuration(text, 'h'),
          parseMass(text, 'lb'),
          parseLength(text, 'in'),
        ]) {
          if (!parsed.ok) expect(parsed.issue.length).toBeGreaterThan(5);
          else if (typeof parsed.value === 'number') expect(Number.isFinite(parsed.value)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});
