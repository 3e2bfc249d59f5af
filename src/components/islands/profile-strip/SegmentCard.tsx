import type { CSSProperties, FocusEvent } from 'react';
import { clockTime } from '../strip/clock';
import { durationText } from '../strip/duration';
import {
  HoldField,
  InstructionField,
  MoreFields,
  RampField,
  StageField,
  TargetField,
  type RampsAs,
  type SegmentFieldProps,
} from './SegmentFields';
import { asksFor, degreesText, degreeUnit, rampArrow, rateNumber, rateUnit, STAGE_NAMES } from './shown';

export interface CardProps extends SegmentFieldProps {
  readonly startMs: number | null;
  readonly zone: string;
  readonly selected: boolean;
  readonly readOnly: boolean;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  readonly isOnly: boolean;
  /** One line about what the models foresee here; hot where it is a stop. */
  readonly foreseen: { readonly text: string; readonly hot: boolean } | null;
  readonly remark: string | null;
  readonly place?: CSSProperties;
  readonly onSelect: (index: number) => void;
  readonly onRampsAs: (rampsAs: RampsAs) => void;
  readonly onAdd: (index: number) => void;
  readonly onRemove: (index: number) => void;
  readonly onMove: (index: number, by: -1 | 1) => void;
}

export function spanText(props: Pick<CardProps, 'leg' | 'startMs' | 'zone'>): string {
  const { leg, startMs, zone } = props;
  if (startMs === null) return `${durationText(leg.startS)}–${durationText(leg.endS)}`;
  return `${clockTime(startMs + leg.startS * 1000, zone)}–${clockTime(startMs + leg.endS * 1000, zone)}`;
}

export const cardName = (props: Pick<CardProps, 'index' | 'segment' | 'scale'>): string =>
  `Segment ${props.index + 1}, ${STAGE_NAMES[props.segment.stage].toLowerCase()}, to ${degreesText(props.segment.toC, props.scale)} ${degreeUnit(props.scale)}`;

/** The figures of a segment where they cannot be changed. */
export function SegmentFigures({ segment, leg, scale }: Pick<CardProps, 'segment' | 'leg' | 'scale'>) {
  const { rateCPerH } = segment;
  return (
    <>
      <span className="card-row">
        <span className="card-ramp">
          <span className="card-arrow" aria-hidden="true">
            {rampArrow(leg.fromC, leg.toC)}
          </span>
          <span className="num">
            {typeof rateCPerH === 'number' ? rateNumber(rateCPerH, scale) : rateCPerH.replace('-', ' ')}
            {typeof rateCPerH === 'number' ? <span className="unit">{rateUnit(scale)}</span> : null}
          </span>
        </span>
        <span className="num">
          {degreesText(segment.toC, scale)}
          <span className="unit">{degreeUnit(scale)}</span>
        </span>
      </span>
      <span className="card-row">
        <span className="card-word">hold</span>
        <span className="num">{durationText(segment.holdS)}</span>
      </span>
    </>
  );
}

function Foreseen({ foreseen }: Pick<CardProps, 'foreseen'>) {
  if (!foreseen) return null;
  return (
    <p className={foreseen.hot ? 'card-foreseen card-foreseen-hot' : 'card-foreseen'}>{foreseen.text}</p>
  );
}

function Tools(props: CardProps) {
  const { index } = props;
  return (
    <div className="card-tools">
      <button
        type="button"
        className="btn btn-quiet btn-small"
        aria-label={`Add a segment after segment ${index + 1}`}
        onClick={() => props.onAdd(index)}
      >
        Add
      </button>
      <span className="card-tools-right">
        <button
          type="button"
          className="btn btn-quiet btn-small"
          aria-label={`Move segment ${index + 1} earlier`}
          disabled={props.isFirst}
          onClick={() => props.onMove(index, -1)}
        >
          ←
        </button>
        <button
          type="button"
          className="btn btn-quiet btn-small"
          aria-label={`Move segment ${index + 1} later`}
          disabled={props.isLast}
          onClick={() => props.onMove(index, 1)}
        >
          →
        </button>
        <button
          type="button"
          className="btn btn-quiet btn-small"
          aria-label={`Remove segment ${index + 1}`}
          disabled={props.isOnly}
          onClick={() => props.onRemove(index)}
        >
          Remove
        </button>
      </span>
    </div>
  );
}

function EditableFace(props: CardProps) {
  const { segment } = props;
  const asks = asksFor(segment);
  return (
    <>
      <div className="card-row card-top">
        <StageField {...props} />
        <span className="num card-span">{spanText(props)}</span>
      </div>
      <div className="card-row">
        <RampField {...props} />
        <TargetField {...props} />
      </div>
      <div className="card-row">
        <span className="card-word" aria-hidden="true">
          hold
        </span>
        <HoldField {...props} />
      </div>
      <div className="card-notes">
        <InstructionField {...props} />
        {asks.length > 0 && !props.selected ? <p className="card-asks">{asks.join(' · ')}</p> : null}
        <Foreseen foreseen={props.foreseen} />
        {props.remark ? <p className="card-remark">{props.remark}</p> : null}
      </div>
      {props.selected ? (
        <>
          <MoreFields {...props} />
          <Tools {...props} />
        </>
      ) : null}
    </>
  );
}

function ReadFace(props: CardProps) {
  const { segment } = props;
  const asks = asksFor(segment);
  return (
    <>
      <span className="card-row card-top">
        <span className="card-stage-read">{STAGE_NAMES[segment.stage]}</span>
        <span className="num card-span">{spanText(props)}</span>
      </span>
      <SegmentFigures {...props} />
      <div className="card-notes">
        {segment.instruction ? <p>{segment.instruction}</p> : null}
        {asks.length > 0 ? <p className="card-asks">{asks.join(' · ')}</p> : null}
        <Foreseen foreseen={props.foreseen} />
        {props.remark ? <p className="card-remark">{props.remark}</p> : null}
      </div>
    </>
  );
}

/** One segment's card beneath its stretch of the curve: figures and instruction, typed in place. */
export function SegmentCard(props: CardProps) {
  const { index, selected } = props;
  const onFocus = (event: FocusEvent<HTMLDivElement>): void => {
    if (!event.currentTarget.contains(event.relatedTarget)) props.onSelect(index);
  };
  return (
    <div
      id={`segment-${index + 1}`}
      className="segment-card"
      role="group"
      aria-label={cardName(props)}
      tabIndex={0}
      data-card={index}
      data-selected={selected || undefined}
      data-hot={props.foreseen?.hot || undefined}
      style={props.place}
      onFocus={onFocus}
    >
      {props.readOnly ? <ReadFace {...props} /> : <EditableFace {...props} />}
    </div>
  );
}

/** The card of an upright strip: what it says fits beside the curve; tapping it opens its fields. */
export function CardSummary(props: CardProps & { readonly onOpen: (index: number) => void }) {
  const { segment, index } = props;
  return (
    <button
      type="button"
      id={`segment-${index + 1}`}
      className="segment-summary"
      data-card={index}
      data-selected={props.selected || undefined}
      data-hot={props.foreseen?.hot || undefined}
      style={props.place}
      onClick={(event) => {
        event.currentTarget.scrollIntoView({ block: 'start' });
        props.onSelect(index);
        props.onOpen(index);
      }}
    >
      <span className="card-row card-top">
        <span className="card-stage-read">
          <span className="strip-hidden">{`${props.readOnly ? 'Show' : 'Change'} segment ${index + 1}: `}</span>
          {STAGE_NAMES[segment.stage]}
        </span>
        <span className="num card-span">{spanText(props).split('–')[0]}</span>
      </span>
      <SegmentFigures {...props} />
      <span className="card-line">
        {props.foreseen?.hot ? props.foreseen.text : segment.instruction || asksFor(segment).join(' · ')}
      </span>
    </button>
  );
}
