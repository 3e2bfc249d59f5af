export * from './schema';
export { constant, curve, valueAt, withOverride } from './property';
export { findMaterial, materials, type MaterialKind, type MaterialOf } from './table';
export { defaultLayers, type LiningLayer } from './lining-layers';
export { inversions, inversionsOf, type Inversion } from './inversions';
export { kilnDefaults } from './kiln-defaults';
