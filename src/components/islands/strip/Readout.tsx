import { useState, type PointerEvent } from 'react';
import { createPortal } from 'react-dom';
import { formatNumber, formatTemperature, THIN_SPACE } from '~/lib/units';
import { clockTime } from './clock';
import { durationText } from './duration';
import type { StripLayer } from './layers';
import type { TemperatureUnit } from './Paper';
import { valueAtTime, type StripScales } from './scales';

interface ReadoutProps {
  readonly scales: StripScales;
  readonly layers: readonly StripLayer[];
  readonly temperature: TemperatureUnit;
  readonly startMs: number | null;
  readonly zone: string;
  /** Where the box is drawn: above all that lies on the strip, while the ground stays beneath it. */
  readonly top: SVGGElement | null;
}

function textOf(layer: StripLayer, atS: number, temperature: TemperatureUnit): string | null {
  const value = valueAtTime(layer.timeS, layer.value, atS);
  if (value === null) return null;
  if (layer.kind !== 'aside') return `${layer.name} ${formatTemperature(value, temperature)}`;
  if (!layer.full) return null;
  const number = formatNumber(value * layer.full.value, layer.full.digits);
  return `${layer.name} ${number}${layer.full.unit === '' ? '' : THIN_SPACE}${layer.full.unit}`;
}

function Lines({ scales, layers, temperature, startMs, zone, atS }: ReadoutProps & { readonly atS: number }) {
  const { box } = scales;
  const x = scales.timePx(atS);
  const moment = startMs === null ? durationText(atS) : clockTime(startMs + atS * 1000, zone);
  const lines = [
    moment,
    ...layers.flatMap((layer) => {
      const text = textOf(layer, atS, temperature);
      return text === null ? [] : [text];
    }),
  ];
  const widthPx = Math.max(...lines.map((line) => line.length)) * 6.6 + 20;
  const left = x + 12 + widthPx > box.leftPx + box.widthPx ? x - 12 - widthPx : x + 12;
  return (
    <g className="strip-readout" aria-hidden="true">
      <path d={`M${x.toFixed(1)} ${box.topPx}v${box.heightPx}`} />
      <rect x={left} y={box.topPx + 10} width={widthPx} height={lines.length * 18 + 10} rx="3" />
      {lines.map((line, index) => (
        <text key={line} x={left + 10} y={box.topPx + 28 + index * 18} data-first={index === 0 || undefined}>
          {line}
        </text>
      ))}
    </g>
  );
}

/** A hairline under the pointer with the moment and what each curve shows there. */
export function Readout(props: ReadoutProps) {
  const { scales } = props;
  const { box } = scales;
  const [atS, setAtS] = useState<number | null>(null);
  if (scales.flow === 'down') return null;
  const follow = (event: PointerEvent<SVGRectElement>): void => {
    if (event.pointerType === 'touch') return;
    const rect = event.currentTarget.getBoundingClientRect();
    setAtS(scales.at(box.leftPx + event.clientX - rect.left, 0).timeS);
  };
  return (
    <>
      <rect
        className="strip-ground"
        x={box.leftPx}
        y={box.topPx}
        width={box.widthPx}
        height={box.heightPx}
        onPointerMove={follow}
        onPointerLeave={() => setAtS(null)}
      />
      {atS === null || props.top === null ? null : createPortal(<Lines {...props} atS={atS} />, props.top)}
    </>
  );
}
