import { profileSchema, type ProfileInput } from '~/lib/profile/schema';
import { kilnPlateSchema, type KilnPlateInput } from '~/lib/thermal/kiln-schema';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';
import type { FiringInput } from '~/lib/thermal/simulate';

const kiln: KilnPlateInput = {
  energy: 'electric',
  innerWidthM: 0.55,
  innerDepthM: 0.55,
  innerHeightM: 0.7,
  lining: 'brick-and-fibre',
  liningM: 0.14,
  maxC: 1250,
  ratedKW: 14,
};

const pattern = { material: 'pla', massKg: 0.15, thickestM: 0.005 };
const load: LoadInput = {
  moulds: [
    {
      material: 'fused-silica-shell',
      massKg: 6,
      waterKg: 0.3,
      wallM: 0.008,
      thinnestSectionM: 0.004,
      pattern,
    },
    {
      material: 'aluminosilicate-shell',
      massKg: 9,
      waterKg: 0.4,
      wallM: 0.012,
      heatedFaces: 2,
      thinnestSectionM: 0.005,
      pattern,
    },
    {
      form: 'flask',
      material: 'gypsum-investment',
      massKg: 4,
      waterKg: 1.2,
      diameterM: 0.13,
      thinnestSectionM: 0.006,
      pattern,
    },
    { material: 'fused-silica-shell', massKg: 3, count: 3, wallM: 0.01, thinnestSectionM: 0.003, pattern },
  ],
  furniture: [{ material: 'cordierite', massKg: 12, thicknessM: 0.018 }],
  pour: { metal: 'tin-bronze-90-10', chargeKg: 20, pourC: 1180 },
};

const day: ProfileInput = {
  startC: 20,
  segments: [
    { stage: 'drying', toC: 95, rateCPerH: 60, holdS: 7200 },
    { stage: 'melt-out', toC: 260, rateCPerH: 100, holdS: 3600, drain: true },
    { stage: 'burnout', toC: 730, rateCPerH: 120, holdS: 7200, vent: 'open' },
    { stage: 'vitrification', toC: 900, rateCPerH: 250, holdS: 3600 },
    { stage: 'casting-hold', toC: 780, rateCPerH: 'coast', holdS: 5400 },
    { stage: 'cooling', toC: 430, rateCPerH: 43, holdS: 0 },
  ],
};

const parsed = (profile: ProfileInput): FiringInput => ({
  profile: profileSchema.parse(profile),
  kiln: kilnPlateSchema.parse(kiln),
  load: loadSchema.parse(load),
  ambientC: 20,
});

/** A day's firing of four different moulds with patterns in a 14 kW kiln. */
export const dayFiring: FiringInput = parsed(day);

/** The same kiln and load over fourteen days: the day's segments, again and again. */
export const fortnightFiring: FiringInput = parsed({
  startC: 20,
  segments: [
    { stage: 'drying', toC: 95, rateCPerH: 1.8, holdS: 24 * 3600 },
    { stage: 'melt-out', toC: 260, rateCPerH: 4, holdS: 24 * 3600, drain: true },
    { stage: 'burnout', toC: 730, rateCPerH: 8, holdS: 24 * 3600, vent: 'open' },
    { stage: 'vitrification', toC: 900, rateCPerH: 20, holdS: 24 * 3600 },
    { stage: 'casting-hold', toC: 780, rateCPerH: 10, holdS: 12 * 3600 },
    { stage: 'cooling', toC: 480, rateCPerH: 6, holdS: 0 },
  ],
});
