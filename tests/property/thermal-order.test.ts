import { describe, expect, it } from 'vitest';
import { electricFiring } from '~/lib/thermal/available-heat';
import { bodyOf } from '~/lib/thermal/body';
import { chamberOf } from '~/lib/thermal/chamber';
import { takeStep, tryHeld, tryPowered } from '~/lib/thermal/chamber-step';
import { waterKgOf } from '~/lib/thermal/mould-recorder';
import type { BodyProperties } from '~/lib/thermal/properties';

/** A slab that meets the chamber by film and radiation; properties do not vary, so that the problem is smooth. */
const wall = (cells: number): BodyProperties => ({
  layers: [{ thicknessM: 0.04, densityKgPerM3: 1700, conductivityWPerMK: 0.8, heatCapacityJPerKgK: 1000 }],
  area: [1, 0, 0],
  grid: { kind: 'even', cells },
  face: { kind: 'film', convectionWPerM2K: 10, exchangeFactor: 0.6 },
  far: { kind: 'insulated' },
  startC: 20,
  water: null,
  reactions: [],
  count: 1,
});

/** A smooth chamber: cosine from 20 to 820 °C in two hours. */
const chamberC = (atS: number): number => 420 - 400 * Math.cos((Math.PI * atS) / 7200);

function coreAfterHeld(cells: number, steps: number): number {
  const body = bodyOf(wall(cells));
  const chamber = chamberOf([body], electricFiring(1e9), { startC: 20, ambientC: 20, ownJPerK: 1e4 });
  const stepS = 7200 / steps;
  for (let i = 1; i <= steps; i++) {
    tryHeld(chamber, stepS, chamberC(i * stepS));
    takeStep(chamber);
  }
  return body.tempC[body.nodes - 1] ?? NaN;
}

/** Water that evaporates below boiling from a wall in a chamber that warms smoothly from 20 to 90 °C in three hours, kg. */
function driedBelowBoilingKg(steps: number): number {
  const water = { kgPerM3: 300, addedConductivityWPerMK: 0, dryLayerShare: 0.2 };
  const body = bodyOf({ ...wall(16), water });
  const settings = { startC: 20, ambientC: 20, ownJPerK: 1e4 };
  const chamber = { ...chamberOf([body], electricFiring(1e9), settings), airKgPerS: 1e-3 };
  const fullKg = waterKgOf(body);
  for (let i = 1; i <= steps; i++) {
    tryHeld(chamber, 10800 / steps, 55 - 35 * Math.cos((Math.PI * i) / steps));
    takeStep(chamber);
  }
  return fullKg - waterKgOf(body);
}

function chamberAfterPowered(steps: number): number {
  const body = bodyOf(wall(10));
  const chamber = chamberOf([body], electricFiring(12000), { startC: 20, ambientC: 20, ownJPerK: 2e4 });
  for (let i = 0; i < steps; i++) {
    tryPowered(chamber, 7200 / steps, Math.sin((Math.PI * (i + 0.5)) / steps) ** 2);
    takeStep(chamber);
  }
  return chamber.tempC;
}

/** log2 of how much smaller the change gets each time something is halved. */
function orders(values: number[]): number[] {
  const changes = values.slice(1).map((value, i) => Math.abs(value - (values[i] ?? NaN)));
  return changes.slice(1).map((change, i) => Math.log2((changes[i] ?? NaN) / change));
}

describe('on smooth problems the solver is of second order', () => {
  it('in the length of the step, the chamber held', () => {
    for (const order of orders([80, 160, 320, 640].map((steps) => coreAfterHeld(10, steps)))) {
      expect(order).toBeGreaterThan(1.7);
      expect(order).toBeLessThan(2.4);
    }
  });

  it('in the length of the step, the chamber found from the power', () => {
    for (const order of orders([160, 320, 640, 1280].map(chamberAfterPowered))) {
      expect(order).toBeGreaterThan(1.6);
      expect(order).toBeLessThan(2.4);
    }
  });

  it('in the size of the cells', () => {
    for (const order of orders([4, 8, 16, 32].map((cells) => coreAfterHeld(cells, 2000)))) {
      expect(order).toBeGreaterThan(1.8);
      expect(order).toBeLessThan(2.2);
    }
  });
});

describe('drying below boiling, whose front moves from node to node within a step,', () => {
  it('is of first order at least in the length of the step, and right within 1 % at ten minutes', () => {
    const dried = [18, 72, 288, 4608].map(driedBelowBoilingKg);
    const fineKg = dried.at(-1) ?? NaN;
    const errors = dried.slice(0, -1).map((kg) => Math.abs(kg / fineKg - 1));
    expect(errors[0]).toBeLessThan(0.01);
    for (let i = 1; i < errors.length; i++) expect(errors[i]).toBeLessThan((errors[i - 1] ?? NaN) / 4);
  });
});
