import type { Load } from '../thermal/load-schema';
import { z } from '../zod';
import type { Property } from './schema';
import { findMaterial } from './table';

export const FIGURE_KINDS = ['moulds', 'patterns', 'furniture'] as const;
export const figureKindSchema = z.enum(FIGURE_KINDS);
export type FigureKind = z.infer<typeof figureKindSchema>;

/** Own figures by the table's property name, in the table's unit; they hold at every temperature. */
export const figuresSchema = z
  .record(z.string().regex(/^[a-z][A-Za-z0-9]{0,59}$/), z.number().min(-1e12).max(1e12))
  .refine((figures) => Object.keys(figures).length <= 60, { message: 'at most 60 figures' });

export const studioFiguresSchema = z.strictObject({
  kind: figureKindSchema,
  material: z.string(),
  figures: figuresSchema,
  note: z.string(),
  revision: z.number().int().min(1),
  updatedAt: z.string(),
});
/** What a studio holds of one material instead of what the table says. */
export type StudioFigures = z.infer<typeof studioFiguresSchema>;

type Of = Pick<StudioFigures, 'kind' | 'material' | 'figures'>;

/**
 * A load with the studio's own figures under what the load itself overrides: a load's own figure wins. Only for computing:
 * what is kept and sealed is the load as it was written.
 */
export function withStudioFigures(load: Load, studio: readonly Of[]): Load {
  if (studio.length === 0) return load;
  const under = (kind: FigureKind, material: string, own: Readonly<Record<string, number>>) => ({
    ...studio.find((each) => each.kind === kind && each.material === material)?.figures,
    ...own,
  });
  return {
    ...load,
    moulds: load.moulds.map((mould) => ({
      ...mould,
      overrides: under('moulds', mould.material, mould.overrides),
      pattern: mould.pattern && {
        ...mould.pattern,
        overrides: under('patterns', mould.pattern.material, mould.pattern.overrides),
      },
    })),
    furniture: load.furniture.map((piece) => ({
      ...piece,
      overrides: under('furniture', piece.material, piece.overrides),
    })),
  };
}

/** A figure further from the table's than this many times is a slip of the pen or of the unit. */
const MOST_TIMES = 20;

/** Ends that the meaning of a property sets, however far the table's figure is from them. */
const MEANT: Readonly<Record<string, readonly [number, number]>> = {
  emissivity: [0.01, 1],
  poissonRatio: [0, 0.49],
  tortuosity: [1, 60],
};

/** What is wrong with own figures of a material: path and what is expected there. */
export function figureIssues(
  kind: FigureKind,
  material: string,
  figures: Readonly<Record<string, number>>,
): { path: string; message: string }[] {
  const found = findMaterial(kind, material);
  if (found === undefined)
    return [{ path: 'id', message: `a material of the table instead of "${material}"` }];
  const properties = found.properties as Readonly<Record<string, Property | undefined>>;
  return Object.entries(figures).flatMap(([name, value]) => {
    const property = Object.hasOwn(properties, name) ? properties[name] : undefined;
    const path = `figures.${name}`;
    if (property === undefined) return [{ path, message: 'a property that the table has of this material' }];
    const [low, high] = rangeOf(property);
    const isShare = name.endsWith('Share');
    if (isShare && (value < 0 || value > 1)) return [{ path, message: 'a share between 0 and 1' }];
    const isTemperature = property.unit === '°C';
    const meant = Object.hasOwn(MEANT, name) ? MEANT[name] : undefined;
    const bounds =
      meant ??
      (isTemperature
        ? ([low - 500, high + 500] as const)
        : ([Math.min(0, low * MOST_TIMES) + (low > 0 ? low / MOST_TIMES : 0), high * MOST_TIMES] as const));
    if (!isShare && (value < bounds[0] || value > bounds[1]))
      return [
        {
          path,
          message:
            `between ${tidy(bounds[0])} and ${tidy(bounds[1])} ${property.unit === '1' ? '' : property.unit}`.trim(),
        },
      ];
    return [];
  });
}

function rangeOf(property: Property): readonly [number, number] {
  if ('value' in property) return [property.value, property.value];
  const values = property.points.map(([, value]) => value);
  return [Math.min(...values), Math.max(...values)];
}

const tidy = (value: number): string => String(Number(value.toPrecision(3)));
