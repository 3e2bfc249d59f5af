import type { Method } from './schema';

export const kilnAndMould: readonly Method[] = [
  {
    id: 'plan',
    name: 'Planned curve',
    says: 'Straight ramps and level holds, exactly as the segments say. Where the kiln decides (flat out, heating off) the slope comes from the kiln model.',
    equations: ['T(t) = T₀ + r·t on a ramp, T on a hold'],
    symbols: [
      ['T', 'temperature, °C'],
      ['r', 'rate, °C/h'],
    ],
    validity: '1-64 segments, −20 to 1400 °C, 1-2000 °C/h, up to 14 days.',
    accuracy: 'Exact.',
    leavesOut: 'What the kiln really does: that is the model below.',
    sources: ['Definition'],
  },
  {
    id: 'kiln',
    name: 'Kiln',
    says: 'What the chamber does with the power there is: follows the plan, or falls behind at full fire. Gives time, energy, natural cooling and when the kiln may be opened.',
    equations: [
      'dH/dt = P − Σ q − G·(T − T_room) + Q_pattern',
      'P ≤ P_rated · share delivered · (V_supply / V_plate)²; gas: burner · available heat(T, excess air)',
      'ρ·c(T)·∂T/∂t = ∂/∂x (k(T)·∂T/∂x) in each layer of the lining',
      'outer face: q = h_natural·(T − T_room) + ε·σ·(T⁴ − T_room⁴)',
      'thermocouple: τ·dR/dt = T + offset − R',
    ],
    symbols: [
      ['H', 'heat of chamber air, elements and hot-face skin, J'],
      ['P', 'heat from elements or burner, W'],
      ['q', 'heat into lining, moulds, furniture, W'],
      ['G', 'air of vent and leaks as a conductance, W/K'],
      ['Q_pattern', 'heat of the burning pattern, W'],
      ['k, c, ρ', 'conductivity, heat capacity, density of each layer'],
      ['R, τ', 'reading and lag of the thermocouple, °C and s'],
    ],
    validity: 'One chamber at one temperature; linings of one to six layers; −20 to 1400 °C.',
    accuracy:
      'Conduction within 0.5 % of the range of series solutions; a lumped kiln at its power limit within 0.1 % of the closed form; energy balanced to 0.1 % over 500 random kilns and loads. Electricity of a measured 74-litre kiln met within 10 % of its readings to 1000 and 1260 °C; published duties of such a kiln (65 % in its last hours) lie lower than computed (about 80 %), their kiln and schedule are not told.',
    leavesOut:
      'Differences of temperature inside the chamber (usually ±5-15 °C), switching of elements, edges of the walls beyond a shape factor, ageing of a lining.',
    sources: [
      'Alexander 1977 (two-stage implicit step)',
      'Incropera, Fundamentals of Heat and Mass Transfer (films, radiation)',
      'Linings, fuels and defaults: the materials table with its sources',
    ],
  },
  {
    id: 'mould',
    name: 'Mould',
    says: 'Temperature from the outer face to the core of a shell wall or a flask, how far the core trails the chamber, and how much longer a hold must last for it to come within 10 °C.',
    equations: [
      'ρ·c(T)·∂T/∂t = 1/A · ∂/∂x (A·k(T)·∂T/∂x)',
      'face: q = h·(T_chamber − T) + F·σ·(T_chamber⁴ − T⁴)',
      'F = 1 / [1/ε₁ + (A₁/A₂)·(1/ε₂ − 1)]',
      'longer hold: t = τ·ln(ΔT_core / 10 °C), τ from the last ten minutes of the hold',
    ],
    symbols: [
      ['A', 'area at a depth: constant for a slab, 2πLr for a cylinder, m²'],
      ['F', 'exchange factor of the grey enclosure'],
      ['ε', 'emissivity'],
    ],
    validity: 'Shells of 1-500 mm heated from one face or both; flasks as long cylinders.',
    accuracy:
      'Slab, cylinder and film within 0.5 % of the range of closed solutions; the core of an 8 mm shell on a ramp within the same.',
    leavesOut: 'The ends of a flask (errs on the slow side), corners, cups, the pattern’s own heat.',
    sources: ['Carslaw and Jaeger, Conduction of Heat in Solids', 'Incropera, eq. 13.23'],
  },
  {
    id: 'water',
    name: 'Water in the wall',
    says: 'How much free water is left, and whether it still boils behind a hot face. Bound water of gypsum and phosphate leaves in steps that take up heat.',
    equations: [
      'each depth stays at 100 °C until its water is gone: heat in = ṁ·L',
      'below boiling: vapour leaves from a front that recedes, through dry wall, film and the air drawn through',
      'gypsum: CaSO₄·2H₂O → CaSO₄·½H₂O → CaSO₄, 483 and 126 kJ per kg of gypsum',
    ],
    symbols: [
      ['ṁ', 'water driven off, kg/s'],
      ['L', 'heat of evaporation, J/kg'],
    ],
    validity: 'Free water spread evenly at the start; one atmosphere.',
    accuracy:
      'The boiling front within 2 % of Stefan’s solution; wet-bulb temperatures within 0.7 °C of recalled charts; heats of gypsum by Hess’s law from formation enthalpies to 0.05 %.',
    leavesOut:
      'Capillary flow to the face (a wet block dries faster at first), condensation, pressure in the pores.',
    sources: [
      'Stefan problem: Carslaw and Jaeger, chapter 11',
      'Film by the analogy of heat and mass transfer (Lewis)',
      'Formation enthalpies of a public cement-chemistry table; CODATA',
    ],
  },
  {
    id: 'stress',
    name: 'Rates, stress and inversions',
    says: 'Whether a mould is taken faster through a range than the trade holds safe, and whether the difference through its wall pulls harder than it is strong.',
    equations: [
      'ΔT of a steady ramp: β·L²/2a (slab), β·R²/4a (cylinder)',
      'stress at the middle: s·E·α·ΔT/(1 − ν), s = 1/3 (slab), 1/2 (cylinder)',
    ],
    symbols: [
      ['β', 'rate, K/s'],
      ['a', 'diffusivity, m²/s'],
      ['E, α, ν', 'Young’s modulus, expansion, Poisson’s ratio'],
    ],
    validity:
      'Inversions by what the mould contains: quartz 573 °C, cristobalite 200-275 °C; fused silica has neither until it devitrifies.',
    accuracy: 'The lag of slabs and cylinders within 0.2 %; strengths are recalled and scatter by half.',
    leavesOut: 'Cracks that are there already, corners, wet strength, creep.',
    sources: [
      'Timoshenko and Goodier, Theory of Elasticity',
      'Rate limits: each with its source in the materials table',
    ],
  },
  {
    id: 'heat-work',
    name: 'Heat work and cones',
    says: 'How far a binder has sintered: hours at a reference temperature that do the same. And about which pyrometric cone would be down.',
    equations: [
      'W = ∫ exp[−E/R·(1/T − 1/T_ref)] dt',
      'cone n is down when ∫ exp(−E_range/RT) dt reaches its value',
    ],
    symbols: [
      [
        'E',
        '300 kJ/mol for silica-bonded shells (nobody has published one); 335, 580, 830 kJ/mol for three ranges of cones',
      ],
      ['T', 'mould core, K'],
    ],
    validity: 'Shells: target 0.5 h at 870 °C, a wide band. Cones 019 to 10, at 15 to 150 °C/h.',
    accuracy:
      'Cones: fitted on the 60 and 150 °C/h columns, met at 15 °C/h within rms 7.5 °C (one energy a range does no better than 6.5), small cones at 300 °C/h about 11 °C low.',
    leavesOut: 'Cristobalite, alkali, steam, the history of a gel.',
    sources: [
      'Common practice: 820 °C for 2 h and 930 °C for 2 h are both sound',
      'Cone chart of the maker, as reproduced by suppliers',
      'Senum and Yang 1977 (temperature integral)',
    ],
  },
];
