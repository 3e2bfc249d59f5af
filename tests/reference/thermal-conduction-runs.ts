import oneTerm from '../../fixtures/references/heat-one-term.json' with { type: 'json' };
import semiInfinite from '../../fixtures/references/heat-semi-infinite.json' with { type: 'json' };
import shellLag from '../../fixtures/references/heat-shell-lag.json' with { type: 'json' };
import stefan from '../../fixtures/references/heat-stefan.json' with { type: 'json' };
import wall from '../../fixtures/references/heat-wall.json' with { type: 'json' };
import wallStep from '../../fixtures/references/heat-wall-step.json' with { type: 'json' };
import { WATER_EVAPORATION_J_PER_KG } from '~/lib/thermal/constants';
import { LINING_GRID } from '~/lib/thermal/resolve-kiln';
import { waterKgOf } from '~/lib/thermal/mould-recorder';
import type { BodyProperties } from '~/lib/thermal/properties';
import {
  atDepthC,
  bodyWith,
  chamberWith,
  fire,
  lastNodeC,
  leg,
  PRESCRIBED_W_PER_M2K,
  slab,
  type Spoil,
  worstOfColumnRange,
} from './thermal-rig';

/** Each run gives its worst deviation from the reference as a share of the tolerance beside it: 1 is the bar. */

/** H1, H1b: hot face prescribed, cold face to air. Columns: flux in, middle, outer face, flux out, stored. */
export function wallRun(index: number, spoil: Spoil = {}): number {
  const reference = wall.cases[index];
  if (reference === undefined) throw new RangeError('no such wall');
  const { inputs, rows } = reference;
  const body = bodyWith(
    {
      layers: [
        {
          thicknessM: inputs.L_m / 2,
          densityKgPerM3: inputs.rho_kg_m3,
          conductivityWPerMK: inputs.k_W_mK,
          heatCapacityJPerKgK: inputs.cp_J_kgK,
        },
        {
          thicknessM: inputs.L_m / 2,
          densityKgPerM3: inputs.rho_kg_m3,
          conductivityWPerMK: inputs.k_W_mK,
          heatCapacityJPerKgK: inputs.cp_J_kgK,
        },
      ],
      area: [1, 0, 0],
      grid: LINING_GRID,
      face: { kind: 'held' },
      far: { kind: 'room', ambientC: inputs.Tambient_C, film: inputs.h_W_m2K },
      startC: inputs.Tinitial_C,
      water: null,
      reactions: [],
      count: 1,
    },
    spoil,
  );
  const chamber = chamberWith([body], { startC: inputs.Tinitial_C });
  let beforeS = 0;
  const segments = rows.map(([hours = 0, hotC = 0]) => {
    const spanS = hours * 3600 - beforeS;
    beforeS = hours * 3600;
    return hours <= inputs.rampEnd_h ? leg(hotC, inputs.ramp_K_h, 0) : leg(hotC, inputs.ramp_K_h, spanS);
  });
  const computed: number[][] = [];
  fire(chamber, segments, {
    ended: (_i, atS) => {
      const outerC = lastNodeC(body);
      computed.push([
        atS / 3600,
        chamber.tempC,
        chamber.trial.endHeatW,
        atDepthC(body, inputs.L_m / 2),
        outerC,
        inputs.h_W_m2K * (outerC - inputs.Tambient_C),
        chamber.booked.heatJ - chamber.booked.farJ,
      ]);
    },
  });
  return worstOfColumnRange(rows, computed, [2, 3, 4, 5, 6]) / reference.tolerance.ofColumnRange;
}

/** H2: an 8 mm shell wall, both faces ramped; steady lag of one-sided heating, and the lag on its way there. */
export function shellLagRun(spoil: Spoil = {}): number {
  const reference = shellLag.cases[0];
  if (reference === undefined) throw new RangeError('no case');
  const { inputs, tolerance } = reference;
  const rows = reference.rows.map((row) => row.map(Number));
  const [k, rhoC, thicknessM] = [
    inputs.k_W_mK ?? NaN,
    (inputs.rho_kg_m3 ?? NaN) * (inputs.cp_J_kgK ?? NaN),
    inputs.thickness_m ?? NaN,
  ];
  const atS = [10, 20, 30, 60, 120, 300];
  const computed = rows.map((row) => {
    const rampKPerH = Number(row[0]);
    const lagAfter = (depthM: number, momentsS: number[]): number[] => {
      const body = bodyWith(
        slab({
          thicknessM: depthM,
          k,
          rhoC,
          startC: 20,
          cells: 12,
          filmWPerM2K: PRESCRIBED_W_PER_M2K,
        }),
        spoil,
      );
      const lags: number[] = [];
      let fromS = 0;
      const segments = momentsS.map((s) => {
        fromS = s;
        return leg(20 + (rampKPerH * fromS) / 3600, rampKPerH, 0);
      });
      const chamber = chamberWith([body], { startC: 20 });
      fire(
        chamber,
        segments,
        { ended: () => lags.push(chamber.tempC - lastNodeC(body)) },
        { toleranceC: 0.02, mostS: 600, fixedS: null },
      );
      return lags;
    };
    const twoSided = lagAfter(thicknessM / 2, [...atS, 3600]);
    const oneSided = lagAfter(thicknessM, [7200]);
    return [rampKPerH, twoSided[6] ?? NaN, oneSided[0] ?? NaN, ...twoSided.slice(0, 6)];
  });
  return worstOfColumnRange(rows, computed, [1, 2, 3, 4, 5, 6, 7, 8]) / (tolerance.ofColumnRange ?? NaN);
}

/** H2b: lag of wall and cylinder behind an ambient that is ramped, film included. Spheres are no shape of ours. */
export function lagShapesRun(spoil: Spoil = {}): number {
  const reference = shellLag.cases[1];
  if (reference === undefined) throw new RangeError('no lag shapes');
  const rampKPerH = 150;
  const k = 0.8;
  const rhoC = k / 4.7058823529411767e-7;
  const worst = reference.rows
    .map(([shape, depth, biot, toAmbient, toSurface]) => ({
      shape,
      depthM: Number(depth),
      biot: Number(biot),
      expected: [Number(toAmbient), Number(toSurface)],
    }))
    .filter(({ shape, depthM, biot }) => shape !== 'sphere' && !(depthM === 0.05 && biot < 1))
    .map(({ shape, depthM, biot, expected }) => {
      const plain = slab({
        thicknessM: depthM,
        k,
        rhoC,
        startC: 20,
        cells: 10,
        filmWPerM2K: Math.min(1e9, (biot * k) / depthM),
      });
      const properties: BodyProperties =
        shape === 'plane wall' ? plain : { ...plain, area: [2 * Math.PI * depthM, -2 * Math.PI, 0] };
      const body = bodyWith(properties, spoil);
      const chamber = chamberWith([body], { startC: 20 });
      const settledS = ((12 * depthM ** 2 * rhoC) / k) * (1 + 2 / biot);
      const toC = 20 + (rampKPerH * settledS) / 3600;
      // Beyond 2300 °C the table of properties ends; these run on constant ones.
      fire(chamber, [leg(toC, rampKPerH, 0)], {});
      const core = lastNodeC(body);
      const got = [chamber.tempC - core, (body.tempC[0] ?? NaN) - core];
      return Math.max(...expected.map((value, i) => Math.abs((got[i] ?? NaN) / value - 1)));
    });
  return Math.max(...worst) / (reference.tolerance.relative ?? NaN);
}

/** H4: semi-infinite solid, as a slab 1 m deep, under four conditions at its face. */
export function semiInfiniteRun(column: 'Ts' | 'flux' | 'film' | 'ramp', spoil: Spoil = {}): number {
  const [reference] = semiInfinite.cases;
  if (reference === undefined) throw new RangeError('no case');
  const { inputs, rows, tolerance } = reference;
  const k = inputs.k_W_mK;
  const edgesM = [0, 0.005, 0.02, 0.05, 0.1, 1];
  const prescribed = column === 'Ts' || column === 'ramp' || column === 'flux';
  const body = bodyWith(
    {
      ...slab({
        thicknessM: 1,
        k,
        rhoC: k / inputs.alpha_m2_s,
        startC: inputs.Ti_C,
        cells: 1,
        filmWPerM2K: prescribed ? 1e6 : inputs.h_W_m2K,
      }),
      layers: edgesM.slice(1).map((edgeM, i) => ({
        thicknessM: edgeM - (edgesM[i] ?? 0),
        densityKgPerM3: k / inputs.alpha_m2_s / 1000,
        conductivityWPerMK: k,
        heatCapacityJPerKgK: 1000,
      })),
      grid: { kind: 'graded', firstM: 0.0006, growth: 0.06 },
    },
    spoil,
  );
  const momentsS = [60, 600, 3600, 14400];
  const spansS = momentsS.map((s, i) => s - (momentsS[i - 1] ?? 0));
  const startC = column === 'Ts' || column === 'film' ? inputs.Ts_C : inputs.Ti_C;
  const segments = {
    Ts: spansS.map((s) => leg(startC, 100, s)),
    film: spansS.map((s) => leg(startC, 100, s)),
    flux: spansS.map((s) => leg(2200, 1e12, s)),
    ramp: momentsS.map((s) => leg(inputs.Ti_C + (inputs.ramp_K_h * s) / 3600, inputs.ramp_K_h, 0)),
  }[column];
  const chamber = chamberWith([body], {
    startC,
    ownJPerK: 1,
    powerW: column === 'flux' ? inputs.q_W_m2 : 1e12,
  });
  const computed: number[][] = [];
  fire(chamber, segments, {
    ended: () => {
      for (const depthM of edgesM.slice(0, 5)) computed.push([0, 0, 0, 0, 0, 0].fill(atDepthC(body, depthM)));
    },
  });
  const at = { Ts: 2, flux: 3, film: 4, ramp: 5 }[column];
  return worstOfColumnRange(rows, computed, [at]) / tolerance.ofColumnRange;
}

/** H6: plane wall after a step of the ambient, by Biot and Fourier number. */
export function wallStepRun(spoil: Spoil = {}): number {
  const [reference] = wallStep.cases;
  if (reference === undefined) throw new RangeError('no case');
  const { rows, tolerance } = reference;
  const [k, depthM, rhoC] = [1, 0.05, 2e6];
  const computed: number[][] = [];
  for (const biot of [0.1, 1, 10]) {
    const body = bodyWith(
      slab({ thicknessM: depthM, k, rhoC, startC: 20, cells: 20, filmWPerM2K: (biot * k) / depthM }),
      spoil,
    );
    const chamber = chamberWith([body], { startC: 1020 });
    const fouriers = rows.filter((row) => row[0] === biot).map((row) => Number(row[1]));
    const perFourierS = (depthM ** 2 * rhoC) / k;
    const segments = fouriers.map((fo, i) => leg(1020, 100, (fo - (fouriers[i - 1] ?? 0)) * perFourierS));
    fire(chamber, segments, {
      ended: (i) => {
        const theta = (tempC: number): number => (1020 - tempC) / 1000;
        computed.push([
          biot,
          fouriers[i] ?? NaN,
          theta(lastNodeC(body)),
          theta(body.tempC[0] ?? NaN),
          chamber.booked.heatJ / (depthM * rhoC * 1000),
        ]);
      },
    });
  }
  return worstOfColumnRange(rows, computed, [2, 3, 4]) / tolerance.ofColumnRange;
}

/** H5: decay of the middle of a wall or a cylinder after a step: ζ1 from two late moments, then C1. Spheres are no shape of ours. */
export function oneTermRun(shape: 'wall' | 'cylinder', spoil: Spoil = {}): number {
  const [reference] = oneTerm.cases;
  if (reference === undefined) throw new RangeError('no case');
  const [k, depthM, rhoC] = [1, 0.05, 2e6];
  // Late enough for the second term to be below 1e-4 of the first.
  const [earlyFo, lateFo] = [1, 1.5];
  const perFourierS = (depthM ** 2 * rhoC) / k;
  const worst = reference.rows.map(([biot = NaN, ...coefficients]) => {
    const wall = slab({
      thicknessM: depthM,
      k,
      rhoC,
      startC: 20,
      cells: 20,
      filmWPerM2K: (biot * k) / depthM,
    });
    const area: BodyProperties['area'] =
      shape === 'wall' ? wall.area : [2 * Math.PI * depthM, -2 * Math.PI, 0];
    const body = bodyWith({ ...wall, area }, spoil);
    const theta: number[] = [];
    fire(
      chamberWith([body], { startC: 1020 }),
      [leg(1020, 100, earlyFo * perFourierS), leg(1020, 100, (lateFo - earlyFo) * perFourierS)],
      { ended: () => theta.push((1020 - lastNodeC(body)) / 1000) },
      { toleranceC: 1, mostS: 600, fixedS: perFourierS / 2000 },
    );
    const [early = NaN, late = NaN] = theta;
    const zeta = Math.sqrt(Math.log(early / late) / (lateFo - earlyFo));
    const first = early * Math.exp(zeta ** 2 * earlyFo);
    const [zetaTrue = NaN, firstTrue = NaN] = shape === 'wall' ? coefficients : coefficients.slice(2);
    return Math.max(Math.abs(zeta / zetaTrue - 1), Math.abs(first / firstTrue - 1));
  });
  return Math.max(...worst) / reference.tolerance.relative;
}

/** H11: the dry front moving into a wet slab held at 100 °C, its depth read from the water that is gone. */
export function stefanRun(spoil: Spoil = {}): number {
  const [reference] = stefan.cases;
  if (reference === undefined) throw new RangeError('no case');
  const [k, rhoC, depthM] = [1, 1e6, 0.05];
  const perSteK = 100;
  const waterKgPerM3 = (rhoC * perSteK) / WATER_EVAPORATION_J_PER_KG;
  const worst = reference.rows.map(([ste = NaN, lambda = NaN]) => {
    const body = bodyWith(
      slab({
        thicknessM: depthM,
        k,
        rhoC,
        startC: 100,
        cells: 160,
        filmWPerM2K: PRESCRIBED_W_PER_M2K,
        waterKgPerM3,
      }),
      spoil,
    );
    const chamber = chamberWith([body], { startC: 100 + ste * perSteK });
    const frontM = depthM / 2;
    const lengthS = ((frontM / (2 * lambda)) ** 2 * rhoC) / k;
    const fullKg = waterKgOf(body);
    fire(chamber, [leg(chamber.tempC, 100, lengthS)], {});
    return Math.abs(((1 - waterKgOf(body) / fullKg) * depthM) / frontM - 1);
  });
  return Math.max(...worst) / reference.tolerance.relative;
}
