import {
  findMaterial,
  type MetalMaterial,
  type MouldMaterial,
  type PatternMaterial,
  type RateLimit,
  valueAt,
  withOverride,
} from '../../materials';
import type { KilnPlate } from '../kiln-schema';
import type { Load, Mould, Pattern } from '../load-schema';

/** A figure of the table, or the studio's own, with where it comes from. */
export interface Figure {
  readonly value: number;
  readonly source: string;
}

/** One line of the load as a draft looks at it. */
export interface MouldNeeds {
  readonly mould: Mould;
  readonly material: MouldMaterial;
  readonly pattern: { readonly own: Pattern; readonly material: PatternMaterial } | null;
  readonly figure: (name: string) => Figure | null;
  readonly patternFigure: (name: string) => Figure | null;
}

/** What a profile is drafted for. */
export interface DraftNeeds {
  readonly kiln: KilnPlate;
  readonly load: Load;
  readonly moulds: readonly MouldNeeds[];
  readonly metal: MetalMaterial | null;
}

type Lookup = Parameters<typeof withOverride>[0];

const reader =
  (properties: Lookup, overrides: Readonly<Record<string, number>>) =>
  (name: string): Figure | null => {
    const property = withOverride(properties, overrides, name);
    return property === undefined ? null : { value: valueAt(property, 20), source: property.source };
  };

/** @throws RangeError where the materials table lacks a material that is named */
export function needsOf(load: Load, kiln: KilnPlate): DraftNeeds {
  const moulds = load.moulds.map((mould): MouldNeeds => {
    const material = findMaterial('moulds', mould.material);
    if (material === undefined) throw new RangeError(`no mould material "${mould.material}" in the table`);
    const own = mould.pattern;
    const pattern = own === null ? undefined : findMaterial('patterns', own.material);
    if (own !== null && pattern === undefined)
      throw new RangeError(`no pattern material "${own.material}" in the table`);
    return {
      mould,
      material,
      pattern: own === null || pattern === undefined ? null : { own, material: pattern },
      figure: reader(material.properties, mould.overrides),
      patternFigure: reader(pattern?.properties ?? {}, own?.overrides ?? {}),
    };
  });
  const metal = load.pour === null ? undefined : findMaterial('metals', load.pour.metal);
  return { kiln, load, moulds, metal: metal ?? null };
}

/** Most water that an air-dried shell keeps and is fired hot with, per kg (common practice); blocks are never that dry. */
const AIR_DRY_SHARE = 0.01;

/** Whether a mould holds water that has to be driven off slowly. */
export const isWet = ({ mould }: MouldNeeds): boolean =>
  mould.waterKg > (mould.form === 'shell' ? AIR_DRY_SHARE * mould.massKg : 0);

export const isFlask = ({ mould }: MouldNeeds): boolean => mould.form === 'flask';

/** A pattern in a shell that has to be melted at its skin before it warms through. */
export const isShellWax = ({ mould, pattern }: MouldNeeds): boolean =>
  mould.form === 'shell' && pattern?.material.behaviour === 'melts';

/** The limit that governs heating between two temperatures: the lowest of all moulds; null: none of them has one. */
export function heatingLimit(
  needs: DraftNeeds,
  fromC: number,
  toC: number,
  has: { readonly water: boolean; readonly pattern: boolean },
): RateLimit | null {
  const counts = ({ onlyWith }: RateLimit): boolean =>
    onlyWith === null || (onlyWith === 'water' && has.water) || (onlyWith === 'pattern' && has.pattern);
  const limits = needs.moulds.flatMap(({ material }) =>
    material.rateLimits.filter(
      (limit) => limit.direction === 'heating' && limit.fromC < toC && limit.toC > fromC && counts(limit),
    ),
  );
  return limits.reduce<RateLimit | null>(
    (lowest, limit) => (lowest === null || limit.maxRateCPerH < lowest.maxRateCPerH ? limit : lowest),
    null,
  );
}

/** The highest of a figure over all moulds that have it. */
export const highest = (figures: readonly (Figure | null)[]): Figure | null =>
  figures.reduce<Figure | null>(
    (best, figure) => (figure !== null && (best === null || figure.value > best.value) ? figure : best),
    null,
  );

export const lowest = (figures: readonly (Figure | null)[]): Figure | null =>
  figures.reduce<Figure | null>(
    (best, figure) => (figure !== null && (best === null || figure.value < best.value) ? figure : best),
    null,
  );
