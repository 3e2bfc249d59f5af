import { useUnits } from '~/lib/client/units';
import type { Furnace } from '~/lib/contracts/equipment';
import { findMaterial, materials } from '~/lib/materials';
import type { Pour } from '~/lib/thermal/load-schema';
import { formatDuration, formatTemperature, parseDuration, parseTemperature } from '~/lib/units';
import { ChargeFields } from './ChargeFields';
import { Choice } from './Labelled';
import { AmountField, type Put } from './MouldFields';
import { between } from './parse-amounts';
import { QuantityInput } from './QuantityInput';

const metalOptions = [
  { value: '', text: 'No pour from this firing' },
  ...materials.metals.map((metal) => ({ value: metal.id, text: metal.name })),
];

/** Middle of the range in which light work is poured, to the next 10 °C; the table's value, to begin with. */
function usualPourC(metal: string): number {
  const properties = findMaterial('metals', metal)?.properties;
  const from = properties?.pourLightFromC;
  const to = properties?.pourLightToC;
  if (!from || !to || !('value' in from) || !('value' in to)) return 1100;
  return Math.round((from.value + to.value) / 20) * 10;
}

/** The pour that waits for the moulds: metal, charge, furnace. */
export function PourFields(props: {
  readonly pour: Pour | null;
  readonly furnaces: readonly Furnace[];
  readonly onChange: (pour: Pour | null, key?: string) => void;
}) {
  const { pour, furnaces, onChange } = props;
  const units = useUnits();
  const put: Put<Pour> = (change, key) => {
    if (pour) onChange({ ...pour, ...change }, key);
  };
  const chooseMetal = (metal: string): void => {
    if (metal === '') onChange(null);
    else
      onChange({
        chargeKg: pour?.chargeKg ?? 5,
        furnaceId: pour?.furnaceId ?? furnaces[0]?.id ?? null,
        carryS: pour?.carryS ?? 30,
        metal,
        pourC: usualPourC(metal),
      });
  };
  return (
    <>
      <div className="load-grid">
        <Choice label="Metal" value={pour?.metal ?? ''} options={metalOptions} onChange={chooseMetal} />
        {pour ? (
          <>
            {pour.charge ? null : (
              <AmountField
                label="Charge"
                kind="mass"
                value={pour.chargeKg}
                low={1e-3}
                high={10000}
                onCommit={(chargeKg) => put({ chargeKg }, 'charge')}
              />
            )}
            <QuantityInput
              boxed
              label="Poured at"
              text={formatTemperature(pour.pourC, units.temperature)}
              parse={between(
                (typed) => parseTemperature(typed, units.temperature),
                100,
                1800,
                (tempC) => formatTemperature(tempC, units.temperature),
              )}
              understood={(tempC) => formatTemperature(tempC, units.temperature)}
              onCommit={(pourC) => put({ pourC }, 'pourC')}
            />
            <QuantityInput
              boxed
              label="Carried for"
              text={formatDuration(pour.carryS)}
              parse={between((typed) => parseDuration(typed, 'min'), 0, 3600, formatDuration)}
              understood={formatDuration}
              onCommit={(carryS) => put({ carryS }, 'carry')}
            />
            <Choice
              label="Furnace"
              value={pour.furnaceId ?? ''}
              options={[
                { value: '', text: 'Not chosen' },
                ...furnaces.map((furnace) => ({ value: furnace.id, text: furnace.name })),
              ]}
              onChange={(id) => put({ furnaceId: id === '' ? null : id })}
            />
            <AmountField
              label="Crucible"
              kind="mass"
              value={pour.crucibleKg ?? null}
              low={0}
              high={2000}
              onCommit={(crucibleKg) => put({ crucibleKg }, 'crucible')}
              onClear={() => {
                const { crucibleKg: _before, ...rest } = pour;
                onChange(rest);
              }}
            />
          </>
        ) : null}
      </div>
      {pour ? <ChargeFields pour={pour} onChange={onChange} /> : null}
    </>
  );
}
