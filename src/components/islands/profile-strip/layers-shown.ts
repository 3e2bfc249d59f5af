import type { PlannedCurve } from '~/lib/profile/planned';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { formatNumber, THIN_SPACE } from '~/lib/units';
import type { StripLayer } from '../strip/layers';

/** What can be laid on the editor's strip, in the order of the switches. */
export const LAYERS = [
  { id: 'kiln', name: 'what the kiln will do', mark: 'solid' },
  { id: 'plan', name: 'plan', mark: 'dashed' },
  { id: 'core', name: 'mould core', mark: 'dotted' },
  { id: 'pattern', name: 'pattern left', mark: 'hatched' },
  { id: 'water', name: 'water', mark: 'aside-1' },
  { id: 'gas', name: 'gas given off', mark: 'aside-2' },
  { id: 'power', name: 'power', mark: 'aside-3' },
  { id: 'heat-work', name: 'heat work', mark: 'aside-4' },
] as const;
export type LayerId = (typeof LAYERS)[number]['id'];

export const FIRST_SHOWN: readonly LayerId[] = ['kiln', 'plan', 'core', 'pattern'];

interface Aside {
  readonly id: LayerId;
  readonly unit: string;
  readonly digits: number;
  readonly dash: readonly number[];
  readonly values: (curve: Estimate['curve']) => readonly number[];
}

const ASIDES: readonly Aside[] = [
  { id: 'water', unit: 'kg', digits: 2, dash: [10, 3, 2, 3], values: (curve) => curve.waterLeftKg },
  { id: 'gas', unit: 'g/min', digits: 1, dash: [5, 2], values: (curve) => curve.gasGPerMin },
  { id: 'power', unit: 'kW', digits: 1, dash: [], values: (curve) => curve.powerKW },
  { id: 'heat-work', unit: 'h', digits: 2, dash: [3, 3, 9, 3], values: (curve) => curve.heatWorkH },
];

/** Which layers the estimate has anything to show for. */
export function availableLayers(estimate: Estimate | null): ReadonlySet<LayerId> {
  const found = new Set<LayerId>(['plan']);
  if (!estimate) return found;
  const { curve } = estimate;
  found.add('kiln').add('power');
  if (estimate.mould === null) return found;
  found.add('core').add('heat-work');
  if (curve.patternLeftShare.some((share) => share > 0)) found.add('pattern').add('gas');
  if (curve.waterLeftKg.some((massKg) => massKg > 0)) found.add('water');
  return found;
}

function asideLayer(aside: Aside, curve: Estimate['curve'], name: string): StripLayer[] {
  const values = aside.values(curve);
  const most = values.reduce((highest, value) => Math.max(highest, value), 0);
  if (!(most > 0)) return [];
  return [
    {
      id: aside.id,
      name,
      kind: 'aside',
      timeS: curve.timeS,
      value: values.map((value) => value / most),
      full: { value: most, unit: aside.unit, digits: aside.digits },
      dash: aside.dash,
    },
  ];
}

/** The curves to draw: plan beneath, what the kiln does over it, then the core and the asides. */
export function layersOf(
  planned: PlannedCurve,
  estimate: Estimate | null,
  shown: ReadonlySet<LayerId>,
): StripLayer[] {
  const layers: StripLayer[] = [];
  if (shown.has('plan') || !estimate)
    layers.push({ id: 'plan', name: 'plan', kind: 'planned', timeS: planned.timeS, value: planned.valueC });
  if (!estimate) return layers;
  const { curve } = estimate;
  if (shown.has('kiln'))
    layers.push({ id: 'kiln', name: 'kiln', kind: 'predicted', timeS: curve.timeS, value: curve.chamberC });
  if (shown.has('core') && estimate.mould !== null)
    layers.push({
      id: 'core',
      name: 'mould core',
      kind: 'core',
      timeS: curve.timeS,
      value: curve.mouldCoreC,
    });
  for (const aside of ASIDES) {
    const name = LAYERS.find((layer) => layer.id === aside.id)?.name ?? aside.id;
    if (shown.has(aside.id)) layers.push(...asideLayer(aside, curve, name));
  }
  return layers;
}

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

/** Where the mould core trails the chamber most while the kiln heats: the moment and by how much; null below 5 °C. */
export function largestLag(estimate: Estimate | null): { atS: number; coreC: number; lagC: number } | null {
  if (!estimate || estimate.mould === null) return null;
  const { timeS, chamberC, mouldCoreC } = estimate.curve;
  let best: { atS: number; coreC: number; lagC: number } | null = null;
  timeS.forEach((atS, index) => {
    const coreC = mouldCoreC[index] ?? 0;
    const lagC = (chamberC[index] ?? 0) - coreC;
    if (lagC >= 5 && atS <= estimate.predictedS && (best === null || lagC > best.lagC))
      best = { atS, coreC, lagC };
  });
  return best;
}

/** Segments whose arrival the kiln is late for by five minutes or more, as it stands after the segments before. */
export function lateSegments(
  planned: PlannedCurve,
  estimate: Estimate | null,
): { index: number; plannedS: number; realS: number; behindS: number; targetC: number }[] {
  if (!estimate) return [];
  return planned.legs.flatMap((leg, index) => {
    const timed = estimate.segments[index];
    if (!timed || !timed.kilnLimited) return [];
    const behindS = timed.rampEndS - leg.rampEndS;
    const before =
      index === 0 ? 0 : (estimate.segments[index - 1]?.endS ?? 0) - (planned.legs[index - 1]?.endS ?? 0);
    if (behindS - before < 300) return [];
    return [{ index, plannedS: leg.rampEndS, realS: timed.rampEndS, behindS, targetC: leg.toC }];
  });
}
