import type { Reaction } from './schema';

const GYPSUM_SOURCE =
  'Formation enthalpies of gypsum, hemihydrate and anhydrite from a public cement-chemistry table and of water from CODATA, 25 °C, water as vapour';

/** Heat and mass of the two steps per kg of gypsum (CaSO4·2H2O, 172.171 g/mol). */
const TO_HEMIHYDRATE = { heatJPerKg: 482.78e3, massShare: 0.156954 };
const TO_ANHYDRITE = { heatJPerKg: 608.92e3 - 482.78e3, massShare: 0.209272 - 0.156954 };

/**
 * The two steps in which the gypsum of a mould loses its bound water.
 *
 * @param gypsumShare kg of gypsum (as dihydrate) in 1 kg of dry mould, 0-1
 */
export function gypsumReactions(gypsumShare: number): Reaction[] {
  return [
    {
      name: 'gypsum to hemihydrate',
      fromC: 105,
      toC: 150,
      heatJPerKg: TO_HEMIHYDRATE.heatJPerKg * gypsumShare,
      massShare: TO_HEMIHYDRATE.massShare * gypsumShare,
      gas: 'water',
      source: `${GYPSUM_SOURCE}; first endotherm at 140-150 °C, recalled`,
      confidence: 'derived',
    },
    {
      name: 'hemihydrate to anhydrite',
      fromC: 150,
      toC: 200,
      heatJPerKg: TO_ANHYDRITE.heatJPerKg * gypsumShare,
      massShare: TO_ANHYDRITE.massShare * gypsumShare,
      gas: 'water',
      source: `${GYPSUM_SOURCE}; second endotherm at 190-200 °C, recalled`,
      confidence: 'derived',
    },
  ];
}

const MG_AMMONIUM =
  'MgNH4PO4·6H2O to its monohydrate near 100 °C and to Mg2P2O7 above 200 °C, Higuchi and others 1982';

/** Mass shares by stoichiometry (245.41 g/mol: 5 H2O is 0.3670, then 1.5 H2O and NH3 are 0.1795). */
export function phosphateReactions(bondShare: number): Reaction[] {
  return [
    {
      name: 'struvite to its monohydrate',
      fromC: 80,
      toC: 120,
      heatJPerKg: 0.367 * 2.9e6 * bondShare,
      massShare: 0.367 * bondShare,
      gas: 'water',
      source: `${MG_AMMONIUM}; heat taken as 2.9 MJ per kg of water driven off, recalled`,
      confidence: 'derived',
    },
    {
      name: 'ammonia and the last water leave',
      fromC: 200,
      toC: 450,
      heatJPerKg: 0.1795 * 3.5e6 * bondShare,
      massShare: 0.1795 * bondShare,
      gas: 'ammonia-and-water',
      source: `${MG_AMMONIUM}; heat taken as 3.5 MJ per kg of gas, recalled`,
      confidence: 'derived',
    },
  ];
}
