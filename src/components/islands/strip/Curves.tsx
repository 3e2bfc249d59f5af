import { useEffect, useLayoutEffect, useRef } from 'react';
import uPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import { ASIDE_SHARE, penOf, type StripLayer } from './layers';
import { readPalette, usePaletteVersion, type Palette } from './palette';
import type { StripScales } from './scales';

interface CurvesProps {
  readonly scales: StripScales;
  readonly layers: readonly StripLayer[];
}

type Column = (number | null | undefined)[] | Float64Array;

/** Layers on one axis of time, as uPlot takes them: a band adds its two edges after its curve. */
function tableOf(layers: readonly StripLayer[]): uPlot.AlignedData {
  const tables = layers.map((layer): uPlot.AlignedData => {
    const columns: Column[] = [layer.value as Column];
    if (layer.band) columns.push(layer.band.high as Column, layer.band.low as Column);
    return [layer.timeS as number[], ...columns] as uPlot.AlignedData;
  });
  const first = tables[0];
  if (!first) return [[0, 1]];
  if (layers.every((layer) => layer.timeS === layers[0]?.timeS))
    return [first[0], ...tables.flatMap((table) => table.slice(1))] as uPlot.AlignedData;
  return uPlot.join(tables);
}

function seriesOf(layers: readonly StripLayer[], palette: () => Palette) {
  const series: uPlot.Series[] = [{}];
  const bands: uPlot.Band[] = [];
  for (const layer of layers) {
    const pen = penOf(layer);
    series.push({
      scale: layer.kind === 'aside' ? 'share' : 'heat',
      stroke: () => palette()[pen.ink],
      width: pen.widthPx,
      dash: [...pen.dash],
      cap: 'round',
      points: { show: false },
    });
    if (!layer.band) continue;
    const edge: uPlot.Series = { scale: 'heat', stroke: 'transparent', width: 0, points: { show: false } };
    series.push(edge, { ...edge });
    bands.push({ series: [series.length - 2, series.length - 1], fill: () => `${palette()['line-ink']}33` });
  }
  return { series, bands };
}

/** What a change of it makes uPlot begin anew; all else is set on the plot that stands. */
const shapeOf = (scales: StripScales, layers: readonly StripLayer[]): string =>
  [
    scales.flow,
    ...layers.map((layer) => `${layer.id}:${layer.kind}:${String(layer.dash)}:${layer.band ? 1 : 0}`),
  ].join('|');

/** The curves themselves, drawn by uPlot on scales that are ours, so that all overlays lie on the same ones. */
export function Curves({ scales, layers }: CurvesProps) {
  const host = useRef<HTMLDivElement>(null);
  const plot = useRef<uPlot | null>(null);
  const palette = useRef<Palette | null>(null);
  const current = useRef({ scales, layers });
  useLayoutEffect(() => {
    current.current = { scales, layers };
  }, [scales, layers]);
  const shape = shapeOf(scales, layers);
  const paletteVersion = usePaletteVersion();

  useLayoutEffect(() => {
    const element = host.current;
    if (!element) return undefined;
    const colours = (): Palette => (palette.current ??= readPalette(element));
    const { series, bands } = seriesOf(current.current.layers, colours);
    const upright = current.current.scales.flow === 'down';
    const made = new uPlot(
      {
        width: Math.max(1, current.current.scales.box.widthPx),
        height: Math.max(1, current.current.scales.box.heightPx),
        padding: [0, 0, 0, 0],
        pxAlign: 0,
        legend: { show: false },
        cursor: { show: false },
        axes: [{ show: false }, { show: false }],
        scales: {
          x: {
            time: false,
            ...(upright ? { ori: 1, dir: -1 } : {}),
            range: () => [current.current.scales.view.fromS, current.current.scales.view.toS],
          },
          heat: {
            ...(upright ? { ori: 0, dir: 1 } : {}),
            range: () => [current.current.scales.view.minC, current.current.scales.view.maxC],
          },
          share: { ...(upright ? { ori: 0, dir: 1 } : {}), range: () => [0, 1 / ASIDE_SHARE] },
        },
        series,
        bands,
      },
      tableOf(current.current.layers),
      element,
    );
    plot.current = made;
    return () => {
      made.destroy();
      plot.current = null;
    };
  }, [shape]);

  useLayoutEffect(() => {
    plot.current?.setData(tableOf(layers));
  }, [layers, scales.view]);

  useLayoutEffect(() => {
    plot.current?.setSize({
      width: Math.max(1, scales.box.widthPx),
      height: Math.max(1, scales.box.heightPx),
    });
  }, [scales.box.widthPx, scales.box.heightPx]);

  useEffect(() => {
    palette.current = null;
    plot.current?.redraw(false);
  }, [paletteVersion]);

  return (
    <div
      ref={host}
      className="strip-curves"
      aria-hidden="true"
      style={{
        left: scales.box.leftPx,
        top: scales.box.topPx,
        width: scales.box.widthPx,
        height: scales.box.heightPx,
      }}
    />
  );
}
