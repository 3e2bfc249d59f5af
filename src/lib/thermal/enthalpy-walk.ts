import type { Body } from './body';
import { WATER_BOILS_C, WATER_EVAPORATION_J_PER_KG, WATER_HEAT_CAPACITY_J_PER_KG_K } from './constants';
import { BIN_C, binOf, LAST_BIN, TABLE_FROM_C } from './property-table';

/** Heat capacity of liquid water per joule that its evaporation still needs, 1/K. */
const WATER_PER_LATENT_PER_K = WATER_HEAT_CAPACITY_J_PER_KG_K / WATER_EVAPORATION_J_PER_KG;

/**
 * Gives heat to one node that may hold water or reactions, and returns its new temperature, °C: the enthalpy method.
 * Water keeps the node at 100 °C until the last of it has evaporated; a reaction takes up its heat where the node rises above every
 * temperature it has been at. Both happen once: vapour leaves, nothing condenses or reacts back.
 */
export function warmWithReactions(body: Body, node: number, heatJ: number): number {
  return heatJ > 0 ? rise(body, node, heatJ) : fall(body, node, heatJ);
}

function rise(body: Body, node: number, heatJ: number): number {
  const start = body.capacityStart[node]!;
  const volumeM3 = body.volumeM3[node]!;
  const peakC = body.peakC[node]!;
  let latentJ = body.latentJ[node]!;
  let leftJ = heatJ;
  let atC = body.tempC[node]!;
  let bin = binOf(atC);
  for (;;) {
    if (latentJ > 0 && atC >= WATER_BOILS_C) {
      const evaporatingJ = Math.min(leftJ, latentJ);
      latentJ -= evaporatingJ;
      leftJ -= evaporatingJ;
      if (leftJ <= 0) break;
    }
    const edgeC = bin < LAST_BIN ? TABLE_FROM_C + (bin + 1) * BIN_C : Infinity;
    const known = atC < peakC;
    const stopC = known && peakC < edgeC ? peakC : edgeC;
    const reacting = known || body.reaction === null ? 0 : body.reaction[bin]!;
    const capacity = volumeM3 * (body.capacity[start + bin]! + reacting) + latentJ * WATER_PER_LATENT_PER_K;
    const toC = atC + leftJ / capacity;
    if (toC <= stopC) {
      atC = toC;
      break;
    }
    leftJ -= (stopC - atC) * capacity;
    atC = stopC;
    if (stopC === edgeC) bin++;
  }
  body.latentJ[node] = latentJ;
  if (atC > peakC) body.peakC[node] = atC;
  return atC;
}

function fall(body: Body, node: number, heatJ: number): number {
  const start = body.capacityStart[node]!;
  const volumeM3 = body.volumeM3[node]!;
  const wetJPerK = body.latentJ[node]! * WATER_PER_LATENT_PER_K;
  let leftJ = heatJ;
  let atC = body.tempC[node]!;
  let bin = binOf(atC);
  for (;;) {
    const edgeC = bin > 0 ? TABLE_FROM_C + bin * BIN_C : -Infinity;
    const capacity = volumeM3 * body.capacity[start + bin]! + wetJPerK;
    const toC = atC + leftJ / capacity;
    if (toC >= edgeC) return toC;
    leftJ += (atC - edgeC) * capacity;
    atC = edgeC;
    bin--;
  }
}

/** Whether some node of a body has still to pass through one of its reactions. */
export function reactionsRemain(body: Body): boolean {
  let highestC = -Infinity;
  for (const { toC } of body.properties.reactions) highestC = Math.max(highestC, toC);
  // A window is spread over the whole of its last bin.
  const overC = highestC + BIN_C;
  for (let i = body.first; i < body.nodes; i++) if (body.peakC[i]! < overC) return true;
  return false;
}
