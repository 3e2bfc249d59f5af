/**
 * One curve on the strip. The kinds differ in shape, never by colour alone: the plan is dashed and thin, the prediction
 * thin and solid, the mould core dotted, the measured curve the one heavy line.
 */
export type LayerKind = 'planned' | 'predicted' | 'core' | 'carried' | 'measured' | 'aside';

export interface StripLayer {
  readonly id: string;
  /** As it is called in the readout and in the table. */
  readonly name: string;
  readonly kind: LayerKind;
  readonly timeS: readonly number[] | Float64Array;
  /** °C; for `aside` a share of the highest value (0-1), drawn over the lower part of the strip. */
  readonly value: readonly (number | null)[] | Float64Array;
  /** °C, around a prediction. */
  readonly band?: { readonly low: readonly number[]; readonly high: readonly number[] };
  /** What an `aside` value of 1 stands for, for the readout: value and unit. */
  readonly full?: { readonly value: number; readonly unit: string; readonly digits: number };
  /** Distinguishes several asides. */
  readonly dash?: readonly number[];
}

/** Height of the lower part of the strip that asides take, as a share of the whole. */
export const ASIDE_SHARE = 0.3;

export interface Pen {
  readonly widthPx: number;
  readonly dash: readonly number[];
  readonly ink: 'ink' | 'ink-2';
}

const PENS: Readonly<Record<LayerKind, Pen>> = {
  planned: { widthPx: 1.5, dash: [7, 4], ink: 'ink' },
  predicted: { widthPx: 1.75, dash: [], ink: 'ink' },
  core: { widthPx: 1.5, dash: [2, 3], ink: 'ink' },
  carried: { widthPx: 1, dash: [1, 4], ink: 'ink-2' },
  measured: { widthPx: 3, dash: [], ink: 'ink' },
  aside: { widthPx: 1.25, dash: [8, 3, 2, 3], ink: 'ink-2' },
};

export const penOf = (layer: Pick<StripLayer, 'kind' | 'dash'>): Pen =>
  layer.dash ? { ...PENS[layer.kind], dash: layer.dash } : PENS[layer.kind];
