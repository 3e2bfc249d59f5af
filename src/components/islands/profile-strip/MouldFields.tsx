import { useUnits } from '~/lib/client/units';
import { findMaterial, materials } from '~/lib/materials';
import { patternSchema, type Mould, type Pattern } from '~/lib/thermal/load-schema';
import { formatLength, formatMass, length, mass, parseLength, parseMass } from '~/lib/units';
import { mouldName, patternName } from './describe';
import { Choice, Labelled } from './Labelled';
import { between, parseCount, parsePercent, percentText } from './parse-amounts';
import { QuantityInput } from './QuantityInput';
import { TableNumbers } from './TableNumbers';

export type Put<T> = (change: Partial<T>, key?: string) => void;

/** A mass or a length in the reader's units, with its name above it. */
export function AmountField(props: {
  readonly label: string;
  readonly kind: 'mass' | 'length';
  readonly value: number | null;
  readonly low: number;
  readonly high: number;
  readonly onCommit: (value: number) => void;
  readonly onClear?: () => void;
  readonly placeholder?: string;
}) {
  const units = useUnits();
  const isMass = props.kind === 'mass';
  const write = (value: number): string =>
    isMass ? formatMass(value, units.mass) : formatLength(value, units.length);
  const shown =
    props.value === null ? null : isMass ? mass(props.value, units.mass) : length(props.value, units.length);
  const parse = (typed: string) => (isMass ? parseMass(typed, units.mass) : parseLength(typed, units.length));
  return (
    <QuantityInput
      boxed
      label={props.label}
      text={shown === null ? '' : `${shown.number} ${shown.unit}`}
      parse={between(parse, props.low, props.high, write)}
      understood={write}
      onCommit={props.onCommit}
      onClear={props.onClear}
      placeholder={props.placeholder}
    />
  );
}

const mouldOptions = materials.moulds.map((material) => ({
  value: material.id,
  text: material.name,
  group: material.form === 'shell' ? 'Shells' : 'Flasks',
}));

const patternOptions = [
  { value: '', text: 'None: burned out already' },
  ...materials.patterns.map((material) => ({ value: material.id, text: material.name })),
];

function Size({ mould, put }: { readonly mould: Mould; readonly put: Put<Mould> }) {
  const units = useUnits();
  const usual = findMaterial('moulds', mould.material)?.properties.typicalWallM;
  if (mould.form === 'flask')
    return (
      <>
        <AmountField
          label="Diameter"
          kind="length"
          value={mould.diameterM}
          low={0.01}
          high={3}
          onCommit={(diameterM) => put({ diameterM }, 'diameter')}
          onClear={() => put({ diameterM: null })}
        />
        <AmountField
          label="Height"
          kind="length"
          value={mould.heightM}
          low={0.01}
          high={3}
          onCommit={(heightM) => put({ heightM }, 'height')}
          onClear={() => put({ heightM: null })}
        />
      </>
    );
  return (
    <AmountField
      label="Wall"
      kind="length"
      value={mould.wallM}
      low={0.001}
      high={0.5}
      placeholder={usual && 'value' in usual ? `${formatLength(usual.value, units.length)}, usual` : ''}
      onCommit={(wallM) => put({ wallM }, 'wall')}
      onClear={() => put({ wallM: null })}
    />
  );
}

function PatternFields({ pattern, put }: { readonly pattern: Pattern; readonly put: Put<Pattern> }) {
  const table = findMaterial('patterns', pattern.material);
  const drains = table?.properties.drainedShare;
  return (
    <>
      <AmountField
        label="Pattern, each"
        kind="mass"
        value={pattern.massKg}
        low={1e-6}
        high={10000}
        onCommit={(massKg) => put({ massKg }, 'mass')}
      />
      <QuantityInput
        boxed
        label="Share that drains"
        text={pattern.drainedShare === null ? '' : percentText(pattern.drainedShare)}
        placeholder={drains && 'value' in drains ? `${percentText(drains.value)}, as table` : ''}
        parse={parsePercent}
        understood={percentText}
        onCommit={(drainedShare) => put({ drainedShare }, 'drained')}
        onClear={() => put({ drainedShare: null })}
      />
      <AmountField
        label="Thickest part"
        kind="length"
        value={pattern.thickestM}
        low={0.0001}
        high={1}
        onCommit={(thickestM) => put({ thickestM }, 'thickest')}
        onClear={() => put({ thickestM: null })}
      />
      <label className="load-check">
        <input
          className="check"
          type="checkbox"
          checked={pattern.hollow}
          onChange={(event) => put({ hollow: event.currentTarget.checked })}
        />
        hollow
      </label>
    </>
  );
}

/** Everything about one kind of mould in the load, and the pattern in it. */
export function MouldFields({ mould, put }: { readonly mould: Mould; readonly put: Put<Mould> }) {
  const table = findMaterial('moulds', mould.material);
  const patternTable = mould.pattern ? findMaterial('patterns', mould.pattern.material) : undefined;
  const chooseMaterial = (material: string): void => {
    const found = findMaterial('moulds', material);
    if (found) put({ material, form: found.form, overrides: {} });
  };
  const choosePattern = (material: string): void => {
    const massKg = mould.pattern?.massKg ?? mould.massKg * 0.1;
    put({
      pattern:
        material === '' ? null : patternSchema.parse({ ...mould.pattern, material, massKg, overrides: {} }),
    });
  };
  const putPattern: Put<Pattern> = (change, key) => {
    if (mould.pattern) put({ pattern: { ...mould.pattern, ...change } }, key && `pattern.${key}`);
  };
  return (
    <>
      <div className="load-grid">
        <Labelled label="Label">
          {(id) => (
            <input
              id={id}
              className="input"
              maxLength={120}
              placeholder="Whose, or what"
              value={mould.label}
              onChange={(event) => put({ label: event.currentTarget.value }, 'label')}
            />
          )}
        </Labelled>
        <Choice label="Mould" value={mould.material} options={mouldOptions} onChange={chooseMaterial} />
        <QuantityInput
          boxed
          label="How many"
          inputMode="decimal"
          text={String(mould.count)}
          parse={between(parseCount, 1, 500, String)}
          understood={String}
          onCommit={(count) => put({ count }, 'count')}
        />
        <AmountField
          label="Dry, each"
          kind="mass"
          value={mould.massKg}
          low={1e-6}
          high={10000}
          onCommit={(massKg) => put({ massKg }, 'mass')}
        />
        <AmountField
          label="Water, each"
          kind="mass"
          value={mould.waterKg}
          low={0}
          high={10000}
          onCommit={(waterKg) => put({ waterKg }, 'water')}
        />
        <Size mould={mould} put={put} />
        <Choice
          label="Heated from"
          value={mould.heatedFaces === 2 ? '2' : '1'}
          options={[
            { value: '1', text: 'outside only' },
            { value: '2', text: 'both sides' },
          ]}
          onChange={(faces) => put({ heatedFaces: faces === '2' ? 2 : 1 })}
        />
        <AmountField
          label="Thinnest section"
          kind="length"
          value={mould.thinnestSectionM}
          low={0.0001}
          high={1}
          onCommit={(thinnestSectionM) => put({ thinnestSectionM }, 'thinnest')}
          onClear={() => put({ thinnestSectionM: null })}
        />
        <Choice
          label="Pattern"
          value={mould.pattern?.material ?? ''}
          options={patternOptions}
          onChange={choosePattern}
        />
        {mould.pattern ? <PatternFields pattern={mould.pattern} put={putPattern} /> : null}
      </div>
      <div className="load-numbers">
        {table ? (
          <TableNumbers
            of={mouldName(mould.material)}
            properties={table.properties}
            overrides={mould.overrides}
            onChange={(overrides) => put({ overrides })}
          />
        ) : null}
        {mould.pattern && patternTable ? (
          <TableNumbers
            of={patternName(mould.pattern.material)}
            properties={patternTable.properties}
            overrides={mould.pattern.overrides}
            onChange={(overrides) => putPattern({ overrides })}
          />
        ) : null}
      </div>
    </>
  );
}
