import { constant } from './property';
import type { Property } from './schema';

/** What a kiln is taken to do where its plate says nothing. */
export const kilnDefaults = {
  /** Cold air drawn through the chamber with the vent open, in volumes of the chamber. */
  ventVolumesPerH: constant(60, '1/h', 'One chamber volume of cold air a minute', 'common-practice'),
  /** Cold air leaking through the closed kiln. */
  leakVolumesPerH: constant(
    3,
    '1/h',
    'Seams and spy holes of a closed kiln, 5-10 % of its heat',
    'common-practice',
  ),
  /** Heating elements, by the rated power. */
  elementsKgPerKW: constant(0.4, 'kg/kW', 'Wound wire at about 1.5 W/cm² of surface, recalled', 'memory'),
  elementsHeatCapacityJPerKgK: constant(
    650,
    'J/(kg·K)',
    'Iron-chromium-aluminium alloys, recalled',
    'memory',
  ),
  /** Convection between the air of the chamber and what stands in it. */
  electricConvectionWPerM2K: constant(
    5,
    'W/(m²·K)',
    'Still air in a closed box, handbook, recalled',
    'memory',
  ),
  gasConvectionWPerM2K: constant(15, 'W/(m²·K)', 'Burner gases at a few m/s, handbook, recalled', 'memory'),
  openFromC: constant(
    120,
    '°C',
    'Ceramic suppliers: open at 52-121 °C, crack the lid below 200 °C',
    'published',
  ),
  unloadC: constant(45, '°C', 'Bare hands', 'common-practice'),
  casingLimitC: constant(
    71,
    '°C',
    'New York City Fire Code 2022, chapter 30: combustible ceiling or floor',
    'published',
  ),
} satisfies Record<string, Property>;
