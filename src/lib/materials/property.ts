import type { Confidence, Property } from './schema';

/** A constant property. */
export const constant = (value: number, unit: string, source: string, confidence: Confidence): Property => ({
  value,
  unit,
  source,
  confidence,
});

/** A property over temperature: [°C, value] in rising temperature. */
export const curve = (
  points: [number, number][],
  unit: string,
  source: string,
  confidence: Confidence,
): Property => ({ points, unit, source, confidence });

/**
 * Value of a property at a temperature: straight lines between the points of a curve, its end values outside them.
 *
 * @param property a constant or a curve of the materials table
 * @param tempC temperature in °C
 * @returns the value in the property's own unit
 */
export function valueAt(property: Property, tempC: number): number {
  if ('value' in property) return property.value;
  const points = property.points;
  const first = points[0];
  const last = points[points.length - 1];
  if (first === undefined || last === undefined) throw new RangeError('a curve needs points');
  if (!(tempC > first[0])) return first[1];
  if (tempC >= last[0]) return last[1];
  let low = 0;
  let high = points.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((points[middle]?.[0] ?? Infinity) <= tempC) low = middle;
    else high = middle;
  }
  const [fromC, from] = points[low] ?? first;
  const [toC, to] = points[high] ?? last;
  return from + ((to - from) * (tempC - fromC)) / (toC - fromC);
}

/**
 * Property of a material with a studio's own number, where it has one, in its place.
 *
 * @param properties the properties of one material
 * @param overrides own numbers by property name, in the table's unit; they hold at every temperature
 */
export function withOverride(
  properties: Readonly<Record<string, Property | undefined>>,
  overrides: Readonly<Record<string, number>>,
  name: string,
): Property | undefined {
  const property = Object.hasOwn(properties, name) ? properties[name] : undefined;
  if (!Object.hasOwn(overrides, name)) return property;
  const value = overrides[name];
  if (value === undefined) return property;
  return {
    value,
    unit: property?.unit ?? '',
    source: "The studio's own figure",
    confidence: 'common-practice',
  };
}
