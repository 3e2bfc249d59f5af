import { electricFiring } from '~/lib/thermal/available-heat';
import { type Body, bodyOf } from '~/lib/thermal/body';
import { type Chamber, chamberOf } from '~/lib/thermal/chamber';
import { DEFAULT_STEPS, March, type StepSettings, type Watch } from '~/lib/thermal/march';
import { programmerOf } from '~/lib/thermal/programmer';
import type { BodyProperties, Curve } from '~/lib/thermal/properties';
import type { Rate, Segment } from '~/lib/profile/schema';

/** Factors on what a model goes by; 1 is the model as it is. A reference test must notice when they are not 1. */
export interface Spoil {
  conductivity?: number;
  capacity?: number;
  film?: number;
  exchange?: number;
  power?: number;
  latent?: number;
}

const times = (curve: Curve, factor: number): Curve =>
  typeof curve === 'number'
    ? curve * factor
    : curve.map(([at, value]): [number, number] => [at, value * factor]);

/** A body of the estimate's own solver with its properties spoilt. */
export function bodyWith(properties: BodyProperties, spoil: Spoil = {}): Body {
  const { face, far, water } = properties;
  return bodyOf({
    ...properties,
    layers: properties.layers.map((layer) => ({
      ...layer,
      conductivityWPerMK: times(layer.conductivityWPerMK, spoil.conductivity ?? 1),
      heatCapacityJPerKgK: times(layer.heatCapacityJPerKgK, spoil.capacity ?? 1),
    })),
    face:
      face.kind === 'film'
        ? {
            kind: 'film',
            convectionWPerM2K: face.convectionWPerM2K * (spoil.film ?? 1),
            exchangeFactor: times(face.exchangeFactor, spoil.exchange ?? 1),
          }
        : face,
    far:
      far.kind === 'room' && typeof far.film === 'number'
        ? { ...far, film: far.film * (spoil.film ?? 1) }
        : far,
    water: water && { ...water, kgPerM3: water.kgPerM3 * (spoil.latent ?? 1) },
  });
}

/** A plain slab of one material and 1 m² that meets the chamber through a film; what is not said is switched off. */
export function slab(figures: {
  thicknessM: number;
  k: number;
  rhoC: number;
  startC: number;
  cells: number;
  filmWPerM2K: number;
  exchange?: number;
  waterKgPerM3?: number;
}): BodyProperties {
  return {
    layers: [
      {
        thicknessM: figures.thicknessM,
        densityKgPerM3: figures.rhoC / 1000,
        conductivityWPerMK: figures.k,
        heatCapacityJPerKgK: 1000,
      },
    ],
    area: [1, 0, 0],
    grid: figures.cells === 0 ? { kind: 'lumped' } : { kind: 'even', cells: figures.cells },
    face: { kind: 'film', convectionWPerM2K: figures.filmWPerM2K, exchangeFactor: figures.exchange ?? 0 },
    far: { kind: 'insulated' },
    startC: figures.startC,
    water: figures.waterKgPerM3
      ? { kgPerM3: figures.waterKgPerM3, addedConductivityWPerMK: 0, dryLayerShare: 0.2 }
      : null,
    reactions: [],
    count: 1,
  };
}

/** A film so good that the face is at the chamber's temperature. */
export const PRESCRIBED_W_PER_M2K = 1e7;

/** Surroundings that nothing in them warms: a kiln can hold its temperature against a hot body by no other means. */
export const BOUNDLESS_J_PER_K = 1e13;

export function chamberWith(
  bodies: Body[],
  settings: { startC: number; ambientC?: number; ownJPerK?: number; powerW?: number },
): Chamber {
  return chamberOf(bodies, electricFiring(settings.powerW ?? 1e12), {
    startC: settings.startC,
    ambientC: settings.ambientC ?? 20,
    ownJPerK: settings.ownJPerK ?? 1e-6,
  });
}

export const leg = (toC: number, rateCPerH: Rate, holdS: number): Segment => ({
  stage: 'burnout',
  toC,
  rateCPerH,
  holdS,
  attended: false,
  drain: false,
  vent: 'closed',
  instruction: '',
});

/** Runs segments through the estimate's own march and reports the end of each and each arrival. */
export function fire(
  chamber: Chamber,
  segments: Segment[],
  report: {
    ended?: (index: number, atS: number) => void;
    arrived?: (index: number, atS: number) => void;
    step?: (atS: number) => void;
  },
  steps: StepSettings = DEFAULT_STEPS,
): March {
  const watch: Watch = {
    segmentBegins: () => undefined,
    rampEnds: () => undefined,
    changesInS: () => Infinity,
    beforeStep: () => undefined,
    arrives: (index, atS) => report.arrived?.(index, atS),
    stepTaken: (_index, atS) => report.step?.(atS),
    segmentEnds: (index, atS) => report.ended?.(index, atS),
  };
  const march = new March(chamber, programmerOf({ startC: chamber.tempC, segments }, null), 0, watch, steps);
  march.run();
  return march;
}

/** Temperature of a body at a depth, straight between nodes, °C. */
export function atDepthC(body: Body, depthM: number): number {
  const depths = body.grid.depthM;
  let i = 1;
  while (i < body.nodes - 1 && (depths[i] ?? Infinity) < depthM - 1e-12) i++;
  const [from, to] = [depths[i - 1] ?? 0, depths[i] ?? 1];
  const [fromC, toC] = [body.tempC[i - 1] ?? NaN, body.tempC[i] ?? NaN];
  return fromC + ((toC - fromC) * (depthM - from)) / (to - from);
}

/** Largest deviation of a table from the reference, each column in shares of its own range. */
export function worstOfColumnRange(
  rows: readonly (readonly number[])[],
  computed: readonly (readonly number[])[],
  columns: readonly number[],
): number {
  return Math.max(
    ...columns.map((column) => {
      const values = rows.map((row) => row[column] ?? NaN);
      const range = Math.max(...values) - Math.min(...values);
      return Math.max(...values.map((value, i) => Math.abs((computed[i]?.[column] ?? NaN) - value) / range));
    }),
  );
}

export const lastNodeC = (body: Body): number => body.tempC[body.nodes - 1] ?? NaN;
