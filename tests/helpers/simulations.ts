import { plannedAt, plannedCurve } from '~/lib/profile/planned';
import type { Profile } from '~/lib/profile/schema';
import type { CautionContext } from '~/lib/thermal/cautions';
import { kilnPlateSchema, type KilnPlateInput } from '~/lib/thermal/kiln-schema';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';
import type { MouldTrace, SegmentMoments, Simulation } from '~/lib/thermal/simulation';

type OfTime = (atS: number) => number;

/** What one mould does over time; what is left out is that of a thin, dry mould without a pattern. */
export interface MouldStory {
  surfaceC?: OfTime;
  coreC?: OfTime;
  waterKg?: OfTime;
  patternLeftShare?: OfTime;
  heatWorkH?: OfTime;
  gasGPerMin?: OfTime;
}

export interface SimulationStory {
  profile: Profile;
  kiln?: Partial<KilnPlateInput>;
  load?: LoadInput;
  chamberC?: OfTime;
  airNeededKgPerS?: OfTime;
  airInKgPerS?: OfTime;
  moulds?: MouldStory[];
  moments?: Record<number, Partial<SegmentMoments>>;
  openableS?: number | null;
  stepS?: number;
}

const KILN: KilnPlateInput = {
  energy: 'electric',
  innerWidthM: 0.5,
  innerDepthM: 0.5,
  innerHeightM: 0.5,
  lining: 'brick',
  liningM: 0.115,
  maxC: 1200,
  ratedKW: 9,
};

/** A firing told by hand: a kiln that follows the plan exactly unless the story says otherwise. For tests of what reads a simulation, not of the solver. */
export function toldSimulation(story: SimulationStory): Simulation {
  const { profile, stepS = 60, openableS = null } = story;
  const plan = plannedCurve(profile);
  const kiln = kilnPlateSchema.parse({ ...KILN, ...story.kiln });
  const load = loadSchema.parse(story.load ?? {});
  const timeS = Float64Array.from({ length: Math.floor(plan.durationS / stepS) + 1 }, (_, at) => at * stepS);
  const series = (of: OfTime) => Float64Array.from(timeS, of);
  const chamberC = story.chamberC ?? ((atS: number) => plannedAt(plan, atS));
  const segments = plan.legs.map((leg): SegmentMoments => ({
    plannedStartS: leg.startS,
    plannedRampEndS: leg.rampEndS,
    plannedEndS: leg.endS,
    startS: leg.startS,
    rampEndS: leg.rampEndS,
    endS: leg.endS,
    arrived: true,
    energyKWh: 1,
    kilnLimited: false,
    largestLagC: 0,
    ...story.moments?.[leg.index],
  }));
  const segmentAt = Uint8Array.from(timeS, (atS) =>
    Math.max(
      0,
      plan.legs.findIndex((leg) => atS <= leg.endS),
    ),
  );
  const moulds = load.moulds.map((mould, index): MouldTrace => {
    const told = story.moulds?.[index] ?? {};
    const surfaceC = told.surfaceC ?? chamberC;
    return {
      index,
      count: mould.count,
      surfaceC: series(surfaceC),
      coreC: series(told.coreC ?? surfaceC),
      waterKg: series(told.waterKg ?? (() => 0)),
      patternLeftShare: series(told.patternLeftShare ?? (() => 0)),
      gasGPerMin: series(told.gasGPerMin ?? (() => 0)),
      gradientKPerM: series(() => 0),
      maxRateCPerH: series(() => 0),
      heatWorkH: series(told.heatWorkH ?? (() => 1)),
    };
  });
  return {
    profile,
    kiln,
    load,
    ambientC: 20,
    timeS,
    plannedC: series((atS) => plannedAt(plan, atS)),
    chamberC: series(chamberC),
    thermocoupleC: series(chamberC),
    powerKW: series(() => 1),
    energyKWh: series((atS) => atS / 3600),
    fullPowerKW: 9,
    patternHeatKW: series(() => 0),
    airNeededKgPerS: series(story.airNeededKgPerS ?? (() => 0)),
    airInKgPerS: series(story.airInKgPerS ?? (() => 1)),
    liningKW: series(() => 0),
    segmentAt,
    moulds,
    segments,
    plannedS: plan.durationS,
    predictedS: plan.durationS,
    openableS,
    energy: {
      inKWh: 0,
      wallsKWh: 0,
      loadKWh: 0,
      lossesKWh: 0,
      ventKWh: 0,
      reactionsKWh: 0,
      patternKWh: 0,
      imbalance: 0,
    },
    steps: timeS.length,
  };
}

/** Nothing known besides the firing itself. */
export const noContext: CautionContext = {
  startMs: null,
  offsetMinutesAt: () => 0,
  attendedHours: null,
  thermocouple: null,
};
