import type { ReactNode } from 'react';
import { ASSUMED_RATE_C_PER_H } from '~/lib/profile/planned';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { formatNumber, THIN_SPACE } from '~/lib/units';
import { clockTime, shortDay } from '../strip/clock';
import { durationText, hoursAndMinutes } from '../strip/duration';

interface FiguresProps {
  readonly estimate: Estimate | null;
  readonly before: Estimate | null;
  readonly plannedS: number;
  readonly hasKiln: boolean;
  /** Some ramp is the kiln's to decide, and no kiln has said: it is drawn at an assumed rate. */
  readonly isAssumed: boolean;
  readonly startMs: number | null;
  readonly zone: string;
}

const CURRENCY_SIGNS: Readonly<Record<string, string>> = { EUR: '€', GBP: '£', USD: '$' };
export const moneyText = (money: { amount: string; currency: string }): string =>
  `${CURRENCY_SIGNS[money.currency] ?? money.currency} ${money.amount}`;

/** By how much a figure moved with the last change, or nothing where it did not. */
function changeText(now: number, before: number | null, text: (by: number) => string, least: number): string {
  if (before === null || Math.abs(now - before) < least) return '';
  return `${now > before ? '+' : '−'}${text(Math.abs(now - before))}`;
}

function Figure(props: {
  readonly value: ReactNode;
  readonly change: string;
  readonly note: string;
  readonly hot?: boolean;
}) {
  return (
    <div className="figure">
      <p className="figure-value num">
        {props.change ? (
          <>
            <span className="figure-change">{props.change}</span>{' '}
          </>
        ) : null}
        <span data-hot={props.hot || undefined}>{props.value}</span>
      </p>
      <p className="figure-note">{props.note}</p>
    </div>
  );
}

function Hours({ seconds }: { readonly seconds: number }) {
  const { hours, minutes } = hoursAndMinutes(seconds);
  return (
    <>
      {hours}
      <span className="unit">h</span>
      {` ${String(minutes).padStart(2, '0')}`}
      <span className="unit">min</span>
    </>
  );
}

/** A moment on the studio's clock, with its day where that is not the day of the start. */
export function momentText(atS: number, startMs: number | null, zone: string): string {
  if (startMs === null) return `+${durationText(atS)}`;
  const atMs = startMs + atS * 1000;
  const day = shortDay(atMs, zone);
  const clock = clockTime(atMs, zone);
  return day === shortDay(startMs, zone) ? clock : `${clock} ${day.slice(0, 3)}`;
}

function planNote(hasKiln: boolean, isAssumed: boolean): string {
  const plan = isAssumed
    ? `as planned, with ${ASSUMED_RATE_C_PER_H} °C/h assumed where the kiln decides`
    : 'as planned';
  return hasKiln ? plan : `${plan}; choose a kiln to see what it will do`;
}

/** Time, energy and readiness of the firing, each with what the last change did to it. */
export function Figures({ estimate, before, plannedS, hasKiln, isAssumed, startMs, zone }: FiguresProps) {
  const at = (timeS: number): string => momentText(timeS, startMs, zone);
  if (!estimate)
    return (
      <div className="figures">
        <Figure value={<Hours seconds={plannedS} />} change="" note={planNote(hasKiln, isAssumed)} />
      </div>
    );
  const energyDigits = estimate.energyKWh < 100 ? 1 : 0;
  const fuel =
    estimate.fuelKg > 0
      ? `${formatNumber(estimate.fuelKg, estimate.fuelKg < 10 ? 1 : 0)}${THIN_SPACE}kg fuel`
      : '';
  const costs = [
    estimate.cost ? moneyText(estimate.cost) : '',
    fuel,
    `${formatNumber(estimate.co2Kg)}${THIN_SPACE}kg CO₂`,
  ].filter(Boolean);
  const openable =
    estimate.openableS === null
      ? 'not openable within the time computed'
      : `openable ${at(estimate.openableS)}`;
  return (
    <div className="figures">
      <Figure
        value={<Hours seconds={estimate.predictedS} />}
        change={changeText(estimate.predictedS, before?.predictedS ?? null, durationText, 30)}
        note={`from ${at(0)} to ${at(estimate.predictedS)}`}
      />
      <Figure
        value={
          <>
            {formatNumber(estimate.energyKWh, energyDigits)}
            <span className="unit">kWh</span>
          </>
        }
        change={changeText(
          estimate.energyKWh,
          before?.energyKWh ?? null,
          (by) => formatNumber(by, energyDigits),
          energyDigits === 1 ? 0.05 : 0.5,
        )}
        note={costs.join(', ')}
      />
      {estimate.mould === null ? (
        <Figure value="–" change="" note={`no mould in the load, ${openable}`} />
      ) : (
        <Figure
          value={estimate.readyS === null ? 'not ready' : at(estimate.readyS)}
          hot={estimate.readyS === null}
          change={
            estimate.readyS === null
              ? ''
              : changeText(estimate.readyS, before?.readyS ?? null, durationText, 30)
          }
          note={`${estimate.readyS === null ? 'the mould core does not get there' : 'ready to pour'}, ${openable}`}
        />
      )}
    </div>
  );
}
