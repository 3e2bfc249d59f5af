import type { Finding, Series } from '~/lib/contracts/runs';
import type { StripLayer } from '../strip/layers';
import { valueAtTime, type StripView } from '../strip/scales';
import type { TimeWindow } from '../strip/window';

type Channel = Series['channels'][number];

/** The channel that the review was made on: the first chamber thermocouple, else the first temperature. */
export function controlOf(series: Series, controlId: string | null): Channel | null {
  const heat = series.channels.filter((channel) => channel.unit === 'C');
  return (
    heat.find((channel) => channel.id === controlId) ??
    heat.find((channel) => channel.role === 'chamber') ??
    heat[0] ??
    null
  );
}

/** Curves of the strip: plan dashed, prediction thin, other thermocouples dotted, the control channel the one heavy line. */
export function layersOf(series: Series, control: Channel | null, hidden: ReadonlySet<string>): StripLayer[] {
  const layers: StripLayer[] = [
    {
      id: 'planned',
      name: 'plan',
      kind: 'planned',
      timeS: series.planned.timeS,
      value: series.planned.valueC,
    },
  ];
  if (series.carried)
    layers.push({
      id: 'carried',
      name: 'plan carried along',
      kind: 'carried',
      timeS: series.carried.timeS,
      value: series.carried.valueC,
    });
  if (series.predicted)
    layers.push({
      id: 'predicted',
      name: 'prediction',
      kind: 'predicted',
      timeS: series.predicted.timeS,
      value: series.predicted.valueC,
    });
  for (const channel of series.channels) {
    if (channel.unit !== 'C' || channel.id === control?.id) continue;
    layers.push({
      id: channel.id,
      name: channel.name,
      kind: 'core',
      timeS: channel.timeS,
      value: channel.mean,
    });
  }
  for (const channel of series.channels) {
    const power = powerLayer(channel);
    if (power) layers.push(power);
  }
  if (control)
    layers.push({
      id: control.id,
      name: control.name,
      kind: 'measured',
      timeS: control.timeS,
      value: control.mean,
    });
  return layers.filter((layer) => !hidden.has(layer.id));
}

/** Power or duty, as a share of its own highest value, along the foot of the strip. */
function powerLayer(channel: Channel): StripLayer | null {
  if (channel.unit !== '%' && channel.unit.toLowerCase() !== 'kw' && channel.unit.toLowerCase() !== 'w')
    return null;
  const highest = Math.max(1e-9, ...channel.max.map((value) => value ?? 0));
  return {
    id: channel.id,
    name: channel.name,
    kind: 'aside',
    timeS: channel.timeS,
    value: channel.mean.map((value) => (value === null ? null : value / highest)),
    full: { value: highest, unit: channel.unit, digits: channel.unit === '%' ? 0 : 1 },
  };
}

/** Measured − carried plan at each measured moment within the run; null outside and where there is no reading. */
export function differenceOf(
  series: Series,
  control: Channel | null,
): { timeS: number[]; differenceC: (number | null)[] } {
  if (!control || !series.carried) return { timeS: [], differenceC: [] };
  const { carried } = series;
  return {
    timeS: control.timeS,
    differenceC: control.timeS.map((timeS, index) => {
      const planC = valueAtTime(carried.timeS, carried.valueC, timeS);
      const measuredC = control.mean[index] ?? null;
      return planC === null || measuredC === null ? null : measuredC - planC;
    }),
  };
}

/** The part of paper shown: the window asked for, and the temperatures that occur in it with some room above and below. */
export function viewOf(layers: readonly StripLayer[], shown: TimeWindow, isZoomed: boolean): StripView {
  let [low, high] = [Infinity, -Infinity];
  for (const layer of layers) {
    if (layer.kind === 'aside') continue;
    for (let index = 0; index < layer.timeS.length; index += 1) {
      const timeS = layer.timeS[index] as number;
      const value = layer.value[index];
      if (
        timeS < shown.fromS ||
        timeS > shown.toS ||
        value === null ||
        value === undefined ||
        Number.isNaN(value)
      )
        continue;
      if (value < low) low = value;
      if (value > high) high = value;
    }
  }
  if (low > high) [low, high] = [0, 100];
  const room = Math.max(15, (high - low) * 0.14);
  const minC = isZoomed ? Math.floor((low - room) / 10) * 10 : Math.min(0, Math.floor(low / 50) * 50);
  const maxC = isZoomed ? Math.ceil((high + room) / 10) * 10 : Math.ceil((high + 60) / 100) * 100;
  return { fromS: shown.fromS, toS: shown.toS, minC, maxC };
}

/** Where a finding hangs: the measured curve at its peak, or at its middle. */
export function anchorOf(finding: Finding, control: Channel | null): { timeS: number; tempC: number } {
  const middleS = (finding.startS + finding.endS) / 2;
  const measuredC = control ? valueAtTime(control.timeS, control.mean, middleS) : null;
  return { timeS: middleS, tempC: finding.peakC ?? measuredC ?? 0 };
}

/** A window that shows a finding with what came before and after. */
export function around(finding: Finding): TimeWindow {
  const lengthS = Math.max(3600, (finding.endS - finding.startS) * 3);
  const middleS = (finding.startS + finding.endS) / 2;
  return { fromS: middleS - lengthS / 2, toS: middleS + lengthS / 2 };
}
