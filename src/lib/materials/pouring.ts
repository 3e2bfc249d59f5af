import { constant } from './property';
import type { Property } from './schema';

const RECALLED = 'Handbooks, recalled';

/** What melting, carrying and filling are taken to be like where nobody says better. */
export const pouring = {
  electricEfficiencyShare: constant(
    0.6,
    '1',
    'Resistance crucible furnaces 0.59-0.76; survey of melting practice for the US Department of Energy 2005, recalled',
    'memory',
  ),
  gasEfficiencyShare: constant(
    0.12,
    '1',
    'Gas crucible furnaces 0.07-0.19; survey of melting practice for the US Department of Energy 2005, recalled',
    'memory',
  ),
  crucibleHeatCapacityJPerKgK: constant(
    1000,
    'J/(kg·K)',
    `Clay-graphite, mean to 1100 °C; ${RECALLED}`,
    'memory',
  ),
  crucibleDensityKgPerM3: constant(2100, 'kg/m³', `Clay-graphite; ${RECALLED}`, 'memory'),
  crucibleWallM: constant(0.014, 'm', 'Small clay-graphite crucibles', 'common-practice'),
  crucibleDepthPerDiameter: constant(
    1.2,
    '1',
    'Inner depth of small crucibles over their width',
    'common-practice',
  ),
  crucibleEmissivity: constant(0.85, '1', `Graphite and silicon carbide, rough; ${RECALLED}`, 'memory'),
  meltEmissivity: constant(0.6, '1', `Molten bronze under a skin of oxide, 0.3-0.8; ${RECALLED}`, 'memory'),
  /** Of the outer face of crucible and mould in the air of a shop. */
  shopConvectionWPerM2K: constant(
    10,
    'W/(m²·K)',
    `Natural convection about a hot body; ${RECALLED}`,
    'memory',
  ),
  contactWPerM2K: constant(
    2000,
    'W/(m²·K)',
    `Liquid metal against a ceramic shell, 1000-4000; ${RECALLED}`,
    'memory',
  ),
  /** Share frozen at which metal stops flowing through a thin section. */
  stopsFlowingShare: constant(
    0.5,
    '1',
    'Grains touch at a third to a half frozen; handbooks, recalled',
    'memory',
  ),
  pourKgPerS: constant(0.7, 'kg/s', 'A steady pour by hand', 'common-practice'),
  leastFillS: constant(3, 's', 'A small mould', 'common-practice'),
} satisfies Record<string, Property>;

/** Superheat over the liquidus that sections are poured with, thickest first. Common practice, no source. */
export const SUPERHEAT_BY_SECTION = [
  { fromM: 0.008, fromK: 80, toK: 120 },
  { fromM: 0.004, fromK: 120, toK: 180 },
  { fromM: 0, fromK: 180, toK: 230 },
] as const;
