import type { BodyProperties } from './properties';

/** Nodes of a body. Node 0 lies on the heated face, the last on the far face; boundaries of layers are nodes. */
export interface Grid {
  /** Depth of each node, m. */
  depthM: Float64Array;
  /** Layer of the stretch that ends at node i; 0 for node 0. */
  layerBefore: Int32Array;
  /** Area over length of the stretch that ends at node i, m; 0 for node 0. */
  shapeM: Float64Array;
  /** Volume of node i on the near side and on the far side, m³. */
  nearM3: Float64Array;
  farM3: Float64Array;
}

function areaAt(area: BodyProperties['area'], depthM: number): number {
  return area[0] + (area[1] + area[2] * depthM) * depthM;
}

function volumeBetween(area: BodyProperties['area'], fromM: number, toM: number): number {
  const [a, b, c] = area;
  return a * (toM - fromM) + (b * (toM * toM - fromM * fromM)) / 2 + (c * (toM ** 3 - fromM ** 3)) / 3;
}

/** Number of cells that the size law `first + growth·x` puts between two depths, as a real number. */
function cellsBetween(firstM: number, growth: number, fromM: number, toM: number): number {
  return Math.log((firstM + growth * toM) / (firstM + growth * fromM)) / growth;
}

function depthsOf({ layers, grid }: BodyProperties): { depths: number[]; layerOf: number[] } {
  const depths = [0];
  const layerOf = [0];
  let topM = 0;
  layers.forEach(({ thicknessM }, layer) => {
    const bottomM = topM + thicknessM;
    if (grid.kind === 'graded') {
      const { firstM, growth } = grid;
      const share = cellsBetween(firstM, growth, topM, bottomM);
      const cells = Math.max(1, Math.ceil(share - 0.2));
      const ratio = (firstM + growth * bottomM) / (firstM + growth * topM);
      for (let i = 1; i <= cells; i++) {
        const sizeM = (firstM + growth * topM) * ratio ** (i / cells);
        depths.push(i === cells ? bottomM : (sizeM - firstM) / growth);
        layerOf.push(layer);
      }
    } else {
      const cells = grid.kind === 'even' ? grid.cells : 1;
      for (let i = 1; i <= cells; i++) {
        depths.push(topM + (thicknessM * i) / cells);
        layerOf.push(layer);
      }
    }
    topM = bottomM;
  });
  return { depths, layerOf };
}

/**
 * Vertex-centred finite volumes of a body: control volumes reach half-way to the neighbouring nodes, conductance is
 * taken with the area half-way. For a slab or cylinder on an even grid this is exact for a steady ramp (a parabola).
 *
 * @param properties a lumped body gives one node that holds all of its volume
 */
export function gridOf(properties: BodyProperties): Grid {
  const { area, layers } = properties;
  if (properties.grid.kind === 'lumped') {
    const depthM = layers.reduce((sum, layer) => sum + layer.thicknessM, 0);
    const volumeM3 = volumeBetween(area, 0, depthM);
    return {
      depthM: Float64Array.of(0),
      layerBefore: Int32Array.of(0),
      shapeM: Float64Array.of(0),
      nearM3: Float64Array.of(volumeM3),
      farM3: Float64Array.of(0),
    };
  }
  const { depths, layerOf } = depthsOf(properties);
  const nodes = depths.length;
  const grid: Grid = {
    depthM: Float64Array.from(depths),
    layerBefore: Int32Array.from(layerOf),
    shapeM: new Float64Array(nodes),
    nearM3: new Float64Array(nodes),
    farM3: new Float64Array(nodes),
  };
  for (let i = 1; i < nodes; i++) {
    const fromM = depths[i - 1] ?? 0;
    const toM = depths[i] ?? 0;
    const middleM = (fromM + toM) / 2;
    grid.shapeM[i] = areaAt(area, middleM) / (toM - fromM);
    grid.farM3[i - 1] = volumeBetween(area, fromM, middleM);
    grid.nearM3[i] = volumeBetween(area, middleM, toM);
  }
  return grid;
}

/** Area of the far face, m². */
export function farAreaM2({ area, layers }: BodyProperties): number {
  return areaAt(
    area,
    layers.reduce((sum, layer) => sum + layer.thicknessM, 0),
  );
}
