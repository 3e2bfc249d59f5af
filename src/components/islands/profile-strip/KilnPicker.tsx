import { useUnits } from '~/lib/client/units';
import type { Kiln } from '~/lib/contracts/equipment';
import { formatLength, formatTemperature } from '~/lib/units';
import { kilnText } from './describe';

/** Which kiln the profile is for. */
export function KilnPicker(props: {
  readonly kilns: readonly Kiln[];
  readonly kilnId: string | null;
  readonly onChange: (kilnId: string) => void;
}) {
  const units = useUnits();
  const choices = props.kilns.filter((kiln) => kiln.archivedAt === null || kiln.id === props.kilnId);
  if (choices.length === 0)
    return (
      <p className="hint">
        No kiln is kept here yet.{' '}
        <a className="link" href="/kilns/new">
          Add one from what stands on its plate.
        </a>
      </p>
    );
  const size = (kiln: Kiln): string =>
    [kiln.innerWidthM, kiln.innerDepthM, kiln.innerHeightM]
      .map((sideM) => formatLength(sideM, units.length))
      .join(' × ');
  return (
    <fieldset className="kiln-choices">
      <legend className="strip-hidden">Kiln</legend>
      {choices.map((kiln) => (
        <label key={kiln.id} className="kiln-choice">
          <input
            type="radio"
            name="kiln"
            checked={kiln.id === props.kilnId}
            onChange={() => props.onChange(kiln.id)}
          />
          <span>
            <strong>{kilnText(kiln)}</strong>
            <span className="hint">
              {`${size(kiln)} inside, up to ${formatTemperature(kiln.maxC, units.temperature)}${kiln.archivedAt === null ? '' : ', archived'}`}
            </span>
          </span>
        </label>
      ))}
    </fieldset>
  );
}
