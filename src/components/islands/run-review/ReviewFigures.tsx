import type { Review } from '~/lib/contracts/runs';
import { formatNumber, interval, temperature as asTemperature, type Quantity } from '~/lib/units';
import { useUnits } from '~/lib/client/units';
import { durationText } from '../strip/duration';

function Figure(props: { readonly quantity: Quantity; readonly note: string }) {
  return (
    <div className="review-figure">
      <dd className="num">
        {props.quantity.number}
        <span className="unit">{` ${props.quantity.unit}`}</span>
      </dd>
      <dt>{props.note}</dt>
    </div>
  );
}

/** The figures of the run, each with what it is compared with. What the log gives no ground for is left out. */
export function ReviewFigures({ figures }: { readonly figures: Review['figures'] }) {
  const { temperature } = useUnits();
  const { heatWorkH, plannedHeatWorkH, energyKWh, estimatedKWh } = figures;
  return (
    <dl className="review-figures">
      {figures.peakC === null ? null : (
        <Figure quantity={asTemperature(figures.peakC, temperature)} note="peak" />
      )}
      {figures.delayS === null ? null : (
        <Figure
          quantity={{ number: durationText(Math.abs(figures.delayS)), unit: '' }}
          note={
            Math.abs(figures.delayS) < 60
              ? 'from plan in length'
              : figures.delayS > 0
                ? 'longer than planned'
                : 'shorter than planned'
          }
        />
      )}
      {heatWorkH === null ? null : (
        <Figure
          quantity={{ number: formatNumber(heatWorkH, 2), unit: 'h' }}
          note={
            plannedHeatWorkH === null
              ? 'heat work at 870 °C'
              : `heat work, plan ${formatNumber(plannedHeatWorkH, 2)}`
          }
        />
      )}
      {energyKWh === null ? null : (
        <Figure
          quantity={{ number: formatNumber(energyKWh, 1), unit: 'kWh' }}
          note={estimatedKWh === null ? 'by the power channel' : `estimate ${formatNumber(estimatedKWh, 1)}`}
        />
      )}
      {figures.rmsC === null ? null : (
        <Figure
          quantity={interval(figures.rmsC, temperature, 1)}
          note={
            figures.toleranceC === null
              ? 'RMS from the plan'
              : `RMS, sensor ± ${interval(figures.toleranceC, temperature, 1).number}`
          }
        />
      )}
    </dl>
  );
}
