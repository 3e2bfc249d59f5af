import type { KeyboardEvent } from 'react';
import { dragCorner, dragHoldEnd, dragTarget, setSegment } from '~/lib/profile/edit';
import type { PlannedLeg } from '~/lib/profile/planned';
import type { Profile } from '~/lib/profile/schema';
import { cToF, fIntervalToC, formatTemperature, type UnitPreferences } from '~/lib/units';
import { durationText } from '../strip/duration';
import { Handle, reachesOf } from '../strip/Handle';
import type { StripScales } from '../strip/scales';
import { STAGE_NAMES } from './shown';

interface PlanHandlesProps {
  readonly scales: StripScales;
  readonly profile: Profile;
  readonly legs: readonly PlannedLeg[];
  readonly kilnRampsS: readonly (number | null)[];
  readonly kilnMaxC: number | null;
  readonly scale: UnitPreferences['temperature'];
  readonly selected: number | null;
  readonly onSelect: (index: number) => void;
  readonly onGrab: () => void;
  readonly onDrop: () => void;
  readonly onChange: (profile: Profile, key: string) => void;
  readonly onAdd: (index: number) => void;
  readonly onRemove: (index: number) => void;
}

const MINUTE_S = 60;

type Place = { timeS: number; tempC: number; fine: boolean };

function movedRampEnd(props: PlanHandlesProps, index: number, to: Place): Profile {
  const { profile, kilnMaxC, kilnRampsS, scale } = props;
  const limits = { kilnMaxC };
  const stepC = scale === 'F' ? fIntervalToC(1) : 1;
  const targeted = to.fine
    ? setSegment(profile, index, { toC: Math.round(to.tempC / stepC) * stepC }, limits)
    : dragTarget(profile, index, to.tempC, limits);
  if (typeof profile.segments[index]?.rateCPerH !== 'number') return targeted;
  return dragCorner(targeted, index, to.timeS, kilnRampsS);
}

function movedHoldEnd(props: PlanHandlesProps, index: number, leg: PlannedLeg, to: Place): Profile {
  if (!to.fine) return dragHoldEnd(props.profile, index, to.timeS, props.kilnRampsS);
  const holdS = Math.max(0, Math.round((to.timeS - leg.rampEndS) / MINUTE_S) * MINUTE_S);
  return setSegment(props.profile, index, { holdS });
}

/** Steps of the arrow keys on a corner: 5 degrees and 5 minutes or 5 degrees per hour; with Shift, one. */
function nudged(
  props: PlanHandlesProps,
  index: number,
  end: 'ramp' | 'hold',
  key: string,
  fine: boolean,
): Profile | null {
  const { profile, scale, kilnMaxC } = props;
  const segment = profile.segments[index];
  if (!segment) return null;
  const step = fine ? 1 : 5;
  const stepC = scale === 'F' ? fIntervalToC(step) : step;
  const limits = { kilnMaxC };
  if (key === 'ArrowUp' || key === 'ArrowDown')
    return setSegment(profile, index, { toC: segment.toC + (key === 'ArrowUp' ? stepC : -stepC) }, limits);
  if (key !== 'ArrowLeft' && key !== 'ArrowRight') return null;
  const later = key === 'ArrowRight' ? 1 : -1;
  if (end === 'hold') return setSegment(profile, index, { holdS: segment.holdS + later * step * MINUTE_S });
  if (typeof segment.rateCPerH !== 'number') return profile;
  return setSegment(profile, index, { rateCPerH: segment.rateCPerH - later * stepC });
}

/** Corners of the plan to take hold of: at the end of each ramp its target and rate, at the end of each hold its length. */
export function PlanHandles(props: PlanHandlesProps) {
  const { scales, legs, scale } = props;
  const upright = scales.flow === 'down';
  const ends = legs.flatMap((leg, index) => [
    { index, end: 'ramp' as const, timeS: leg.rampEndS },
    ...(leg.endS > leg.rampEndS ? [{ index, end: 'hold' as const, timeS: leg.endS }] : []),
  ]);
  const reaches = reachesOf(ends.map(({ index, timeS }) => scales.point(timeS, legs[index]?.toC ?? 0)));
  const turned: Readonly<Record<string, string>> = {
    ArrowUp: 'ArrowLeft',
    ArrowDown: 'ArrowRight',
    ArrowRight: 'ArrowUp',
    ArrowLeft: 'ArrowDown',
  };
  const onKey = (event: KeyboardEvent<SVGGElement>, index: number, end: 'ramp' | 'hold'): void => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const key = upright ? (turned[event.key] ?? event.key) : event.key;
    const next = nudged(props, index, end, key, event.shiftKey);
    if (next) props.onChange(next, `${index}.${end}.keys`);
    else if (event.key === 'Enter') props.onAdd(index);
    else if (event.key === 'Delete' || event.key === 'Backspace') props.onRemove(index);
    else return;
    event.preventDefault();
  };
  return (
    <g>
      {ends.map(({ index, end, timeS }, place) => {
        const leg = legs[index];
        if (!leg) return null;
        const stage = STAGE_NAMES[props.profile.segments[index]?.stage ?? 'drying'].toLowerCase();
        const after =
          end === 'ramp' ? `after ${durationText(timeS)}` : `held ${durationText(timeS - leg.rampEndS)}`;
        return (
          <Handle
            key={`${index} ${end}`}
            scales={scales}
            timeS={timeS}
            tempC={leg.toC}
            reachPx={reaches[place] ?? 0}
            name={`End of the ${end} of segment ${index + 1}, ${stage}`}
            valueNow={Math.round(scale === 'F' ? cToF(leg.toC) : leg.toC)}
            valueText={`${formatTemperature(leg.toC, scale)}${end === 'ramp' ? ' ' : ', '}${after}`}
            selected={props.selected === index}
            onFocus={() => props.onSelect(index)}
            onGrab={() => {
              props.onSelect(index);
              props.onGrab();
            }}
            onMove={(to) =>
              props.onChange(
                end === 'ramp' ? movedRampEnd(props, index, to) : movedHoldEnd(props, index, leg, to),
                `${index}.${end}.drag`,
              )
            }
            onDrop={props.onDrop}
            onKeyDown={(event) => onKey(event, index, end)}
          />
        );
      })}
    </g>
  );
}
