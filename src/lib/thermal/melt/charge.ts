import { findMaterial, type MetalMaterial, valueAt } from '../../materials';
import { findElement } from '../../materials/elements';
import type { Pour } from '../load-schema';
import type { Alloy } from './alloy-heat';

/** A named metal as the melt model takes it. */
export function alloyOf(metal: MetalMaterial): Alloy {
  const { solidusC, liquidusC } = metal.properties;
  return {
    composition: metal.composition,
    solidusC: valueAt(solidusC, 20),
    liquidusC: valueAt(liquidusC, 20),
  };
}

/**
 * What is in the crucible: the studio's own alloy if one is given, else the metal named; where the charge is listed, its
 * composition is that of the parts by mass. Where it begins and ends to melt stays that of the metal (or the own alloy):
 * a few per cent of additions move it by less than the handbooks' spread.
 *
 * @throws RangeError where the list names a metal that the table lacks
 */
export function chargeAlloy(pour: Pour, metal: MetalMaterial): Alloy {
  const own = pour.alloy ?? alloyOf(metal);
  const parts = pour.charge ?? [];
  if (parts.length === 0) return own;
  const massesKg: Record<string, number> = {};
  let totalKg = 0;
  for (const part of parts) {
    const { composition } = part.metal === undefined ? own : namedMetal(part.metal);
    for (const [symbol, share] of Object.entries(composition))
      massesKg[symbol] = (massesKg[symbol] ?? 0) + share * part.massKg;
    totalKg += part.massKg;
  }
  const composition = Object.fromEntries(
    Object.entries(massesKg).map(([symbol, massKg]) => [symbol, massKg / totalKg]),
  );
  return { ...own, composition };
}

function namedMetal(id: string): MetalMaterial {
  const metal = findMaterial('metals', id);
  if (!metal) throw new RangeError(`no metal "${id}" in the materials table`);
  return metal;
}

/** Share by which the parts of a charge may miss its mass: scales and spillage. */
const CHARGE_LEEWAY = 0.01;

/** What is wrong with a pour that its schema cannot say: path below `pour`, and what is expected there. */
export function pourIssues(pour: Pour): { path: string; message: string }[] {
  const issues: { path: string; message: string }[] = [];
  for (const symbol of Object.keys(pour.alloy?.composition ?? {}))
    if (!findElement(symbol))
      issues.push({ path: 'alloy.composition', message: `an element of the table instead of ${symbol}` });
  const parts = pour.charge ?? [];
  parts.forEach(({ metal }, index) => {
    if (metal !== undefined && !findMaterial('metals', metal))
      issues.push({ path: `charge.${index}.metal`, message: `a metal of the table instead of "${metal}"` });
  });
  const totalKg = parts.reduce((sum, { massKg }) => sum + massKg, 0);
  if (parts.length > 0 && Math.abs(totalKg - pour.chargeKg) > CHARGE_LEEWAY * pour.chargeKg)
    issues.push({
      path: 'chargeKg',
      message: `the mass of its parts, ${totalKg.toFixed(2)} kg`,
    });
  return issues;
}
