import type { PlannedLeg } from '~/lib/profile/planned';
import { PROFILE_LIMITS, STAGES, stageSchema, type Segment } from '~/lib/profile/schema';
import {
  formatRate,
  formatTemperature,
  parseDuration,
  parseTemperature,
  type UnitPreferences,
} from '~/lib/units';
import { durationText } from '../strip/duration';
import { QuantityInput } from './QuantityInput';
import {
  degreesText,
  degreeUnit,
  parseRamp,
  rampArrow,
  rateNumber,
  rateUnit,
  STAGE_NAMES,
  type TypedRamp,
} from './shown';

export type RampsAs = 'rate' | 'time';

/** What a card may do to its own segment. `key` joins changes of one field into one step of undo. */
export interface SegmentEdits {
  set(change: Partial<Segment>, key?: string): void;
  setRampS(rampS: number): void;
}

export interface SegmentFieldProps {
  readonly index: number;
  readonly segment: Segment;
  readonly leg: PlannedLeg;
  readonly scale: UnitPreferences['temperature'];
  readonly rampsAs: RampsAs;
  readonly kilnMaxC: number | null;
  readonly edits: SegmentEdits;
}

type Understood<T extends { ok: boolean }> = Extract<T, { ok: true }> extends { value: infer V } ? V : never;

export function StageField({ segment, edits, index }: SegmentFieldProps) {
  return (
    <select
      className="card-stage"
      aria-label={`Stage of segment ${index + 1}`}
      data-field="stage"
      value={segment.stage}
      onChange={(event) => edits.set({ stage: stageSchema.parse(event.currentTarget.value) })}
    >
      {STAGES.map((stage) => (
        <option key={stage} value={stage}>
          {STAGE_NAMES[stage]}
        </option>
      ))}
    </select>
  );
}

function rampShown(props: SegmentFieldProps): { text: string; unit: string | undefined } {
  const { segment, leg, rampsAs, scale } = props;
  if (segment.rateCPerH === 'coast') return { text: 'coast', unit: undefined };
  if (segment.rateCPerH === 'flat-out') return { text: 'flat out', unit: undefined };
  if (rampsAs === 'time' && leg.rampEndS > leg.startS)
    return { text: durationText(leg.rampEndS - leg.startS), unit: undefined };
  return { text: rateNumber(segment.rateCPerH, scale), unit: rateUnit(scale) };
}

export function RampField(props: SegmentFieldProps) {
  const { leg, scale, rampsAs, edits, index } = props;
  const shown = rampShown(props);
  const words = (ramp: Understood<TypedRamp>): string =>
    'rate' in ramp ? formatRate(ramp.rate, scale).replace('-', ' ') : durationText(ramp.rampS);
  return (
    <span className="card-ramp">
      <span className="card-arrow" aria-hidden="true">
        {rampArrow(leg.fromC, leg.toC)}
      </span>
      <QuantityInput
        label={`${rampsAs === 'rate' ? 'Rate' : 'Time of the ramp'} of segment ${index + 1}`}
        field="ramp"
        text={shown.text}
        unit={shown.unit}
        parse={(typed) => parseRamp(typed, rampsAs, scale)}
        understood={words}
        onCommit={(ramp) =>
          'rate' in ramp ? edits.set({ rateCPerH: ramp.rate }, `${index}.ramp`) : edits.setRampS(ramp.rampS)
        }
      />
    </span>
  );
}

/** Reads a target and says what is wrong with it before it is taken. */
export function parseTarget(typed: string, scale: UnitPreferences['temperature'], kilnMaxC: number | null) {
  const found = parseTemperature(typed, scale);
  if (!found.ok) return found;
  const highestC = Math.min(PROFILE_LIMITS.maxC, kilnMaxC ?? Infinity);
  if (found.value > highestC)
    return {
      ok: false as const,
      issue: `${formatTemperature(found.value, scale)} is above the ${kilnMaxC === highestC ? "kiln's limit" : 'limit'} of ${formatTemperature(highestC, scale)}.`,
    };
  if (found.value < PROFILE_LIMITS.minC)
    return {
      ok: false as const,
      issue: `The lowest target is ${formatTemperature(PROFILE_LIMITS.minC, scale)}.`,
    };
  return found;
}

export function TargetField({ segment, scale, kilnMaxC, edits, index }: SegmentFieldProps) {
  return (
    <QuantityInput
      label={`Target of segment ${index + 1}`}
      field="target"
      text={degreesText(segment.toC, scale)}
      unit={degreeUnit(scale)}
      parse={(typed) => parseTarget(typed, scale, kilnMaxC)}
      understood={(tempC) => formatTemperature(tempC, scale, Number.isInteger(tempC) ? 0 : 1)}
      onCommit={(toC) => edits.set({ toC }, `${index}.target`)}
    />
  );
}

export function parseHold(typed: string) {
  const found = parseDuration(typed, 'min');
  if (found.ok && found.value > PROFILE_LIMITS.maxHoldS)
    return { ok: false as const, issue: 'A hold lasts 7 days at most.' };
  return found;
}

export function HoldField({ segment, edits, index }: SegmentFieldProps) {
  return (
    <QuantityInput
      label={`Hold of segment ${index + 1}`}
      field="hold"
      text={durationText(segment.holdS)}
      parse={parseHold}
      understood={durationText}
      onCommit={(holdS) => edits.set({ holdS }, `${index}.hold`)}
    />
  );
}

export function InstructionField({ segment, edits, index }: SegmentFieldProps) {
  return (
    <textarea
      className="card-instruction"
      data-empty={segment.instruction === '' || undefined}
      aria-label={`Instruction at segment ${index + 1}`}
      data-field="instruction"
      rows={1}
      maxLength={PROFILE_LIMITS.maxInstructionLength}
      placeholder="What to do, if anything"
      value={segment.instruction}
      onChange={(event) =>
        edits.set({ instruction: event.currentTarget.value.replace(/\n/g, ' ') }, `${index}.instruction`)
      }
    />
  );
}

const OPENED_FIRST_S = 300;

/** Whether the kiln is opened once it is there, and for how long. */
function OpenedField({ segment, edits, index }: Pick<SegmentFieldProps, 'segment' | 'edits' | 'index'>) {
  const { openedS } = segment;
  return (
    <>
      <label>
        <input
          className="check"
          type="checkbox"
          checked={openedS !== undefined}
          onChange={(event) =>
            edits.set(event.currentTarget.checked ? { openedS: OPENED_FIRST_S } : { openedS: undefined })
          }
        />
        opened
      </label>
      {openedS === undefined ? null : (
        <QuantityInput
          label={`Time that the kiln stands open at segment ${index + 1}`}
          field="opened"
          text={durationText(openedS)}
          parse={(typed) => {
            const found = parseDuration(typed, 'min');
            if (found.ok && (found.value < 1 || found.value > PROFILE_LIMITS.maxOpenedS))
              return { ok: false as const, issue: 'Up to 2 hours.' };
            return found;
          }}
          understood={durationText}
          onCommit={(seconds) => edits.set({ openedS: seconds }, `${index}.opened`)}
        />
      )}
    </>
  );
}

const RAMP_KINDS = [
  ['rate', 'by rate'],
  ['time', 'by time'],
  ['flat-out', 'flat out'],
  ['coast', 'coast'],
] as const;

/** How the ramp is given, and what else is asked of the person at the kiln. */
export function MoreFields(props: SegmentFieldProps & { readonly onRampsAs: (rampsAs: RampsAs) => void }) {
  const { segment, leg, edits, index, rampsAs } = props;
  const kind = typeof segment.rateCPerH === 'number' ? rampsAs : segment.rateCPerH;
  const choose = (next: (typeof RAMP_KINDS)[number][0]): void => {
    if (next === 'flat-out' || next === 'coast') {
      edits.set({ rateCPerH: next });
      return;
    }
    props.onRampsAs(next);
    if (typeof segment.rateCPerH === 'number') return;
    const rate = Math.abs(leg.slopeCPerH);
    edits.set({ rateCPerH: Math.min(PROFILE_LIMITS.maxRateCPerH, Math.max(1, Math.round(rate) || 100)) });
  };
  return (
    <div className="card-more">
      <fieldset className="segmented">
        <legend className="strip-hidden">{`Ramp of segment ${index + 1}`}</legend>
        {RAMP_KINDS.map(([value, words]) => (
          <label key={value}>
            <input
              type="radio"
              name={`ramp-kind-${index}`}
              checked={kind === value}
              onChange={() => choose(value)}
            />
            <span>{words}</span>
          </label>
        ))}
      </fieldset>
      <div className="card-checks">
        <label>
          <input
            className="check"
            type="checkbox"
            checked={segment.drain}
            onChange={(event) => edits.set({ drain: event.currentTarget.checked })}
          />
          drain
        </label>
        <label>
          <input
            className="check"
            type="checkbox"
            checked={segment.vent === 'open'}
            onChange={(event) => edits.set({ vent: event.currentTarget.checked ? 'open' : 'closed' })}
          />
          vent open
        </label>
        <label>
          <input
            className="check"
            type="checkbox"
            checked={segment.attended}
            onChange={(event) => edits.set({ attended: event.currentTarget.checked })}
          />
          attended
        </label>
        <OpenedField segment={segment} edits={edits} index={index} />
      </div>
    </div>
  );
}
