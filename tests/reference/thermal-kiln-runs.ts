import lumped from '../../fixtures/references/heat-lumped.json' with { type: 'json' };
import steadyWall from '../../fixtures/references/heat-steady-wall.json' with { type: 'json' };
import type { Body } from '~/lib/thermal/body';
import { J_PER_KWH, KELVIN_AT_0_C } from '~/lib/thermal/constants';
import { LINING_GRID } from '~/lib/thermal/resolve-kiln';
import type { BodyProperties, LayerProperties } from '~/lib/thermal/properties';
import {
  BOUNDLESS_J_PER_K,
  bodyWith,
  chamberWith,
  fire,
  lastNodeC,
  leg,
  slab,
  type Spoil,
} from './thermal-rig';

/** Each run gives its worst deviation from the reference as a share of the tolerance beside it: 1 is the bar. */

const caseOf = <T extends { id: string }>(cases: readonly T[], id: string): T => {
  const found = cases.find((one) => one.id === id);
  if (found === undefined) throw new RangeError(id);
  return found;
};

/** A wall of 1 m² with next to no heat capacity: 2.5 W/K from chamber to room, half of the resistance in its film. */
const weightlessWall = (uaWPerK: number, spoil: Spoil): Body =>
  bodyWith(
    {
      ...slab({ thicknessM: 1, k: 2 * uaWPerK, rhoC: 1, startC: 20, cells: 2, filmWPerM2K: 0 }),
      face: { kind: 'held' },
      far: { kind: 'room', ambientC: 20, film: 2 * uaWPerK },
    },
    spoil,
  );

/** H3: full power from cold; the time to each temperature. */
export function fullPowerRun(spoil: Spoil = {}): number {
  const { inputs, rows, tolerance } = caseOf(lumped.cases, 'H3-lumped-full-power');
  const chamber = chamberWith([weightlessWall(inputs.UA_W_K ?? NaN, spoil)], {
    startC: 20,
    ownJPerK: (inputs.C_J_K ?? NaN) * (spoil.capacity ?? 1),
    powerW: (inputs.P_W ?? NaN) * (spoil.power ?? 1),
  });
  const arrivedS: number[] = [];
  fire(
    chamber,
    rows.map(([toC]) => leg(Number(toC), 'flat-out', 0)),
    { arrived: (i, atS) => (arrivedS[i] = atS) },
  );
  const off = rows.map((row, i) => Math.abs((arrivedS[i] ?? NaN) / Number(row[1]) - 1));
  return Math.max(...off) / tolerance.relative;
}

/** H3b: a ramp until the power saturates; time, energy drawn and energy lost when the target is reached. */
export function powerLimitedRun(spoil: Spoil = {}): number {
  const { inputs, rows, tolerance } = caseOf(lumped.cases, 'H3b-power-limited-ramp');
  const off = rows.map((row) => {
    const [rampKPerH, targetC, timeS, , , drawnKWh, lostKWh] = row.map((value) =>
      typeof value === 'number' ? value : NaN,
    );
    const chamber = chamberWith([weightlessWall(inputs.UA_W_K ?? NaN, spoil)], {
      startC: 20,
      ownJPerK: (inputs.C_J_K ?? NaN) * (spoil.capacity ?? 1),
      powerW: (inputs.P_W ?? NaN) * (spoil.power ?? 1),
    });
    let got: number[] = [];
    fire(chamber, [leg(targetC ?? NaN, rampKPerH ?? NaN, 36000)], {
      arrived: (_i, atS) => {
        got = [atS, chamber.booked.inputJ / J_PER_KWH, chamber.booked.farJ / J_PER_KWH];
      },
    });
    return Math.max(
      ...[timeS, drawnKWh, lostKWh].map((value, i) => Math.abs((got[i] ?? NaN) / (value ?? NaN) - 1)),
    );
  });
  return Math.max(...off) / tolerance.relative;
}

/** H3d: a lump that only radiates to a cold chamber; deviation in time, by the slope at that temperature. */
export function radiativeCoolingRun(spoil: Spoil = {}): number {
  const { inputs, rows, tolerance } = caseOf(lumped.cases, 'H3d-radiation-only-cooling');
  const [heatJPerK, areaM2, startK, roomK] = [
    inputs.rhoVc_J_K,
    inputs.epsA_m2,
    inputs.Ti_K,
    inputs.Tsur_K,
  ].map(Number) as [number, number, number, number];
  const properties: BodyProperties = {
    ...slab({
      thicknessM: 1,
      k: 1,
      rhoC: heatJPerK / areaM2,
      startC: startK - KELVIN_AT_0_C,
      cells: 0,
      filmWPerM2K: 0,
      exchange: 1,
    }),
    area: [areaM2, 0, 0],
  };
  const body = bodyWith(properties, spoil);
  const chamber = chamberWith([body], { startC: roomK - KELVIN_AT_0_C, ownJPerK: BOUNDLESS_J_PER_K });
  const momentsS = rows.map((row) => Number(row[1]));
  const off: number[] = [];
  fire(
    chamber,
    momentsS.map((s, i) => leg(chamber.tempC, 100, s - (momentsS[i - 1] ?? 0))),
    {
      ended: (i, atS) => {
        const expectedK = Number(rows[i]?.[0]);
        const slopeKPerS = (areaM2 * 5.670374419e-8 * (expectedK ** 4 - roomK ** 4)) / heatJPerK;
        off.push(Math.abs(lastNodeC(body) + KELVIN_AT_0_C - expectedK) / slopeKPerS / atS);
      },
    },
  );
  return Math.max(...off) / tolerance.relative;
}

const layer = (thicknessM: number, k: number): LayerProperties => ({
  thicknessM,
  densityKgPerM3: 100,
  conductivityWPerMK: k,
  heatCapacityJPerKgK: 1000,
});

function steady(
  layers: LayerProperties[],
  far: BodyProperties['far'],
  hotC: number,
  spoil: Spoil,
): { fluxWPerM2: number; body: Body } {
  const body = bodyWith(
    {
      ...slab({ thicknessM: 1, k: 1, rhoC: 1, startC: 20, cells: 1, filmWPerM2K: 0 }),
      layers,
      grid: LINING_GRID,
      face: { kind: 'held' },
      far,
    },
    spoil,
  );
  const chamber = chamberWith([body], { startC: hotC });
  fire(chamber, [leg(hotC, 100, 10 * 24 * 3600)], {});
  return { fluxWPerM2: chamber.trial.endHeatW, body };
}

/** H9: two layers to still air, natural convection and radiation outside; flux, and outer face above the room. */
export function steadyWallRun(spoil: Spoil = {}): number {
  const reference = caseOf(steadyWall.cases, 'H9-steady-multilayer-natconv-rad');
  const off = (reference.rows ?? []).map(([hotC = NaN, outerC = NaN, flux = NaN]) => {
    const { fluxWPerM2, body } = steady(
      [layer(0.065, 0.27), layer(0.05, 0.09)],
      { kind: 'room', ambientC: 20, film: { emissivity: 0.85, heightM: 0.6 } },
      hotC,
      spoil,
    );
    return Math.max(Math.abs(fluxWPerM2 / flux - 1), Math.abs((lastNodeC(body) - 20) / (outerC - 20) - 1));
  });
  return Math.max(...off) / reference.tolerance.relative;
}

const M_PER_INCH = 0.0254;
const W_PER_MK_PER_BTU_FT = 1.730735;
const W_PER_M2_PER_BTU_FT2 = 3.154591;
const toC = (tempF: number): number => (tempF - 32) / 1.8;

/** H13: Kern's oven wall, cold face held at 125 °F; flux, and both interfaces above the cold face. */
export function ovenWallRun(spoil: Spoil = {}): number {
  const reference = caseOf(steadyWall.cases, 'H13-Kern-2.2');
  const { inputs, published, tolerance } = reference;
  const layersIn = inputs.layers_in_k_Btu_hft2F_per_ft ?? [];
  const [hotC, coldC] = [toC(inputs.Thot_F ?? NaN), toC(inputs.Tcold_F ?? NaN)];
  const layers = layersIn.map(([inches = NaN, k = NaN]) =>
    layer(inches * M_PER_INCH, k * W_PER_MK_PER_BTU_FT),
  );
  const { fluxWPerM2, body } = steady(layers, { kind: 'room', ambientC: coldC, film: 1e7 }, hotC, spoil);
  const expected = published?.interfaces_F ?? [];
  const depthsM = [
    layers[0]?.thicknessM ?? NaN,
    (layers[0]?.thicknessM ?? NaN) + (layers[1]?.thicknessM ?? NaN),
  ];
  const off = expected.map((tempF, i) => {
    const node = body.grid.depthM.findIndex((depthM) => Math.abs(depthM - (depthsM[i] ?? NaN)) < 1e-9);
    return Math.abs(((body.tempC[node] ?? NaN) - toC(tempF)) / (hotC - coldC));
  });
  off.push(Math.abs(fluxWPerM2 / ((published?.q_Btu_h_ft2 ?? NaN) * W_PER_M2_PER_BTU_FT2) - 1));
  return Math.max(...off) / tolerance.relative;
}
