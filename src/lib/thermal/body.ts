import { WATER_EVAPORATION_J_PER_KG } from './constants';
import { type Drying, dryingOf } from './drying';
import { farAreaM2, gridOf, type Grid } from './grid';
import type { BodyProperties } from './properties';
import { BIN_COUNT, capacityTable, edgeTable, reactionTable } from './property-table';
import { RoomFilm } from './room-film';

/**
 * A body of the kiln as the solver holds it: state and scratch in typed arrays, one value per node.
 *
 * Nodes below `first` belong to the chamber (the hot face of a lining); `link[i]` joins node i to node i − 1, or to the
 * chamber for the first; `link[nodes]` joins the last node to the room. All conductances are for ONE body; `count`
 * multiplies what the chamber sees.
 */
export interface Body {
  readonly properties: BodyProperties;
  readonly grid: Grid;
  readonly nodes: number;
  readonly first: number;
  readonly count: number;
  readonly faceM2: number;
  readonly farM2: number;
  readonly volumeM3: Float64Array;
  /** Conductivity of each layer over temperature, one table after another. */
  readonly conductivity: Float64Array;
  readonly conductivityStart: Int32Array;
  /** Heat capacity per volume, J/(m³·K), of each kind of node, one table after another. */
  readonly capacity: Float64Array;
  readonly capacityStart: Int32Array;
  /** Heat taken up by reactions, J/(m³·K) by bin; null: none. */
  readonly reaction: Float64Array | null;
  /** Exchange factor with the chamber over the temperature of the heated face, at the edges of the bins; null: `held`. */
  readonly exchange: Float64Array | null;
  readonly roomFilm: RoomFilm | null;
  /** Heat that the water of each node needs to evaporate, J, when all of it is there. */
  readonly fullLatentJ: Float64Array;
  readonly wetWPerMK: number;
  /** How it dries below boiling; null: it never held water. */
  readonly drying: Drying | null;

  // State
  readonly tempC: Float64Array;
  /** Mean rate over the last step, K/s. */
  readonly rateCPerS: Float64Array;
  /** Change of that rate from the step before, K/s². */
  readonly bendCPerS2: Float64Array;
  /** Highest temperature each node has been at, °C: reactions run once. */
  readonly peakC: Float64Array;
  readonly latentJ: Float64Array;
  /** Mean latent heat of the water that left each node over the last step, W. */
  readonly boilingW: Float64Array;
  wet: boolean;
  /** Some node has not yet been through all reactions. */
  reacting: boolean;
  /** Largest difference of the last second stage from what the rates foresaw, K. */
  surpriseC: number;

  // Scratch of one step
  readonly middleC: Float64Array;
  readonly link: Float64Array;
  /** Heat capacity over the length of a stage, W/K. */
  readonly store: Float64Array;
  readonly wetStore: Float64Array;
  readonly inverse: Float64Array;
  readonly alpha: Float64Array;
  readonly beta: Float64Array;
  readonly stageC: Float64Array;
  readonly stageOneW: Float64Array;
  readonly stageTwoW: Float64Array;
  /** Where each wet node is within the stage: see `plateau.ts`. */
  readonly phase: Uint8Array;
  readonly farC: number;
  /** Heat flow into the body is `slope · chamber − offset`, W. */
  slopeWPerK: number;
  offsetW: number;
  farOneW: number;
  farTwoW: number;
}

/** Tables of heat capacity by kind of node: one for each layer, and one for each node between two layers. */
function capacities({ layers }: BodyProperties, grid: Grid): { table: Float64Array; start: Int32Array } {
  const perLayer = layers.map((layer) => capacityTable(layer.heatCapacityJPerKgK, layer.densityKgPerM3));
  const nodes = grid.depthM.length;
  const start = new Int32Array(nodes);
  const tables = [...perLayer];
  for (let i = 0; i < nodes; i++) {
    const near = grid.layerBefore[i] ?? 0;
    const far = grid.layerBefore[Math.min(i + 1, nodes - 1)] ?? 0;
    let kind = i === 0 ? far : near;
    const nearTable = perLayer[near];
    const farTable = perLayer[far];
    if (i > 0 && near !== far && nearTable && farTable) {
      const nearShare = (grid.nearM3[i] ?? 0) / ((grid.nearM3[i] ?? 0) + (grid.farM3[i] ?? 0));
      kind = tables.length;
      tables.push(nearTable.map((value, bin) => value * nearShare + (farTable[bin] ?? 0) * (1 - nearShare)));
    }
    start[i] = kind * BIN_COUNT;
  }
  return { table: joined(tables), start };
}

function joined(tables: readonly Float64Array[]): Float64Array {
  const all = new Float64Array(tables.reduce((sum, table) => sum + table.length, 0));
  let at = 0;
  for (const table of tables) {
    all.set(table, at);
    at += table.length;
  }
  return all;
}

/**
 * A body at one temperature, ready for the solver.
 *
 * @param properties what it is made of, its shape and grid
 */
export function bodyOf(properties: BodyProperties): Body {
  const grid = gridOf(properties);
  const nodes = grid.depthM.length;
  const volumeM3 = grid.nearM3.map((near, i) => near + (grid.farM3[i] ?? 0));
  const { table, start } = capacities(properties, grid);
  const latentJPerM3 = (properties.water?.kgPerM3 ?? 0) * WATER_EVAPORATION_J_PER_KG;
  const fullLatentJ = volumeM3.map((volume) => volume * latentJPerM3);
  const zeros = (): Float64Array => new Float64Array(nodes);
  return {
    properties,
    grid,
    nodes,
    first: properties.face.kind === 'held' ? 1 : 0,
    count: properties.count,
    faceM2: properties.area[0],
    farM2: farAreaM2(properties),
    volumeM3,
    conductivity: joined(properties.layers.map((layer) => edgeTable(layer.conductivityWPerMK))),
    conductivityStart: grid.layerBefore.map((layer) => layer * (BIN_COUNT + 1)),
    capacity: table,
    capacityStart: start,
    reaction: properties.reactions.length > 0 ? reactionTable(properties.reactions) : null,
    exchange: properties.face.kind === 'film' ? edgeTable(properties.face.exchangeFactor) : null,
    roomFilm:
      properties.far.kind === 'room' ? new RoomFilm(properties.far.ambientC, properties.far.film) : null,
    fullLatentJ,
    wetWPerMK: properties.water?.addedConductivityWPerMK ?? 0,
    drying: dryingOf(properties, grid),
    tempC: zeros().fill(properties.startC),
    rateCPerS: zeros(),
    bendCPerS2: zeros(),
    peakC: zeros().fill(properties.startC),
    latentJ: fullLatentJ.slice(),
    boilingW: zeros(),
    wet: latentJPerM3 > 0,
    reacting: properties.reactions.length > 0,
    surpriseC: 0,
    middleC: zeros(),
    link: new Float64Array(nodes + 1),
    store: zeros(),
    wetStore: zeros(),
    inverse: zeros(),
    alpha: new Float64Array(nodes + 1),
    beta: new Float64Array(nodes + 1),
    stageC: zeros(),
    stageOneW: zeros(),
    stageTwoW: zeros(),
    phase: new Uint8Array(nodes),
    farC: properties.far.kind === 'room' ? properties.far.ambientC : 0,
    slopeWPerK: 0,
    offsetW: 0,
    farOneW: 0,
    farTwoW: 0,
  };
}
