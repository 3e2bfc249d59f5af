import type { Method } from './schema';

export const patternAndMetal: readonly Method[] = [
  {
    id: 'pattern',
    name: 'Pattern: melt-out and burnout',
    says: 'What runs out, what burns, and what is left. Gas given off, the air it needs, the heat it gives.',
    equations: [
      'above its flow temperature, while a segment drains, its share runs out evenly over the drain time',
      'dα/dt = A·exp(−E/RT)·f(α), f = 1 − α or 2(√α − α)',
      'char burns no faster than air comes: ṁ = D(T)·(ε/τ)·(S/ℓ)·ρ_air / 11.5, and no faster than the chamber has air for',
      'middle of a solid pattern: lag s²/(π²·a)',
    ],
    symbols: [
      ['α', 'share of a step’s own mass that is gone'],
      ['E, A', 'activation energy and pre-exponential of each step'],
      ['D', 'diffusivity of oxygen in air, 2.1e-5·(T/298 K)^1.75 m²/s'],
      ['ε/τ, S/ℓ', 'porosity over tortuosity; area over length of the way through the wall'],
      ['s, a', 'thickness and diffusivity of the pattern'],
    ],
    validity: 'At the temperature of the mould core; air by vent, leaks and the burner’s excess.',
    accuracy:
      'Decay within 0.1 % of exact solutions; measured thermogravimetry of PMMA at 3-32 K/min met within 2 °C at the peak from its own Kissinger energy. The sets for wax, print and resin are fits to remembered peaks: ±50 °C or so. Shown with two digits.',
    leavesOut:
      'Bubbling and wicking of wax, streaming of air through the pores, ash that falls out, the heat the pattern takes up.',
    sources: [
      'Kinetic sets: each with its source in the materials table',
      'Fuller, Schettler and Giddings 1966 (diffusivity)',
      'Richards and Mascreen, AFS 2003 (wax and cracked shells)',
    ],
  },
  {
    id: 'air',
    name: 'Air and flammable gas',
    says: 'Whether what the patterns give off finds air to burn, and whether it makes the kiln’s air flammable.',
    equations: [
      'air needed = gas · stoichiometric air + char · 11.5',
      'share of the limit = gas · heat of combustion / (air drawn through · 2 MJ/m³)',
    ],
    symbols: [['2 MJ/m³', 'heat in air at its lower flammable limit, about the same for most vapours']],
    validity: 'Chamber below 600 °C for the flammable limit: hotter, gas burns as it meets air.',
    accuracy: 'A rule to go by, not a measurement; the limit is recalled.',
    leavesOut: 'Mixing, flues, what gathers in corners. No figure here makes a kiln safe to open.',
    sources: [
      'NFPA 86 (ovens below 25 % of the limit)',
      'Law of Burgess and Wheeler; US Bureau of Mines Bulletin 627, recalled',
    ],
  },
  {
    id: 'melt',
    name: 'Melting, carrying and filling',
    says: 'Heat and time to bring a charge to the pour, what it loses while carried, and whether the thinnest section likely fills.',
    equations: [
      'Q = Σ m_i·[h_i(T_pour) − h_i(T_room)] + m_crucible·c·ΔT; input = Q / efficiency',
      'carried: dT/dt from radiation of the melt and the crucible and convection',
      'flows until superheat and half the heat of fusion have gone into the wall and through it',
    ],
    symbols: [
      ['h_i', 'enthalpy of each element, J/kg'],
      ['m_i', 'its mass in the charge'],
    ],
    validity: 'Alloys of the elements in the table; crucibles of clay-graphite; sections from 0.1 mm.',
    accuracy:
      'Cu, Sn, Al, Ag, Au within 1 % of tabulated enthalpies; alloys by component sum, ±5 % (±10 % with silicon or carbon). Freezing against a thick wall within 3 % of Chvorinov’s closed form; filling is known to a factor of two in time.',
    leavesOut: 'Heat of mixing, flow of the metal, gas in the mould, skins of oxide.',
    sources: [
      'NIST WebBook and NASA TM-4513 (enthalpies)',
      'Flemings, Solidification Processing',
      'Efficiencies: survey of melting practice for the US Department of Energy, recalled',
    ],
  },
  {
    id: 'cost',
    name: 'Energy, cost and carbon dioxide',
    says: 'What the firing uses and costs, by the prices of the hour, and what each line of moulds bears.',
    equations: [
      'cost = Σ energy in each stretch of one price × that price',
      'share of a line = its mass with water and pattern / mass of all moulds',
    ],
    symbols: [],
    validity:
      'Local time of use with changes of the clocks inside a firing; fuel on its higher heating value.',
    accuracy: 'Money is exact to the last digit of its currency; the energy is the model’s.',
    leavesOut: 'Standing charges, demand charges, labour.',
    sources: [
      '40 CFR 98 (fuels)',
      'Carbon of electricity: the tariff’s own factor, else a default that says so',
    ],
  },
  {
    id: 'limits',
    name: 'Limits, people and the programmer',
    says: 'Limits of kiln, material, thermocouple and programmer, attended hours, and the temperature at which the kiln is opened, as entered or from the table.',
    equations: ['a limit is passed when the computed curve is above it'],
    symbols: [],
    validity: 'As good as what was entered.',
    accuracy: 'Exact comparison with the estimate.',
    leavesOut: 'The independent over-temperature cut-out that every kiln must have: this is not one.',
    sources: ['Plates, data sheets and the studio’s own settings'],
  },
  {
    id: 'draft',
    name: 'Drafted profiles',
    says: 'Segments for a load and a kiln to begin from: targets and first rates from the table and the trade, holds and rates then changed until the models object to nothing that a change would mend.',
    equations: [],
    symbols: [],
    validity:
      'Loads of shells and flasks; a short list of pairs that no profile fires well is named instead.',
    accuracy: 'Over 2,400 random loads and kilns no draft raised a caution that stops it, but for that list.',
    leavesOut: 'Your own practice, and the makers’ data sheets: they come first.',
    sources: ['The models above; each reason names its own source'],
  },
  {
    id: 'thermocouples',
    name: 'Thermocouples',
    says: 'Millivolts to degrees and back, cold junction compensated in millivolts, tolerance by class.',
    equations: ['E(T) by the ITS-90 reference functions; T = E⁻¹(E_measured + E(T_junction))'],
    symbols: [],
    validity: 'Types B, E, J, K, N, R, S, T over their published ranges.',
    accuracy: 'Every 10 °C of the published tables to half their last digit (0.0005 mV).',
    leavesOut: 'Drift, inhomogeneity, how a sheath is placed.',
    sources: ['NIST SRD 60 (ITS-90)', 'IEC 60584-1 and ASTM E230 as reproduced by makers'],
  },
  {
    id: 'review',
    name: 'Plan against actual',
    says: 'Lays a log over its plan, carries the plan with what really happened, and marks each deviation once.',
    equations: ['each segment is compared with its own ramp begun when the one before really ended'],
    symbols: [],
    validity: 'One control channel; thresholds by stage.',
    accuracy:
      'On labelled logs every finding found and none on clean ones; peaks within 0.03 °C, starts within 15 s.',
    leavesOut: 'What no sensor saw.',
    sources: ['Labelled logs of this project, made apart from the finder'],
  },
];
