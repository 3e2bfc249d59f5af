/** A number, or [°C, value] pairs in rising temperature: straight lines between them, the end values outside. */
export type Curve = number | readonly (readonly [number, number])[];

/** One layer of a wall, from the heated face inwards. */
export interface LayerProperties {
  thicknessM: number;
  densityKgPerM3: number;
  conductivityWPerMK: Curve;
  heatCapacityJPerKgK: Curve;
}

/** A change on heating that takes up heat, evenly between two temperatures, once only. */
export interface ReactionProperties {
  fromC: number;
  toC: number;
  heatJPerM3: number;
}

/** Free water spread evenly through a body: it evaporates from a front that recedes, and holds each depth at 100 °C until that depth is dry. */
export interface WaterProperties {
  kgPerM3: number;
  /** What the water adds to the conductivity while all of it is there, W/(m·K). */
  addedConductivityWPerMK: number;
  /** Diffusivity of vapour in the dry layer over that in free air, 0-1: porosity over tortuosity. */
  dryLayerShare: number;
}

/**
 * How the heated face meets the chamber: by convection and grey radiation (exchange factor over the face's own temperature);
 * `held` lies at the chamber's own temperature: the hot face of the lining.
 */
export type FaceProperties =
  { kind: 'held' } | { kind: 'film'; convectionWPerM2K: number; exchangeFactor: Curve };

/** The far face: insulated (or a plane or axis of symmetry), or open to the room through a film. */
export type FarProperties =
  | { kind: 'insulated' }
  | { kind: 'room'; ambientC: number; film: number | { emissivity: number; heightM: number } };

/**
 * A body heated from one face: a lining, the wall of a shell, half a wall heated from both faces, a cylinder.
 * Area at depth x is `area[0] + area[1]·x + area[2]·x²`, m²: constant for a slab, 2πL(R − x) for a cylinder.
 */
export interface BodyProperties {
  layers: readonly LayerProperties[];
  area: readonly [number, number, number];
  /** Cell size at the heated face and its growth per metre of depth; or one node for the whole body. */
  grid:
    { kind: 'graded'; firstM: number; growth: number } | { kind: 'even'; cells: number } | { kind: 'lumped' };
  face: FaceProperties;
  far: FarProperties;
  startC: number;
  water: WaterProperties | null;
  reactions: readonly ReactionProperties[];
  /** How many such bodies stand in the chamber. */
  count: number;
}
