import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/kinetics.json' with { type: 'json' };
import { holdsRun, peakC, rampLeft, rampRun } from './kinetics-runs';

const R_J_PER_MOL_K = 8.314462618;

describe(`${reference.title}: ${reference.source}`, () => {
  const runs = reference.systems.flatMap(({ id, runs: each }) =>
    each.map(({ rateKPerMin, peakC: peak }) => [id, rateKPerMin, peak] as const),
  );
  it.each(runs)('system %s at %d K/min is gone by 0.1 % of the whole as exactly computed', (id, rate) => {
    expect(rampRun(id, rate)).toBeLessThanOrEqual(1);
  });

  it.each(runs)('system %s at %d K/min goes fastest at %d °C', (id, rate, peak) => {
    const of = reference.systems.find((system) => system.id === id);
    if (of === undefined) throw new Error(id);
    expect(Math.abs(peakC(of, of.startC, rate, peak) - peak)).toBeLessThan(0.3);
  });

  it.each(reference.systems.map(({ id }) => id))('system %s on a ramp with holds', (id) => {
    expect(holdsRun(id)).toBeLessThanOrEqual(1);
  });

  it.each(reference.systems)(
    'Kissinger on the peaks of system $id gives its energy back within 1 %',
    (of) => {
      const points = of.runs.map(({ rateKPerMin, peakC: around }) => {
        const kelvin = peakC(of, of.startC, rateKPerMin, around) + 273.15;
        return [1 / kelvin, Math.log(rateKPerMin / 60 / kelvin ** 2)] as const;
      });
      const n = points.length;
      const [sx, sy] = points.reduce(([x, y], [px, py]) => [x + px, y + py], [0, 0]);
      const slope =
        points.reduce((sum, [x, y]) => sum + (x - sx / n) * (y - sy / n), 0) /
        points.reduce((sum, [x]) => sum + (x - sx / n) ** 2, 0);
      expect(Math.abs((-slope * R_J_PER_MOL_K) / 1000 / of.activationKJPerMol - 1)).toBeLessThan(0.01);
    },
  );

  it('notices an activation energy that is 0.1 % off', () => {
    expect(rampRun('B', 5, 1.001)).toBeGreaterThan(1);
    expect(holdsRun('A', 1.001)).toBeGreaterThan(1);
  });
});

const { measured } = reference;
describe(`${measured.title}: ${measured.source}`, () => {
  const [slow, fast] = measured.runs;
  if (slow === undefined || fast === undefined) throw new Error('two runs');
  /** A first-order step with the energy of its four measured peaks, A = βE/(RT²)·exp(E/RT) in the mean over them. */
  const perK = (measured.activationKJPerMol * 1000) / R_J_PER_MOL_K;
  const lnOf = ({ rateKPerMin, peakC: at }: (typeof measured.peaks)[number]): number =>
    Math.log(((rateKPerMin / 60) * perK) / (at + 273.15) ** 2) + perK / (at + 273.15);
  const lnMean = measured.peaks.reduce((sum, each) => sum + lnOf(each), 0) / measured.peaks.length;
  const step = { activationKJPerMol: measured.activationKJPerMol, preExponentialPerS: Math.exp(lnMean) };
  const halfC = (rows: readonly (readonly number[])[], at: 0 | 1, tempsC: readonly number[]): number => {
    const i = rows.findIndex((row) => (row[at] ?? 1) < 0.5);
    const [before = NaN, after = NaN] = [rows[i - 1]?.[at], rows[i]?.[at]];
    const [lowC = NaN, highC = NaN] = [tempsC[i - 1], tempsC[i]];
    return lowC + ((highC - lowC) * (before - 0.5)) / (before - after);
  };

  it.each(measured.peaks)('at $rateKPerMin K/min it peaks within 2 K of where it was measured to', (run) => {
    const found = peakC(step, 100, run.rateKPerMin, run.peakC);
    expect(Math.abs(found - run.peakC)).toBeLessThan(measured.peakToleranceC);
  });

  it.each([
    ['3 K/min', slow],
    ['10 K/min', fast],
  ])('half of it is gone at %s within 6 K of where it was measured', (_name, run) => {
    const tempsC = run.table.map(([tempC]) => tempC ?? NaN);
    const computed = rampLeft(step, 100, run.rateKPerMin, tempsC).map((left) => [left]);
    const found = halfC(computed, 0, tempsC);
    expect(Math.abs(found - halfC(run.table, 1, tempsC))).toBeLessThan(measured.toleranceC);
  });
});
