import type { Body } from './body';
import { ROOM_HUMIDITY_SHARE, totalOverAir } from './humid-air';
import { BIN_COUNT } from './property-table';

/** How heat comes in: what the chamber gets at full fire, and what is paid for each watt of it, by chamber temperature. */
export interface Firing {
  fullHeatW(chamberC: number): number;
  inputPerHeat(chamberC: number): number;
}

/**
 * The chamber: one node (air, elements and the skin of the hot face) that every body and the vent meet,
 * with its state, the outcome of the step last tried, and the heat booked since the start.
 */
export interface Chamber {
  readonly bodies: readonly Body[];
  readonly firing: Firing;
  readonly ambientC: number;
  /** Total over air pressure of the room's moist air. */
  readonly roomU: number;
  /** Heat capacity of the node by bin of temperature, J/K. */
  readonly capacity: Float64Array;
  tempC: number;
  rateCPerS: number;
  bendCPerS2: number;
  /** Length of the last step, s. */
  lastS: number;
  /** Air that comes in cold and leaves at the chamber's temperature, kg/s. */
  airKgPerS: number;
  /** Of the front, what stands open and radiates to the room, m². */
  openM2: number;
  /** Both as a conductance to the room, set for each step, W/K. */
  ventWPerK: number;
  /** Heat released inside, W. */
  sourceW: number;
  readonly trial: Trial;
  readonly booked: Booked;
}

/** Outcome of a step that was tried and not yet taken. */
export interface Trial {
  stepS: number;
  /** The end temperature was given; otherwise the power. */
  held: boolean;
  endC: number;
  /** Heat that comes in at the end of the step, and its mean over the step, W. */
  endHeatW: number;
  meanHeatW: number;
  /** Net heat flow into the node itself in both stages, W. */
  nodeOneW: number;
  nodeTwoW: number;
  stageOneC: number;
  stageTwoC: number;
  inputPerHeat: number;
  /** How far the outcome lies from what the last step's rates foresaw, K. */
  surpriseC: number;
}

/** Heat since the start, J. */
export interface Booked {
  inputJ: number;
  heatJ: number;
  farJ: number;
  ventJ: number;
  sourceJ: number;
}

/**
 * A chamber at rest at a temperature.
 *
 * @param ownJPerK heat capacity of air and elements; the hot-face skin of each body that is `held` is added to it
 */
export function chamberOf(
  bodies: readonly Body[],
  firing: Firing,
  settings: { startC: number; ambientC: number; ownJPerK: number },
): Chamber {
  const capacity = new Float64Array(BIN_COUNT).fill(settings.ownJPerK);
  for (const body of bodies) {
    if (body.first === 0) continue;
    const skinM3 = (body.volumeM3[0] ?? 0) * body.count;
    const start = body.capacityStart[0] ?? 0;
    for (let bin = 0; bin < BIN_COUNT; bin++) {
      capacity[bin] = (capacity[bin] ?? 0) + skinM3 * (body.capacity[start + bin] ?? 0);
    }
    body.tempC[0] = settings.startC;
  }
  return {
    bodies,
    firing,
    ambientC: settings.ambientC,
    roomU: totalOverAir(settings.ambientC, ROOM_HUMIDITY_SHARE),
    capacity,
    tempC: settings.startC,
    rateCPerS: 0,
    bendCPerS2: 0,
    lastS: 0,
    airKgPerS: 0,
    openM2: 0,
    ventWPerK: 0,
    sourceW: 0,
    trial: {
      stepS: 0,
      held: true,
      endC: settings.startC,
      endHeatW: 0,
      meanHeatW: 0,
      nodeOneW: 0,
      nodeTwoW: 0,
      stageOneC: settings.startC,
      stageTwoC: settings.startC,
      inputPerHeat: 1,
      surpriseC: 0,
    },
    booked: { inputJ: 0, heatJ: 0, farJ: 0, ventJ: 0, sourceJ: 0 },
  };
}
