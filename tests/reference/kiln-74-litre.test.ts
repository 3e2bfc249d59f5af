import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/kiln-74-litre.json' with { type: 'json' };
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { profileSchema } from '~/lib/profile/schema';
import { simulate } from '~/lib/thermal/simulate';

/** 0.42 m cubed is 74 litres; 118 W a litre is the generous design of a kiln builders' handbook. */
const plate = { energy: 'electric', lining: 'brick', liningM: 0.076, maxC: 1280, ratedKW: 8.7 } as const;
const side = { innerWidthM: 0.42, innerDepthM: 0.42, innerHeightM: 0.42 };
const load = loadSchema.parse({
  furniture: [
    { material: 'cordierite', massKg: 6, thicknessM: 0.015 },
    { material: 'cordierite', massKg: 15, thicknessM: 0.01 },
  ],
});

function usedKWh(toC: number, lossFactor = 1, heatCapacityFactor = 1): number {
  const segments = [
    { stage: 'drying', toC: 120, rateCPerH: 60, holdS: 0 },
    { stage: 'burnout', toC, rateCPerH: 150, holdS: 0 },
  ] as const;
  const profile = profileSchema.parse({ startC: 20, segments });
  const kiln = kilnPlateSchema.parse({ ...plate, ...side, lossFactor, heatCapacityFactor });
  return simulate({ profile, kiln, load, ambientC: 20 }).energy.inKWh;
}

/** How far beyond the readings, as a share of them; 0 between them. */
const beyond = (kWh: number, { fromKWh, toKWh }: (typeof reference.readings)[number]): number =>
  Math.max(0, 1 - kWh / fromKWh, kWh / toKWh - 1);

describe(`${reference.title}: ${reference.source}`, () => {
  it.each(reference.readings)('between $fromKWh and $toKWh kWh to $toC °C, within 10 %', (reading) => {
    expect(beyond(usedKWh(reading.toC), reading)).toBeLessThan(reference.toleranceShare);
  });

  it.each(reference.readings)(
    'a wall that loses 60 % and stores 20 % more, or 40 % less of both, does not to $toC °C',
    (reading) => {
      const off = [usedKWh(reading.toC, 1.6, 1.2), usedKWh(reading.toC, 0.6, 0.6)];
      for (const kWh of off) expect(beyond(kWh, reading)).toBeGreaterThan(reference.toleranceShare);
    },
  );
});
