import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { ThermocoupleType } from '~/lib/logs/schema';
import { toleranceC, type ToleranceClass } from '~/lib/sensors/tolerance';

type Row = [
  standard: string,
  type: ThermocoupleType,
  toleranceClass: ToleranceClass,
  tempC: number,
  tolC: number,
];
const { rows } = JSON.parse(readFileSync('fixtures/references/its90-tolerances.json', 'utf8')) as {
  rows: Row[];
};

describe('thermocouple tolerances', () => {
  it('agree with every evaluated example of the published classes', () => {
    expect(rows.length).toBeGreaterThan(180);
    const wrong = rows.filter(([, type, name, tempC, tolC]) => {
      const own = toleranceC(type, name, tempC);
      return own === null || Math.abs(own - tolC) > 1e-6;
    });
    expect(wrong).toEqual([]);
  });

  it('say nothing where a class does not reach', () => {
    expect(toleranceC('K', '1', 1100)).toBeNull();
    expect(toleranceC('B', '1', 1000)).toBeNull();
    expect(toleranceC('J', '3', 0)).toBeNull();
  });
});
