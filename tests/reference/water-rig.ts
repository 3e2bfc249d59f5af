import type { Body } from '~/lib/thermal/body';
import type { Chamber } from '~/lib/thermal/chamber';
import { takeStep, tryHeld } from '~/lib/thermal/chamber-step';
import { bodyWith, chamberWith, slab, type Spoil } from './thermal-rig';

const ATMOSPHERE_PA = 101325;
/** So much air that what evaporates does not change it. */
export const AMPLE_KG_PER_S = 1e4;

/** A chamber whose incoming air holds vapour of a given pressure. */
export function moistChamber(bodies: Body[], startC: number, vapourPa: number, airKgPerS: number): Chamber {
  const chamber = chamberWith(bodies, { startC, ambientC: startC });
  return { ...chamber, roomU: 1 / (1 - vapourPa / ATMOSPHERE_PA), airKgPerS };
}

/** Steps of one length with the chamber held at a temperature. */
export function hold(chamber: Chamber, atC: number, stepS: number, steps: number): void {
  for (let i = 0; i < steps; i++) {
    tryHeld(chamber, stepS, atC);
    takeStep(chamber);
  }
}

/** A thick wet wall of 1 m² that meets the air by convection alone and stores almost no heat. */
export const wetWall = (startC: number, filmWPerM2K: number, spoil: Spoil = {}): Body =>
  bodyWith(
    slab({ thicknessM: 0.05, k: 1, rhoC: 1e5, startC, cells: 0, filmWPerM2K, waterKgPerM3: 600 }),
    spoil,
  );
