import { describe, expect, it } from 'vitest';
import examples from '../../fixtures/references/heat-examples.json' with { type: 'json' };
import { naturalConvectionWPerM2K } from '~/lib/thermal/room-film';
import { type Body } from '~/lib/thermal/body';
import { BOUNDLESS_J_PER_K, bodyWith, chamberWith, fire, lastNodeC, leg, slab } from './thermal-rig';

function example(id: string): {
  inputs: Record<string, number>;
  expected: Record<string, number>;
  tolerance: number;
  name: string;
} {
  const found = examples.cases.find((one) => one.id === id);
  if (found === undefined) throw new RangeError(id);
  const tolerance =
    (found.tolerance as { relative?: number; kelvin?: number }).relative ??
    (found.tolerance as { kelvin?: number }).kelvin ??
    0;
  return {
    inputs: found.inputs as unknown as Record<string, number>,
    expected: found.expected as unknown as Record<string, number>,
    tolerance,
    name: `${found.name}: ${found.source}`,
  };
}

/** Moment at which a body passes a temperature while its surroundings stay as they are, s. */
function timeToC(body: Body, aroundC: number, targetC: number, withinS: number): number {
  const chamber = chamberWith([body], { startC: aroundC, ownJPerK: BOUNDLESS_J_PER_K });
  const rising = targetC > lastNodeC(body);
  let [beforeS, beforeC] = [0, lastNodeC(body)];
  let foundS = NaN;
  fire(
    chamber,
    [leg(aroundC, 100, withinS)],
    {
      step: (atS) => {
        const nowC = lastNodeC(body);
        if (Number.isNaN(foundS) && (rising ? nowC >= targetC : nowC <= targetC)) {
          foundS = beforeS + ((atS - beforeS) * (targetC - beforeC)) / (nowC - beforeC);
        }
        [beforeS, beforeC] = [atS, nowC];
      },
    },
    { toleranceC: 1, mostS: 600, fixedS: withinS / 2000 },
  );
  return foundS;
}

const get = (figures: Record<string, number>, key: string): number => figures[key] ?? NaN;

describe(examples.title, () => {
  const bead = example('T1');
  it(bead.name, () => {
    const { inputs, expected, tolerance } = bead;
    const rhoC = get(inputs, 'rho') * get(inputs, 'c');
    // A lump whose volume over area gives the time constant of 1 s.
    const depthM = (get(inputs, 'tauS') * get(inputs, 'h')) / rhoC;
    const body = bodyWith(
      slab({
        thicknessM: depthM,
        k: 20,
        rhoC,
        startC: get(inputs, 'fromC'),
        cells: 0,
        filmWPerM2K: get(inputs, 'h'),
      }),
    );
    const tookS = timeToC(body, get(inputs, 'gasC'), get(inputs, 'toC'), 8);
    expect(Math.abs(tookS / get(expected, 't_s') - 1)).toBeLessThanOrEqual(tolerance);
  });

  const panel = example('T3');
  it(panel.name, () => {
    const { inputs, expected, tolerance } = panel;
    // Both faces exchange heat: half the thickness, one face.
    const panelAt = (startC: number, filmWPerM2K: number): Body =>
      bodyWith(
        slab({
          thicknessM: get(inputs, 'thicknessM') / 2,
          k: 177,
          rhoC: get(inputs, 'rho') * get(inputs, 'c'),
          startC,
          cells: 0,
          filmWPerM2K,
          exchange: get(inputs, 'eps'),
        }),
      );
    const toCureS = timeToC(
      panelAt(get(inputs, 'startC'), get(inputs, 'heatH')),
      get(inputs, 'heatC'),
      get(inputs, 'cureC'),
      300,
    );
    expect(Math.abs(toCureS / get(expected, 'toCure_s') - 1)).toBeLessThanOrEqual(tolerance);
    const cured = panelAt(get(inputs, 'startC'), get(inputs, 'heatH'));
    fire(
      chamberWith([cured], { startC: get(inputs, 'heatC') }),
      [leg(get(inputs, 'heatC'), 100, toCureS + get(inputs, 'cureS'))],
      {},
    );
    const endC = lastNodeC(cured);
    expect(Math.abs(endC / get(expected, 'endCure_C') - 1)).toBeLessThanOrEqual(tolerance);
    const coolS = timeToC(
      panelAt(endC, get(inputs, 'coolH')),
      get(inputs, 'coolC'),
      get(inputs, 'safeC'),
      1200,
    );
    const totalS = toCureS + get(inputs, 'cureS') + coolS;
    expect(Math.abs(totalS / get(expected, 'total_s') - 1)).toBeLessThanOrEqual(tolerance);
  });

  const pipe = example('T4');
  it(pipe.name, () => {
    const { inputs, expected, tolerance } = pipe;
    const body = bodyWith(
      slab({
        thicknessM: get(inputs, 'thicknessM'),
        k: get(inputs, 'k'),
        rhoC: get(inputs, 'rho') * get(inputs, 'c'),
        startC: get(inputs, 'startC'),
        cells: 12,
        filmWPerM2K: get(inputs, 'h'),
      }),
    );
    fire(
      chamberWith([body], { startC: get(inputs, 'oilC') }),
      [leg(get(inputs, 'oilC'), 100, get(inputs, 't_s'))],
      {},
    );
    expect(Math.abs(lastNodeC(body) - get(expected, 'insulated_C'))).toBeLessThanOrEqual(tolerance);
    expect(Math.abs((body.tempC[0] ?? NaN) - get(expected, 'heated_C'))).toBeLessThanOrEqual(tolerance);
  });

  const brass = example('T9');
  it(brass.name, () => {
    const { inputs, expected, tolerance } = brass;
    const body = bodyWith(
      slab({
        thicknessM: get(inputs, 'thicknessM') / 2,
        k: get(inputs, 'k'),
        rhoC: get(inputs, 'rho') * get(inputs, 'c'),
        startC: get(inputs, 'startC'),
        cells: 12,
        filmWPerM2K: get(inputs, 'h'),
      }),
    );
    fire(
      chamberWith([body], { startC: get(inputs, 'ovenC') }),
      [leg(get(inputs, 'ovenC'), 100, get(inputs, 't_s'))],
      {},
    );
    expect(Math.abs((body.tempC[0] ?? NaN) - get(expected, 'surface_C'))).toBeLessThanOrEqual(tolerance);
  });

  const screen = example('W5');
  it(screen.name, () => {
    const { inputs, expected, tolerance } = screen;
    const film = naturalConvectionWPerM2K(
      get(inputs, 'surfaceC'),
      get(inputs, 'roomC'),
      get(inputs, 'heightM'),
    );
    const heatW = film * get(inputs, 'areaM2') * (get(inputs, 'surfaceC') - get(inputs, 'roomC'));
    expect(Math.abs(heatW / get(expected, 'convected_W') - 1)).toBeLessThanOrEqual(tolerance);
  });
});
