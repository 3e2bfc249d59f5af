import { describe, expect, it } from 'vitest';
import {
  parseDuration,
  parseInterval,
  parseLength,
  parseMass,
  parseNumber,
  parseRate,
  parseTemperature,
  type Parsed,
} from '~/lib/units';

const value = <T>(parsed: Parsed<T>): T => {
  if (!parsed.ok) throw new Error(parsed.issue);
  return parsed.value;
};

describe('a number as people type it', () => {
  it.each([
    ['260', 260],
    ['1.5', 1.5],
    ['1,5', 1.5],
    ['0,125', 0.125],
    ['12,3456', 12.3456],
    ['−20', -20],
    ['1 250', 1250],
    ['1\u202f250,5', 1250.5],
    ['1,250.5', 1250.5],
    ['1.250,5', 1250.5],
    ['1000,125', 1000.125],
    ['.5', 0.5],
  ])('reads %s', (text, expected) => {
    expect(value(parseNumber(text))).toBe(expected);
  });

  it('refuses to guess whether 1,250 is one and a quarter or a thousand', () => {
    const parsed = parseNumber('1,250');
    expect(parsed).toMatchObject({ ok: false });
    expect(parsed.ok ? '' : parsed.issue).toContain('1250 or 1.250');
  });

  it.each(['', ' ', 'abc', '1.2.3', '1e3', 'Infinity', '--5', '1,2,3', '12 34'])('refuses “%s”', (text) => {
    expect(parseNumber(text).ok).toBe(false);
  });
});

describe('a temperature as people type it', () => {
  it.each([
    ['500F', 'C', 260],
    ['500 °F', 'C', 260],
    ['500 deg F', 'C', 260],
    ['260', 'C', 260],
    ['500', 'F', 260],
    ['260c', 'F', 260],
    ['260 °C', 'F', 260],
    ['1 292 °F', 'C', 700],
    ['-4 F', 'C', -20],
    ['533.15 K', 'C', 260],
    ['260 degrees', 'C', 260],
    ['37,5 °C', 'C', 37.5],
  ] as const)('reads %s while °%s is chosen', (text, scale, expectedC) => {
    expect(value(parseTemperature(text, scale))).toBeCloseTo(expectedC, 10);
  });

  it.each(['hot', '260 X', '260 °', '-300 °C', '500 F 20', ''])(
    'refuses “%s” or reads it plainly',
    (text) => {
      expect(parseTemperature(text, 'C').ok).toBe(text === '260 °');
    },
  );

  it('never subtracts 32 from a difference', () => {
    expect(value(parseInterval('18 °F', 'C'))).toBe(10);
    expect(value(parseInterval('0 °F', 'C'))).toBe(0);
    expect(value(parseInterval('10', 'C'))).toBe(10);
    expect(value(parseInterval('10 K', 'C'))).toBe(10);
  });
});

describe('a rate as people type it', () => {
  it.each([
    ['120', 'C', 120],
    ['120', 'F', 66.6666666667],
    ['216 °F/h', 'C', 120],
    ['216F/hr', 'C', 120],
    ['2 °C/min', 'C', 120],
    ['2 K / min', 'F', 120],
    ['150 per hour', 'C', 150],
    ['150 °C per hour', 'F', 150],
    ['150/h', 'C', 150],
    ['flat-out', 'C', 'flat-out'],
    ['Flat out', 'C', 'flat-out'],
    [' coast ', 'C', 'coast'],
  ] as const)('reads %s while °%s is chosen', (text, scale, expected) => {
    const found = value(parseRate(text, scale));
    if (typeof expected === 'string') expect(found).toBe(expected);
    else expect(found).toBeCloseTo(expected, 9);
  });

  it.each(['fast', '120 °C/fortnight', '120 m/s/h', '120 kg/h', ''])('refuses “%s”', (text) => {
    expect(parseRate(text, 'C').ok).toBe(false);
  });
});

describe('a length of time as people type it', () => {
  it.each([
    ['1 h 30', 5400],
    ['1h30', 5400],
    ['1:30', 5400],
    ['1:30:15', 5415],
    ['90 min', 5400],
    ['90m', 5400],
    ['1.5h', 5400],
    ['1,5 h', 5400],
    ['1 hour 30 minutes', 5400],
    ['2 d 4 h', 187200],
    ['45 s', 45],
    ['0', 0],
  ])('reads %s', (text, expectedS) => {
    expect(value(parseDuration(text, 'min'))).toBe(expectedS);
  });

  it('counts a bare number in the unit of its field', () => {
    expect(value(parseDuration('2', 'h'))).toBe(7200);
    expect(value(parseDuration('2', 'min'))).toBe(120);
    expect(value(parseDuration('1,5', 'h'))).toBe(5400);
  });

  it.each(['', 'soon', '1:75', '30 min 1 h', '5 parsecs', '-1', '1 h 30 x', '2 s 5', '1 constructor'])(
    'refuses “%s”',
    (text) => {
      expect(parseDuration(text, 'min').ok).toBe(false);
    },
  );
});

describe('mass and length as people type them', () => {
  it.each([
    ['2.5 kg', 2.5],
    ['850 g', 0.85],
    ['12', 12],
    ['5 lb', 2.26796185],
    ['5 lb 8 oz', 2.494758035],
  ])('reads a mass of %s', (text, expectedKg) => {
    expect(value(parseMass(text, 'kg'))).toBeCloseTo(expectedKg, 12);
  });

  it.each([
    ['8 mm', 0.008],
    ['8', 0.008],
    ['1.2 cm', 0.012],
    ['3/8 in', 0.009525],
    ['1 1/2"', 0.0381],
    ['1\' 6"', 0.4572],
    ['0.45 m', 0.45],
    ['12 500 mm', 12.5],
  ])('reads a length of %s', (text, expectedM) => {
    expect(value(parseLength(text, 'mm'))).toBeCloseTo(expectedM, 12);
  });

  it('takes a bare number in the unit that was chosen', () => {
    expect(value(parseMass('1', 'lb'))).toBe(0.45359237);
    expect(value(parseLength('1', 'in'))).toBe(0.0254);
  });

  it.each(['-1', '5 kg 2 lb 3 oz', '8 oz 5 lb', '3 toString', '1/0 in', 'heavy'])('refuses “%s”', (text) => {
    expect(parseMass(text, 'kg').ok).toBe(false);
    expect(parseLength(text, 'mm').ok).toBe(false);
  });
});
