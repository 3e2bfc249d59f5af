import type { Property } from '~/lib/materials';
import { figureText, parseFigure } from './parse-amounts';
import { QuantityInput } from './QuantityInput';

const NAMES: Readonly<Record<string, string>> = {
  densityKgPerM3: 'Density',
  softensC: 'Softens at',
  meltsC: 'Melts at',
  flowsC: 'Runs out above',
  drainedShare: 'Share that drains',
  drainTimeS: 'Time to drain',
  liquidDensityKgPerM3: 'Density when liquid',
  expansionPerK: 'Expansion',
  expansionVolumeShare: 'Growth in volume until it flows',
  heatCapacityJPerKgK: 'Heat capacity',
  conductivityWPerMK: 'Conductivity',
  wetConductivityWPerMK: 'Conductivity when wet',
  heatOfFusionJPerKg: 'Heat of melting',
  heatOfCombustionJPerKg: 'Heat of burning',
  airKgPerKg: 'Air to burn it',
  ashShare: 'Ash left',
  burnedOutC: 'Burned out by',
  pushesAboveM: 'Pushes on the mould above',
  emissivity: 'Emissivity',
  porosityShare: 'Porosity',
  tortuosity: 'Tortuosity of the pores',
  permeabilityM2: 'Permeability',
  maxC: 'Highest temperature',
  maxWithCarbonC: 'Highest with carbon left',
  greenStrengthPa: 'Strength before firing',
  wetStrengthShare: 'Strength left when steam-wet',
  firedStrengthPa: 'Strength when fired',
  youngPa: 'Stiffness',
  poissonRatio: "Poisson's ratio",
  typicalWallM: 'Usual wall',
  coatM: 'Thickness of a coat',
  freshWaterShare: 'Water of a fresh mould',
  heatWorkReferenceC: 'Heat work: reference',
  heatWorkActivationKJPerMol: 'Heat work: activation energy',
  heatWorkTargetH: 'Heat work: target',
  heatWorkMostH: 'Heat work: most',
  cristobaliteFromC: 'Cristobalite grows above',
  cristobaliteAfterH: 'Cristobalite grows after',
};

const CONFIDENCE_WORDS = {
  published: 'published',
  memory: 'recalled, not looked up',
  'common-practice': 'common practice',
  derived: 'worked out',
} as const;

const nameOf = (key: string): string =>
  NAMES[key] ?? key.replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`);

function tableText(property: Property): string {
  if ('value' in property) return figureText(property.value);
  const first = property.points[0];
  const last = property.points[property.points.length - 1];
  if (!first || !last) return '';
  return `${figureText(first[1])} at ${first[0]} °C to ${figureText(last[1])} at ${last[0]} °C`;
}

const unitText = (unit: string): string => (unit === '1' ? '' : unit);

interface TableNumbersProps {
  readonly of: string;
  readonly properties: Readonly<Record<string, Property | undefined>>;
  readonly overrides: Readonly<Record<string, number>>;
  readonly onChange: (overrides: Record<string, number>) => void;
}

function Row(props: TableNumbersProps & { readonly name: string; readonly property: Property }) {
  const { name, property, overrides, onChange } = props;
  const own = Object.hasOwn(overrides, name) ? overrides[name] : undefined;
  const reset = (): void =>
    onChange(Object.fromEntries(Object.entries(overrides).filter(([key]) => key !== name)));
  return (
    <tr data-own={own !== undefined || undefined}>
      <th scope="row">{nameOf(name)}</th>
      <td>
        <span className="num">{tableText(property)}</span>
        <span className="unit">{unitText(property.unit)}</span>
        <p className="hint">{`${property.source} (${CONFIDENCE_WORDS[property.confidence]})`}</p>
      </td>
      <td>
        <QuantityInput
          label={`Own figure for ${nameOf(name).toLowerCase()} of ${props.of}${property.unit === '1' ? '' : `, ${property.unit}`}`}
          text={own === undefined ? '' : figureText(own)}
          placeholder="as table"
          unit={unitText(property.unit)}
          parse={parseFigure}
          understood={(value) => `${figureText(value)} ${unitText(property.unit)}`.trim()}
          onCommit={(value) => onChange({ ...overrides, [name]: value })}
          onClear={reset}
        />
        {own === undefined ? null : (
          <button
            type="button"
            className="btn btn-quiet btn-small"
            aria-label={`Back to the table's ${nameOf(name).toLowerCase()}`}
            onClick={reset}
          >
            Back to the table
          </button>
        )}
      </td>
    </tr>
  );
}

/** The numbers behind a material, each with its source; one's own may stand in their place. */
export function TableNumbers(props: TableNumbersProps) {
  const owned = Object.keys(props.overrides).length;
  return (
    <details className="table-numbers">
      <summary className="link">
        {`Numbers of ${props.of}`}
        {owned > 0 ? <strong>{`, ${owned} your own`}</strong> : null}
      </summary>
      <table>
        <thead>
          <tr>
            <th scope="col">Property</th>
            <th scope="col">Table</th>
            <th scope="col">Own</th>
          </tr>
        </thead>
        <tbody>
          {Object.entries(props.properties).map(([name, property]) =>
            property ? <Row key={name} {...props} name={name} property={property} /> : null,
          )}
        </tbody>
      </table>
    </details>
  );
}
