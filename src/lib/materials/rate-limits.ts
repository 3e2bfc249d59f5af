import type { RateLimit } from './schema';

const heating = (
  zone: RateLimit['zone'],
  fromC: number,
  toC: number,
  maxRateCPerH: number,
  source: string,
  onlyWith: RateLimit['onlyWith'] = null,
): RateLimit => ({
  zone,
  direction: 'heating',
  fromC,
  toC,
  maxRateCPerH,
  onlyWith,
  source,
  confidence: 'common-practice',
});

const quartzCooling: RateLimit = {
  zone: 'quartz',
  direction: 'cooling',
  fromC: 550,
  toC: 600,
  maxRateCPerH: 50,
  onlyWith: null,
  source: 'Fortuna, Sanitaryware (2000), as quoted: no faster than 50 °C/h through 573 °C',
  confidence: 'published',
};

const quartzHeating = heating(
  'quartz',
  550,
  600,
  150,
  'Through 573 °C no faster than 150 °C/h (common practice)',
);

/** Shells stand shock once the pattern has drained; water and grown cristobalite set the limits. */
export const shellLimits: RateLimit[] = [
  heating('drying', 20, 100, 60, 'Wet ware to 100 °C: 30-60 °C/h (common practice)', 'water'),
  heating('steam', 100, 200, 100, 'Wet ware from 100 to 200 °C: 60-100 °C/h (common practice)', 'water'),
  heating('whole', 200, 1200, 1000, 'Drained shells stand 300-1000 °C/h (common practice)'),
  {
    ...heating('cristobalite', 150, 300, 60, ''),
    direction: 'cooling',
    onlyWith: 'devitrified',
    source: 'From 300 to 150 °C at 50-60 °C/h after a soak above 1100 °C (common practice)',
  },
];

/** A shell whose stucco or slurry has calcined clay in it, but no quartz. */
export const aluminosilicateLimits: RateLimit[] = [
  ...shellLimits.filter((limit) => limit.zone !== 'whole'),
  heating('whole', 200, 1200, 600, 'Drained shells stand 300-1000 °C/h; these expand more (common practice)'),
];

/** Block moulds of plaster with quartz or cristobalite. */
export const gypsumLimits: RateLimit[] = [
  heating('drying', 20, 100, 60, 'Wet plaster to 100 °C: 30-60 °C/h (common practice)', 'water'),
  heating('steam', 100, 200, 100, 'Plaster from 100 to 200 °C: 60-100 °C/h (common practice)'),
  heating('cristobalite', 200, 275, 100, 'Cristobalite inversion of a block mould (common practice)'),
  heating(
    'organics',
    250,
    370,
    150,
    'While the pattern burns no faster than 150 °C/h (common practice)',
    'pattern',
  ),
  quartzHeating,
  quartzCooling,
  {
    ...heating('whole', 275, 760, 150, ''),
    direction: 'cooling',
    source: 'Flasks cool to casting temperature at 100-150 °C/h (common practice)',
  },
];

/** Phosphate-bonded flasks: makers give 5-7 K/min where they are not heated by shock. */
export const phosphateLimits: RateLimit[] = [
  heating('drying', 20, 100, 60, 'Wet ware to 100 °C: 30-60 °C/h (common practice)', 'water'),
  heating('cristobalite', 200, 275, 300, 'Slow heating of phosphate flasks at 5 K/min (common practice)'),
  heating('whole', 275, 900, 420, 'Heating of phosphate flasks at 5-7 K/min (common practice)'),
  quartzCooling,
];
