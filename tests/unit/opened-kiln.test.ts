import { describe, expect, it } from 'vitest';
import { profileSchema, type Segment } from '~/lib/profile/schema';
import { sealText } from '~/lib/profile/seal';
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { simulate } from '~/lib/thermal/simulate';

const kiln = kilnPlateSchema.parse({
  energy: 'electric',
  innerWidthM: 0.4,
  innerDepthM: 0.4,
  innerHeightM: 0.5,
  lining: 'fibre',
  liningM: 0.15,
  maxC: 1200,
  ratedKW: 60,
});

function firing(opened: Partial<Segment>, ratedKW = 60) {
  const profile = profileSchema.parse({
    startC: 20,
    segments: [{ stage: 'casting-hold', toC: 800, rateCPerH: 400, holdS: 3600, ...opened }],
  });
  const load = loadSchema.parse({ moulds: [{ material: 'fused-silica-shell', massKg: 3, wallM: 0.008 }] });
  return simulate({ profile, kiln: { ...kiln, ratedKW } as typeof kiln, load, ambientC: 20 });
}

describe('a kiln that is opened', () => {
  it('radiates as a black opening does, σ·A·(T⁴ − T_room⁴), while power holds its temperature (by hand)', () => {
    const shut = firing({});
    const open = firing({ openedS: 600 });
    const lostKWh = (5.670374e-8 * 0.4 * 0.5 * (1073.15 ** 4 - 293.15 ** 4) * 600) / 3.6e6;
    expect(open.energy.ventKWh - shut.energy.ventKWh).toBeCloseTo(lostKWh, 2);
    const half = firing({ openedS: 600, openedShare: 0.5 });
    expect((half.energy.ventKWh - shut.energy.ventKWh) / lostKWh).toBeCloseTo(0.5, 2);
  });

  it('falls where its power is less, and comes back once it is shut; its energy closes', () => {
    const { chamberC, timeS, energy, segments } = firing({ openedS: 300 }, 4);
    const arrivesS = segments[0]?.rampEndS ?? NaN;
    const lowest = Math.min(...chamberC.filter((_, i) => (timeS[i] ?? 0) > arrivesS));
    expect(lowest).toBeLessThan(780);
    expect(chamberC.at(-1)).toBeGreaterThan(lowest + 10);
    expect(Math.abs(energy.imbalance)).toBeLessThan(1e-3);
    expect(segments[0]?.kilnLimited).toBe(false);
  });

  it('is not in the seal of a version that says nothing of it', () => {
    const profile = profileSchema.parse({
      startC: 20,
      segments: [{ stage: 'burnout', toC: 700, rateCPerH: 100, holdS: 0 }],
    });
    expect(sealText({ profile, kilnId: null, load: null })).not.toContain('opened');
  });
});
