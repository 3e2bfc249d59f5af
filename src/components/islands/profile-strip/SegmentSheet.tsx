import { Dialog } from './Dialog';
import { SegmentFigures, spanText, type CardProps } from './SegmentCard';
import { HoldField, InstructionField, MoreFields, RampField, StageField, TargetField } from './SegmentFields';
import { asksFor, STAGE_NAMES } from './shown';

type SheetCard = Omit<CardProps, 'place'>;

function Fields({ card, onClose }: { readonly card: SheetCard; readonly onClose: () => void }) {
  return (
    <>
      <div className="sheet-fields">
        <span className="sheet-field">
          <span className="label">Stage</span>
          <StageField {...card} />
        </span>
        <span className="sheet-field">
          <span className="label">{card.rampsAs === 'time' ? 'Ramp takes' : 'Rate'}</span>
          <RampField {...card} />
        </span>
        <span className="sheet-field">
          <span className="label">Target</span>
          <TargetField {...card} />
        </span>
        <span className="sheet-field">
          <span className="label">Hold</span>
          <HoldField {...card} />
        </span>
        <span className="sheet-field sheet-field-wide">
          <span className="label">Instruction</span>
          <InstructionField {...card} />
        </span>
      </div>
      <MoreFields {...card} />
      {card.foreseen ? (
        <p className={card.foreseen.hot ? 'card-foreseen card-foreseen-hot' : 'card-foreseen'}>
          {card.foreseen.text}
        </p>
      ) : null}
      <div className="sheet-tools">
        <button
          type="button"
          className="btn"
          onClick={() => {
            onClose();
            card.onAdd(card.index);
          }}
        >
          Add a segment after
        </button>
        <button
          type="button"
          className="btn"
          disabled={card.isOnly}
          onClick={() => {
            onClose();
            card.onRemove(card.index);
          }}
        >
          Remove
        </button>
      </div>
    </>
  );
}

function Reading({ card }: { readonly card: SheetCard }) {
  const asks = asksFor(card.segment);
  return (
    <div className="sheet-reading">
      <SegmentFigures {...card} />
      {card.segment.instruction ? <p>{card.segment.instruction}</p> : null}
      {asks.length > 0 ? <p className="card-asks">{asks.join(' · ')}</p> : null}
      {card.foreseen ? <p className="card-foreseen">{card.foreseen.text}</p> : null}
      {card.remark ? <p className="card-remark">{card.remark}</p> : null}
    </div>
  );
}

/** The fields of one segment from the foot of a phone's screen, the strip still in sight above. */
export function SegmentSheet({ card, onClose }: { readonly card: SheetCard; readonly onClose: () => void }) {
  const title = `${card.index + 1} ${STAGE_NAMES[card.segment.stage]}, ${spanText(card)}`;
  return (
    <Dialog title={title} onClose={onClose} sheet>
      {card.readOnly ? (
        <Reading card={card} />
      ) : (
        <Fields card={{ ...card, selected: true }} onClose={onClose} />
      )}
    </Dialog>
  );
}
