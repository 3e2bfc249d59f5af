import { describe, expect, it } from 'vitest';
import { loadSchema } from '~/lib/thermal/load-schema';
import {
  CHAR_AIR_KG_PER_KG,
  charAirKgPerS,
  foreseePattern,
  type PatternProperties,
  patternState,
  settlePattern,
} from '~/lib/thermal/pattern-burnout';
import { patternProperties } from '~/lib/thermal/resolve-load';

/** A pattern that turns to char at once and whose char burns as fast as it gets air. */
const CHAR: PatternProperties = {
  massKg: 0.1,
  flowsC: null,
  drainedShare: 0,
  drainTimeS: 0,
  ashShare: 0,
  heatOfCombustionJPerKg: 30e6,
  airKgPerKg: 10,
  steps: [
    {
      massShare: 0.9,
      activationJPerMol: 1000,
      preExponentialPerS: 1e6,
      model: 'first-order',
      follows: null,
      needsAir: false,
    },
    {
      massShare: 0.1,
      activationJPerMol: 1000,
      preExponentialPerS: 1e6,
      model: 'first-order',
      follows: 0,
      needsAir: true,
    },
  ],
  charAir: { openShare: 0.1, shapeM: 5 },
  lagS: 0,
};

/** Share left after holding at a temperature for a time. */
function leftAfterS(properties: PatternProperties, tempC: number, forS: number, airShare = 1): number {
  const state = patternState(properties);
  for (let atS = 0; atS < forS; atS += 10) {
    foreseePattern(state, tempC, tempC, 10, false, airShare);
    settlePattern(state);
  }
  return state.leftShare;
}

function properties(mould: object, pattern: object): PatternProperties {
  const [one] = loadSchema.parse({
    moulds: [
      {
        material: 'gypsum-investment',
        massKg: 1,
        ...mould,
        pattern: { material: 'pla', massKg: 0.1, ...pattern },
      },
    ],
  }).moulds;
  if (!one?.pattern) throw new Error('no pattern');
  return patternProperties(one.pattern, one);
}

describe('char in a mould', () => {
  it('burns no faster than oxygen diffuses in: 10 g of carbon take 10 g × 11.49 of air, by hand', () => {
    // D(700 °C) = 2.1e-5·(973.15/298.15)^1.75, times 0.1·5 m, times 353/973.15 kg/m³
    const airKgPerS = 2.1e-5 * (973.15 / 298.15) ** 1.75 * 0.1 * 5 * (353 / 973.15);
    expect(charAirKgPerS({ openShare: 0.1, shapeM: 5 }, 700)).toBeCloseTo(airKgPerS, 9);
    const wholeS = (0.01 * 11.494) / airKgPerS;
    expect(CHAR_AIR_KG_PER_KG).toBeCloseTo(11.494, 2);
    expect(leftAfterS(CHAR, 700, wholeS / 2)).toBeCloseTo(0.05, 2);
    expect(leftAfterS(CHAR, 700, wholeS * 1.02)).toBeLessThan(1e-6);
  });

  it('burns half as fast where the chamber has half the air for it', () => {
    const gone = (airShare: number) => 0.1 - leftAfterS(CHAR, 700, 600, airShare);
    expect(gone(0.5) / gone(1)).toBeCloseTo(0.5, 2);
  });

  it('waits longer in a thick block than in a shell, and longest in a narrow cavity', () => {
    const shell = properties({ material: 'fused-silica-shell', form: 'shell', wallM: 0.008 }, {});
    const flask = properties({ form: 'flask', diameterM: 0.1 }, {});
    const narrow = properties({ form: 'flask', diameterM: 0.1 }, { massKg: 0.01 });
    const airOf = ({ charAir }: PatternProperties) => (charAir ? charAirKgPerS(charAir, 700) : NaN);
    expect(airOf(shell)).toBeGreaterThan(airOf(flask) * 2);
    expect(airOf(flask)).toBeGreaterThan(airOf(narrow));
  });
});

describe('a thick pattern', () => {
  it('trails the wall on a steady ramp by the rate times its lag, s²/π²a (first mode of a plate)', () => {
    const { lagS } = properties({}, { thickestM: 0.02 });
    // PLA of the table: 0.16 W/(m·K), 1240 kg/m³, 1800 J/(kg·K)
    expect(lagS).toBeCloseTo(0.02 ** 2 / (Math.PI ** 2 * (0.16 / (1240 * 1800))), 6);
    const state = patternState({
      ...CHAR,
      lagS: 600,
      steps: CHAR.steps.map((step) => ({ ...step, preExponentialPerS: 1e-30 })),
    });
    const rateCPerS = 300 / 3600;
    for (let atS = 0; atS < 20_000; atS += 50) {
      foreseePattern(state, 20 + rateCPerS * atS, 20 + rateCPerS * (atS + 50), 50, false, 1);
      settlePattern(state);
    }
    expect(20 + rateCPerS * 20_000 - state.middleC).toBeCloseTo(50, 3);
  });

  it('has no lag where it is hollow or nobody says how thick it is', () => {
    expect(properties({}, { thickestM: 0.02, hollow: true }).lagS).toBe(0);
    expect(properties({}, {}).lagS).toBe(0);
  });
});
