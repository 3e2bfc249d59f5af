import type { PlannedCurve } from '~/lib/profile/planned';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { formatNumber, THIN_SPACE } from '~/lib/units';
import type { LayerKind, StripLayer } from '../strip/layers';

type Curve = Estimate['curve'];

/** °C over run time; null where the load gives nothing to show. */
interface DrawnCurve {
  readonly as: 'curve';
  readonly kind: LayerKind;
  readonly read: (
    planned: PlannedCurve,
    estimate: Estimate | null,
  ) => Pick<StripLayer, 'timeS' | 'value'> | null;
}

/** A quantity of its own along the foot of the strip, as a share of its highest value; nothing above 0 is not shown. */
interface DrawnAside {
  readonly as: 'aside';
  readonly unit: string;
  readonly digits: number;
  readonly dash: readonly number[];
  readonly read: (curve: Curve) => readonly number[];
  /** Means nothing without a mould. */
  readonly ofMould?: boolean;
}

/** A share from 0 to 1 as a hatched area from the foot of the strip; nothing above 0 is not shown. */
interface DrawnHatch {
  readonly as: 'hatch';
  readonly read: (curve: Curve) => readonly number[];
}

interface LayerEntry {
  readonly id: string;
  /** On its switch. */
  readonly name: string;
  /** In the readout, where that is shorter. */
  readonly short?: string;
  /** Shown before anybody has switched anything. */
  readonly atFirst: boolean;
  readonly drawn: DrawnCurve | DrawnAside | DrawnHatch;
}

/** All that can be laid on the editor's strip, in the order of the switches. One entry is one layer: nothing else knows them. */
export const LAYERS = [
  {
    id: 'kiln',
    name: 'what the kiln will do',
    short: 'kiln',
    atFirst: true,
    drawn: {
      as: 'curve',
      kind: 'predicted',
      read: (_planned, estimate) =>
        estimate && { timeS: estimate.curve.timeS, value: estimate.curve.chamberC },
    },
  },
  {
    id: 'plan',
    name: 'plan',
    atFirst: true,
    drawn: {
      as: 'curve',
      kind: 'planned',
      read: ({ timeS, valueC }) => ({ timeS, value: valueC }),
    },
  },
  {
    id: 'core',
    name: 'mould core',
    atFirst: true,
    drawn: {
      as: 'curve',
      kind: 'core',
      read: (_planned, estimate) =>
        estimate && estimate.mould !== null
          ? { timeS: estimate.curve.timeS, value: estimate.curve.mouldCoreC }
          : null,
    },
  },
  {
    id: 'pattern',
    name: 'pattern left',
    atFirst: true,
    drawn: { as: 'hatch', read: (curve) => curve.patternLeftShare },
  },
  {
    id: 'water',
    name: 'water',
    atFirst: false,
    drawn: { as: 'aside', unit: 'kg', digits: 2, dash: [10, 3, 2, 3], read: (curve) => curve.waterLeftKg },
  },
  {
    id: 'gas',
    name: 'gas given off',
    atFirst: false,
    drawn: { as: 'aside', unit: 'g/min', digits: 1, dash: [5, 2], read: (curve) => curve.gasGPerMin },
  },
  {
    id: 'power',
    name: 'power',
    atFirst: false,
    drawn: { as: 'aside', unit: 'kW', digits: 1, dash: [], read: (curve) => curve.powerKW },
  },
  {
    id: 'heat-work',
    name: 'heat work',
    atFirst: false,
    drawn: {
      as: 'aside',
      unit: 'h',
      digits: 2,
      dash: [3, 3, 9, 3],
      read: (curve) => curve.heatWorkH,
      ofMould: true,
    },
  },
] as const satisfies readonly LayerEntry[];
export type LayerId = (typeof LAYERS)[number]['id'];

export const FIRST_SHOWN: readonly LayerId[] = LAYERS.filter((layer) => layer.atFirst).map(({ id }) => id);

/** More curves of their own scale than this cannot be told apart on one strip. */
const MOST_ASIDES = 2;
const OF_THEIR_OWN_SCALE: readonly LayerId[] = ['water', 'gas', 'power', 'heat-work'];

/** The layers after one is switched: of those with a scale of their own the oldest goes where there would be too many. */
export function switchedLayers(shown: ReadonlySet<LayerId>, id: LayerId): ReadonlySet<LayerId> {
  const next = new Set(shown);
  if (next.delete(id)) return next;
  const asides = [...next].filter((each) => OF_THEIR_OWN_SCALE.includes(each));
  if (OF_THEIR_OWN_SCALE.includes(id) && asides.length >= MOST_ASIDES && asides[0]) next.delete(asides[0]);
  return next.add(id);
}

const entries: readonly (LayerEntry & { readonly id: LayerId })[] = LAYERS;

/** The layer as a curve, or nothing where there is nothing to show or it is not drawn as one. */
function curveOf(
  { id, name, short = name, drawn }: LayerEntry,
  planned: PlannedCurve,
  estimate: Estimate | null,
): StripLayer | null {
  if (drawn.as === 'hatch') return null;
  if (drawn.as === 'curve') {
    const found = drawn.read(planned, estimate);
    return found && { id, name: short, kind: drawn.kind, ...found };
  }
  if (!estimate || (drawn.ofMould && estimate.mould === null)) return null;
  const values = drawn.read(estimate.curve);
  const most = values.reduce((highest, value) => Math.max(highest, value), 0);
  if (!(most > 0)) return null;
  const { unit, digits, dash } = drawn;
  const value = values.map((each) => each / most);
  return {
    id,
    name: short,
    kind: 'aside',
    timeS: estimate.curve.timeS,
    value,
    full: { value: most, unit, digits },
    dash,
  };
}

/** What is hatched: shares over run time. */
function hatchOf({ id, name, drawn }: LayerEntry, estimate: Estimate | null) {
  if (drawn.as !== 'hatch' || !estimate) return null;
  const share = drawn.read(estimate.curve);
  return share.some((each) => each > 0) ? { id, name, timeS: estimate.curve.timeS, share } : null;
}

/** Which layers there is anything to show for. */
export const availableLayers = (planned: PlannedCurve, estimate: Estimate | null): ReadonlySet<LayerId> =>
  new Set(
    entries
      .filter((entry) => curveOf(entry, planned, estimate) ?? hatchOf(entry, estimate))
      .map(({ id }) => id),
  );

/** The curves to draw, the plan beneath the others. Without an estimate the plan is all there is. */
export function layersOf(
  planned: PlannedCurve,
  estimate: Estimate | null,
  shown: ReadonlySet<LayerId>,
): StripLayer[] {
  const isShown = (id: string): boolean => entries.some((entry) => entry.id === id && shown.has(entry.id));
  const found = entries
    .flatMap((entry) => curveOf(entry, planned, estimate) ?? [])
    .filter(({ id, kind }) => isShown(id) || (kind === 'planned' && !estimate));
  return [
    ...found.filter(({ kind }) => kind === 'planned'),
    ...found.filter(({ kind }) => kind !== 'planned'),
  ];
}

/** The areas to hatch. */
export const hatchesOf = (estimate: Estimate | null, shown: ReadonlySet<LayerId>) =>
  entries.filter(({ id }) => shown.has(id)).flatMap((entry) => hatchOf(entry, estimate) ?? []);

/** Where an aside is highest, with what it is there, so that its scale can be read off the strip. */
export function asidePeaks(layers: readonly StripLayer[]): { id: string; atS: number; text: string }[] {
  return layers.flatMap((layer) => {
    if (!layer.full) return [];
    const at = layer.value.findIndex((share) => share !== null && share >= 1);
    const { value, unit, digits } = layer.full;
    return [
      {
        id: layer.id,
        atS: layer.timeS[at] ?? 0,
        text: `${layer.name} ${formatNumber(value, digits)}${THIN_SPACE}${unit}`,
      },
    ];
  });
}
