import { materials } from '~/lib/materials';
import { CHARGE_KINDS, type ChargePart, type Pour } from '~/lib/thermal/load-schema';
import { Choice, Labelled } from './Labelled';
import { AmountField } from './MouldFields';

const KIND_NAMES: Readonly<Record<ChargePart['kind'], string>> = {
  ingot: 'Ingot',
  returns: 'Returns',
  addition: 'Addition',
};
const kindOptions = CHARGE_KINDS.map((kind) => ({ value: kind, text: KIND_NAMES[kind] }));
const metalOptions = [
  { value: '', text: 'The same metal' },
  ...materials.metals.map(({ id, name }) => ({ value: id, text: name })),
];

const sumKg = (parts: readonly ChargePart[]): number => parts.reduce((sum, { massKg }) => sum + massKg, 0);

/** A charge with a list of its parts weighs what they weigh; without one it keeps its own mass. */
function withParts(pour: Pour, parts: ChargePart[]): Pour {
  if (parts.length > 0) return { ...pour, charge: parts, chargeKg: Number(sumKg(parts).toFixed(4)) };
  const plain = { ...pour };
  delete plain.charge;
  return plain;
}

/** What the charge is made up of: ingot, returns, additions, each with its mass and a note. */
export function ChargeFields(props: {
  readonly pour: Pour;
  readonly onChange: (pour: Pour, key?: string) => void;
}) {
  const { pour, onChange } = props;
  const parts = pour.charge ?? [];
  const put = (index: number, change: Partial<ChargePart>, key?: string): void =>
    onChange(
      withParts(
        pour,
        parts.map((part, at) => (at === index ? { ...part, ...change } : part)),
      ),
      key && `charge.${index}.${key}`,
    );
  return (
    <>
      {parts.map((part, index) => (
        <fieldset key={index} className="load-item">
          <legend>{`${KIND_NAMES[part.kind]} ${index + 1}`}</legend>
          <div className="load-grid">
            <Choice
              label="Part"
              value={part.kind}
              options={kindOptions}
              onChange={(kind) => put(index, { kind: kind })}
            />
            <Choice
              label="Of"
              value={part.metal ?? ''}
              options={metalOptions}
              onChange={(metal) => {
                const { metal: _before, ...rest } = part;
                onChange(
                  withParts(
                    pour,
                    parts.map((each, at) =>
                      at === index ? (metal === '' ? rest : { ...rest, metal }) : each,
                    ),
                  ),
                );
              }}
            />
            <AmountField
              label="Mass"
              kind="mass"
              value={part.massKg}
              low={1e-3}
              high={10000}
              onCommit={(massKg) => put(index, { massKg }, 'mass')}
            />
            <Labelled label="Note">
              {(id) => (
                <input
                  id={id}
                  className="input"
                  maxLength={200}
                  value={part.note ?? ''}
                  onChange={(event) => put(index, { note: event.target.value }, 'note')}
                />
              )}
            </Labelled>
          </div>
          <button
            type="button"
            className="btn btn-quiet btn-small load-remove"
            onClick={() =>
              onChange(
                withParts(
                  pour,
                  parts.filter((_part, at) => at !== index),
                ),
              )
            }
          >
            Remove
            <span className="strip-hidden">{` ${KIND_NAMES[part.kind].toLowerCase()} ${index + 1} from the charge`}</span>
          </button>
        </fieldset>
      ))}
      {parts.length < 40 ? (
        <button
          type="button"
          className="btn btn-small"
          onClick={() =>
            onChange(
              withParts(pour, [
                ...parts,
                parts.length === 0
                  ? { kind: 'ingot', massKg: pour.chargeKg }
                  : { kind: 'returns', massKg: 1 },
              ]),
            )
          }
        >
          {parts.length === 0 ? 'List what the charge is made of' : 'Put in another part'}
        </button>
      ) : null}
    </>
  );
}
