import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/materials-published-decay.json' with { type: 'json' };
import { findMaterial } from '~/lib/materials';
import { type OneStep, peakC, rampLeft } from './kinetics-runs';

const { cases } = reference;
const START_C = 25;

/** The step of a pattern's other set, as the table has it. */
function stepOf(pattern: string, set: string): OneStep {
  const found = findMaterial('patterns', pattern)?.otherKinetics.find(({ name }) => name === set)?.steps[0];
  if (found === undefined) throw new Error(`${pattern} has no set called ${set}`);
  return found;
}

/** Temperature at which a share is gone on a ramp, °C, found in steps of 0.2 K. */
function lostAtC(step: OneStep, rateKPerMin: number, share: number): number {
  const tempsC = Array.from({ length: 1501 }, (_, i) => 200 + i * 0.2);
  const at = rampLeft(step, START_C, rateKPerMin, tempsC).findIndex((left) => left < 1 - share);
  return tempsC[at] ?? NaN;
}

const pla = stepOf('pla', 'PLA, default in nitrogen');
const styrene = stepOf('eps-foam', 'Polystyrene in nitrogen');

describe(`${reference.title}: PLA`, () => {
  it(`its energy is among those measured: ${cases.plaEnergy.source}`, () => {
    const { kJPerMol } = cases.plaEnergy;
    expect(pla.activationKJPerMol).toBeGreaterThanOrEqual(Math.min(...kJPerMol));
    expect(pla.activationKJPerMol).toBeLessThanOrEqual(Math.max(...kJPerMol));
  });

  it(`its peak: ${cases.plaPeak.source}`, () => {
    const { rateKPerMin, peakC: measuredC, toleranceC } = cases.plaPeak;
    expect(Math.abs(peakC(pla, START_C, rateKPerMin, measuredC) - measuredC)).toBeLessThan(toleranceC);
  });

  it(`its peak is where it is said to decompose: ${cases.plaWindow.source}`, () => {
    const { fromC, toC, rateKPerMin } = cases.plaWindow;
    const found = peakC(pla, START_C, rateKPerMin, (fromC + toC) / 2);
    expect(found).toBeGreaterThan(fromC);
    expect(found).toBeLessThan(toC);
  });

  it(`its first 5 %: ${cases.plaOnset.source}`, () => {
    const { lostShare, tempC, toleranceC } = cases.plaOnset;
    expect(Math.abs(lostAtC(pla, cases.plaPeak.rateKPerMin, lostShare) - tempC)).toBeLessThan(toleranceC);
  });

  it.each([
    ['PLLA, carboxyl ends', cases.scission],
    ['PLLA, calcium ends', cases.calcium],
  ])('%s', (name, of) => {
    const step = stepOf('pla', name);
    for (const [i, rate] of of.ratesKPerMin.entries()) {
      const expected = of.peakC[i] ?? NaN;
      expect(Math.abs(peakC(step, START_C, rate, expected) - expected)).toBeLessThanOrEqual(of.toleranceC);
    }
    expect(Math.abs(lostAtC(step, 10, 0.05) - of.lost5At10C)).toBeLessThanOrEqual(of.toleranceC);
    expect(Math.abs(lostAtC(step, 10, 0.99) - of.lost99At10C)).toBeLessThanOrEqual(of.toleranceC);
  });
});

describe(`${reference.title}: polystyrene`, () => {
  it(`its energy: ${cases.styreneEnergy.source}`, () => {
    expect(styrene.activationKJPerMol).toBe(cases.styreneEnergy.kJPerMol);
  });

  it(`peaks between the two temperatures seen: ${cases.styreneRange.source}`, () => {
    const { fromC, toC, ratesKPerMin } = cases.styreneRange;
    for (const rate of ratesKPerMin) {
      const found = peakC(styrene, START_C, rate, rate > 30 ? 460 : 425);
      expect(found).toBeGreaterThan(fromC);
      expect(found).toBeLessThan(toC);
    }
  });

  it(`peaks more than the spread above one study, which it therefore contradicts: ${cases.styrenePeak.source}`, () => {
    const { peakC: measuredC, rateKPerMin, spreadC } = cases.styrenePeak;
    const above = peakC(styrene, START_C, rateKPerMin, 425) - measuredC;
    expect(above).toBeGreaterThan(spreadC);
    expect(above).toBeLessThan(60);
  });
});
