import type { Caution } from '../estimate-schema';
import { type CautionRule, type FiringView, type MouldView } from './view';

/**
 * Share of E·α·ΔT/(1−ν) that pulls at the middle of a wall heated from outside, for the parabola that a steady ramp
 * makes: mean minus middle. Slab 1/3, long cylinder 1/2 (Timoshenko and Goodier, Theory of Elasticity, thermal stress).
 */
const MIDDLE_SHARE = { shell: 1 / 3, flask: 1 / 2 } as const;

/** Below it a shell or block has its green strength only. */
const FIRED_FROM_C = 600;

/**
 * Strengths are recalled and scatter by half, and flasks fired by published schedules go through several times this
 * difference unharmed while their core dries: a note, well above it a warning, never a stop.
 */
const WARN_RATIO = 3;

/**
 * Difference between outside and middle at which the middle is pulled as hard as it is strong, °C.
 *
 * ΔT = σ(1−ν)/(s·E·α), s from {@link MIDDLE_SHARE}.
 */
export function crackingDifferenceC(mould: MouldView, coreC: number): number | null {
  const strength = mould.value(coreC < FIRED_FROM_C ? 'greenStrengthPa' : 'firedStrengthPa');
  const young = mould.value('youngPa');
  const expansion = mould.value('expansionPerK');
  const poisson = mould.value('poissonRatio');
  if (strength === null || young === null || expansion === null || poisson === null) return null;
  return (
    (strength.value * (1 - poisson.value)) / (MIDDLE_SHARE[mould.mould.form] * young.value * expansion.value)
  );
}

export const tooSteepByStress: CautionRule = (view) => view.moulds.flatMap((mould) => stressOf(mould, view));

function stressOf(mould: MouldView, { simulation, words }: FiringView): Caution[] {
  const { surfaceC, coreC } = mould.trace;
  let worst = 0;
  let worstAt = -1;
  let first = -1;
  for (let at = 0; at < surfaceC.length; at += 1) {
    const outside = surfaceC[at] ?? NaN;
    const inside = coreC[at] ?? NaN;
    const allowed = crackingDifferenceC(mould, inside);
    if (allowed === null) return [];
    const ratio = (outside - inside) / allowed;
    if (ratio >= 1 && first === -1) first = at;
    if (ratio > worst) [worst, worstAt] = [ratio, at];
  }
  if (first === -1) return [];
  const differenceC = (surfaceC[worstAt] ?? NaN) - (coreC[worstAt] ?? NaN);
  return [
    {
      code: 'too-steep-for-wall',
      severity: worst >= WARN_RATIO ? 'warn' : 'note',
      segment: simulation.segmentAt[first] ?? null,
      atS: simulation.timeS[first] ?? null,
      text: `${mould.name} is ${words.difference(differenceC)} hotter outside than inside. From about ${words.difference(differenceC / worst)} on it may crack.`,
      source:
        'Thermal stress at the middle of the wall, E·α·ΔT/(1−ν) by shape, against its strength; strengths recalled, good to about half',
    },
  ];
}
