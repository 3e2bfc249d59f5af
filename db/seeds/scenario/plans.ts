import type { LoadInput } from '~/lib/thermal/load-schema';
import type { ProfileInput } from '~/lib/profile/schema';

const HOUR = 3600;

/** Profiles of the demo studio. The figures are invented for the demo, in the range of common practice. */
export const PROFILES = {
  printedShell: {
    startC: 20,
    segments: [
      {
        stage: 'drying',
        toC: 95,
        rateCPerH: 45,
        holdS: HOUR,
        instruction: 'Door ajar until no damp shows on a cold mirror.',
      },
      {
        stage: 'melt-out',
        toC: 270,
        rateCPerH: 120,
        holdS: HOUR,
        drain: true,
        attended: true,
        vent: 'open',
        instruction: 'Open, draw the drain tray, close.',
      },
      {
        stage: 'burnout',
        toC: 680,
        rateCPerH: 150,
        holdS: 1.5 * HOUR,
        vent: 'open',
        instruction: 'Vent open, fan on, peephole out.',
      },
      { stage: 'vitrification', toC: 900, rateCPerH: 200, holdS: 1.5 * HOUR, instruction: 'Close the vent.' },
      {
        stage: 'casting-hold',
        toC: 860,
        rateCPerH: 100,
        holdS: HOUR,
        attended: true,
        instruction: 'Hold until the furnace is ready.',
      },
    ],
  },
  waxShell: {
    startC: 20,
    segments: [
      {
        stage: 'melt-out',
        toC: 720,
        rateCPerH: 'flat-out',
        holdS: 0.75 * HOUR,
        drain: true,
        attended: true,
        vent: 'open',
        instruction: 'Tray beneath the grate. Nobody before the door.',
      },
      { stage: 'vitrification', toC: 900, rateCPerH: 240, holdS: HOUR, vent: 'open' },
      { stage: 'cooling', toC: 200, rateCPerH: 'coast', holdS: 0, instruction: 'Leave shut.' },
    ],
  },
  plasterFlask: {
    startC: 20,
    segments: [
      {
        stage: 'drying',
        toC: 150,
        rateCPerH: 90,
        holdS: 2 * HOUR,
        instruction: 'Flasks sprue down, 12 mm apart.',
      },
      { stage: 'melt-out', toC: 370, rateCPerH: 120, holdS: HOUR, drain: true, vent: 'open' },
      { stage: 'burnout', toC: 730, rateCPerH: 150, holdS: 2 * HOUR, vent: 'open' },
      { stage: 'casting-hold', toC: 540, rateCPerH: 110, holdS: 1.5 * HOUR, attended: true },
    ],
  },
  resinShell: {
    startC: 20,
    segments: [
      { stage: 'drying', toC: 90, rateCPerH: 40, holdS: HOUR },
      {
        stage: 'burnout',
        toC: 480,
        rateCPerH: 55,
        holdS: 1.5 * HOUR,
        vent: 'open',
        instruction: 'Vent open, extraction on.',
      },
      { stage: 'burnout', toC: 760, rateCPerH: 150, holdS: 2 * HOUR, vent: 'open' },
      { stage: 'vitrification', toC: 950, rateCPerH: 200, holdS: HOUR },
    ],
  },
  refire: {
    startC: 20,
    segments: [
      {
        stage: 'drying',
        toC: 280,
        rateCPerH: 100,
        holdS: 0.5 * HOUR,
        instruction: 'Slowly through 180 to 280 °C: the shell has been hot before.',
      },
      { stage: 'casting-hold', toC: 870, rateCPerH: 280, holdS: HOUR, attended: true },
    ],
  },
  medal: {
    startC: 20,
    segments: [
      { stage: 'drying', toC: 110, rateCPerH: 60, holdS: HOUR },
      { stage: 'melt-out', toC: 280, rateCPerH: 140, holdS: 0.75 * HOUR, drain: true, vent: 'open' },
      { stage: 'vitrification', toC: 880, rateCPerH: 220, holdS: HOUR, vent: 'open' },
    ],
  },
} satisfies Record<string, ProfileInput>;

export const LOADS = {
  printedShells: {
    moulds: [
      {
        material: 'fused-silica-shell',
        count: 4,
        massKg: 2.3,
        waterKg: 0.06,
        wallM: 0.008,
        thinnestSectionM: 0.004,
        label: 'Heron, four parts',
        pattern: { material: 'pla', massKg: 0.32, drainedShare: 0.5, thickestM: 0.004, hollow: true },
      },
    ],
    furniture: [{ material: 'cordierite', massKg: 6.5, thicknessM: 0.016 }],
    pour: { metal: 'tin-bronze-90-10', chargeKg: 14, pourC: 1130, carryS: 35 },
  },
  waxShells: {
    moulds: [
      {
        material: 'aluminosilicate-shell',
        count: 3,
        massKg: 3.1,
        waterKg: 0.05,
        wallM: 0.01,
        thinnestSectionM: 0.005,
        label: 'Relief panels',
        pattern: { material: 'pattern-wax', massKg: 0.6, drainedShare: 0.9 },
      },
    ],
    furniture: [{ material: 'cordierite', massKg: 8, thicknessM: 0.02 }],
  },
  flasks: {
    moulds: [
      {
        form: 'flask',
        material: 'gypsum-investment',
        count: 6,
        massKg: 0.9,
        waterKg: 0.3,
        diameterM: 0.089,
        heightM: 0.102,
        thinnestSectionM: 0.0012,
        label: 'Class rings',
        pattern: { material: 'pattern-wax', massKg: 0.02, drainedShare: 0.8 },
      },
    ],
  },
  resinShells: {
    moulds: [
      {
        material: 'fused-silica-shell',
        count: 2,
        massKg: 1.4,
        wallM: 0.008,
        thinnestSectionM: 0.003,
        label: 'Lattice study',
        pattern: { material: 'castable-resin', massKg: 0.11, thickestM: 0.002, hollow: true },
      },
    ],
    furniture: [{ material: 'cordierite', massKg: 4, thicknessM: 0.016 }],
  },
  emptyShells: {
    moulds: [
      {
        material: 'fused-silica-shell',
        count: 4,
        massKg: 2.2,
        wallM: 0.008,
        label: 'Heron, patched',
        thinnestSectionM: 0.004,
      },
    ],
  },
} satisfies Record<string, LoadInput>;

export type ProfileKey = keyof typeof PROFILES;
export type LoadKey = keyof typeof LOADS;
export type KilnKey = 'tall' | 'bench' | 'yard';
