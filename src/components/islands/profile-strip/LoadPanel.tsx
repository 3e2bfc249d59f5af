import { useUnits } from '~/lib/client/units';
import type { Furnace } from '~/lib/contracts/equipment';
import { findMaterial, materials } from '~/lib/materials';
import {
  furnitureSchema,
  loadSchema,
  mouldSchema,
  type Furniture,
  type Load,
  type Mould,
} from '~/lib/thermal/load-schema';
import { formatTemperature, parseTemperature } from '~/lib/units';
import { mouldName } from './describe';
import { Choice } from './Labelled';
import { AmountField, MouldFields } from './MouldFields';
import { between } from './parse-amounts';
import { PourFields } from './PourFields';
import { QuantityInput } from './QuantityInput';
import { TableNumbers } from './TableNumbers';

interface LoadPanelProps {
  readonly load: Load | null;
  readonly furnaces: readonly Furnace[];
  readonly onChange: (load: Load, key?: string) => void;
}

/** A further mould like the last one; the first of all is a shell with the usual wall. */
function nextMould(moulds: readonly Mould[]): Mould {
  const last = moulds[moulds.length - 1];
  if (last) return { ...last, label: '' };
  const first = materials.moulds[0];
  const wall = first?.properties.typicalWallM;
  return mouldSchema.parse({
    material: first?.id,
    form: first?.form,
    massKg: 1,
    wallM: wall && 'value' in wall ? wall.value : null,
  });
}

const furnitureOptions = materials.furniture.map((material) => ({ value: material.id, text: material.name }));

function FurnitureRow(props: {
  readonly item: Furniture;
  readonly name: string;
  readonly onChange: (item: Furniture, key?: string) => void;
  readonly onRemove: () => void;
}) {
  const { item, onChange } = props;
  const table = findMaterial('furniture', item.material);
  return (
    <fieldset className="load-item">
      <legend>{table?.name ?? item.material}</legend>
      <div className="load-grid">
        <Choice
          label="Material"
          value={item.material}
          options={furnitureOptions}
          onChange={(material) => onChange({ ...item, material, overrides: {} })}
        />
        <AmountField
          label="Mass"
          kind="mass"
          value={item.massKg}
          low={1e-6}
          high={10000}
          onCommit={(massKg) => onChange({ ...item, massKg }, 'mass')}
        />
        <AmountField
          label="Thickness"
          kind="length"
          value={item.thicknessM}
          low={0.001}
          high={0.5}
          onCommit={(thicknessM) => onChange({ ...item, thicknessM }, 'thickness')}
          onClear={() => onChange({ ...item, thicknessM: null })}
        />
      </div>
      {table ? (
        <TableNumbers
          of={table.name.toLowerCase()}
          properties={table.properties}
          overrides={item.overrides}
          onChange={(overrides) => onChange({ ...item, overrides })}
        />
      ) : null}
      <button type="button" className="btn btn-quiet btn-small load-remove" onClick={props.onRemove}>
        Remove
        <span className="strip-hidden">{` ${props.name}`}</span>
      </button>
    </fieldset>
  );
}

const replaced = <T,>(items: readonly T[], index: number, item: T): T[] =>
  items.map((old, at) => (at === index ? item : old));
const without = <T,>(items: readonly T[], index: number): T[] => items.filter((_item, at) => at !== index);

function Moulds({ load, onChange }: { readonly load: Load; readonly onChange: LoadPanelProps['onChange'] }) {
  const { moulds } = load;
  return (
    <section className="load-section" aria-label="Moulds">
      {moulds.map((mould, index) => (
        <fieldset key={index} className="load-item">
          <legend>
            <span className="num">{`${mould.count} × `}</span>
            {mould.label || mouldName(mould.material)}
          </legend>
          <MouldFields
            mould={mould}
            put={(change, key) =>
              onChange(
                { ...load, moulds: replaced(moulds, index, { ...mould, ...change }) },
                key && `mould.${index}.${key}`,
              )
            }
          />
          <button
            type="button"
            className="btn btn-quiet btn-small load-remove"
            onClick={() => onChange({ ...load, moulds: without(moulds, index) })}
          >
            Remove
            <span className="strip-hidden">{` ${mould.label || mouldName(mould.material)}`}</span>
          </button>
        </fieldset>
      ))}
      {moulds.length < 60 ? (
        <button
          type="button"
          className="btn btn-small"
          onClick={() => onChange({ ...load, moulds: [...moulds, nextMould(moulds)] })}
        >
          {moulds.length === 0 ? 'Put in a mould' : 'Put in another kind of mould'}
        </button>
      ) : null}
    </section>
  );
}

function FurnitureList({
  load,
  onChange,
}: {
  readonly load: Load;
  readonly onChange: LoadPanelProps['onChange'];
}) {
  const { furniture } = load;
  return (
    <section className="load-section">
      <h3>Shelves and props</h3>
      {furniture.map((item, index) => (
        <FurnitureRow
          key={index}
          item={item}
          name={`furniture ${index + 1}`}
          onChange={(next, key) =>
            onChange(
              { ...load, furniture: replaced(furniture, index, next) },
              key && `furniture.${index}.${key}`,
            )
          }
          onRemove={() => onChange({ ...load, furniture: without(furniture, index) })}
        />
      ))}
      {furniture.length < 60 ? (
        <button
          type="button"
          className="btn btn-small"
          onClick={() => {
            const item = furnitureSchema.parse({ material: materials.furniture[0]?.id, massKg: 2 });
            onChange({ ...load, furniture: [...furniture, item] });
          }}
        >
          Put in a shelf or prop
        </button>
      ) : null}
    </section>
  );
}

/** What stands in the kiln: moulds with their patterns, shelves and props, and the pour that waits. */
export function LoadPanel({ load, furnaces, onChange }: LoadPanelProps) {
  const units = useUnits();
  const full = load ?? loadSchema.parse({});
  const inScale = (tempC: number): string => formatTemperature(tempC, units.temperature);
  return (
    <div className="load-panel">
      <Moulds load={full} onChange={onChange} />
      <FurnitureList load={full} onChange={onChange} />
      <section className="load-section">
        <h3>Pour, and going in</h3>
        <PourFields
          pour={full.pour}
          furnaces={furnaces}
          onChange={(pour, key) => onChange({ ...full, pour }, key && `pour.${key}`)}
        />
        <div className="load-grid">
          <QuantityInput
            boxed
            label="Load goes in at"
            text={full.startC === null ? '' : inScale(full.startC)}
            placeholder="as the kiln"
            parse={between((typed) => parseTemperature(typed, units.temperature), -20, 1400, inScale)}
            understood={inScale}
            onCommit={(startC) => onChange({ ...full, startC }, 'startC')}
            onClear={() => onChange({ ...full, startC: null })}
          />
        </div>
      </section>
    </div>
  );
}
