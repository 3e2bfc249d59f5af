import type { ReactNode } from 'react';
import { useUnits } from '~/lib/client/units';
import { findMaterial } from '~/lib/materials';
import type { Estimate, PourEstimate } from '~/lib/thermal/estimate-schema';
import type { Load } from '~/lib/thermal/load-schema';
import {
  formatDuration,
  formatInterval,
  formatMass,
  formatNumber,
  formatTemperature,
  THIN_SPACE,
} from '~/lib/units';
import { mouldName } from './describe';
import { moneyText, momentText } from './Figures';

interface OutcomeProps {
  readonly estimate: Estimate;
  readonly load: Load | null;
  readonly startMs: number | null;
  readonly zone: string;
}

const kWh = (value: number): string => `${formatNumber(value, Math.abs(value) < 10 ? 1 : 0)}${THIN_SPACE}kWh`;

/** A row of the sheet: what it is, and the figure. */
function Row({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <tr>
      <th scope="row">{name}</th>
      <td className="num">{children}</td>
    </tr>
  );
}

function Sheet(props: { readonly title: string; readonly children: ReactNode; readonly foot: string }) {
  return (
    <section className="outcome-sheet">
      <h3>{props.title}</h3>
      <table>
        <tbody>{props.children}</tbody>
      </table>
      <p className="hint">{props.foot}</p>
    </section>
  );
}

/** What is left of each of the energy's ways, largest first; what is nothing is not listed. */
function Energy({ energy, cone }: Estimate & { readonly energy: Estimate['energy'] }) {
  const ways = [
    ['Into the walls of the kiln', energy.wallsKWh],
    ['Into moulds and furniture', energy.loadKWh],
    ['Through the walls and up the flue', energy.lossesKWh],
    ['With the air, vent and leaks', energy.ventKWh],
    ['Drying and reactions', energy.reactionsKWh],
  ] as const;
  return (
    <Sheet
      title="Where the heat goes"
      foot={`From start to end by the kiln model, which closes its balance to ${formatNumber(Math.max(0.01, Math.abs(energy.imbalance) * 100), 2)} %.${cone === null ? '' : ` The mould core gets the heat work of about cone ${cone}.`}`}
    >
      {ways
        .filter(([, value]) => Math.abs(value) >= 0.05)
        .sort(([, one], [, other]) => other - one)
        .map(([name, value]) => (
          <Row key={name} name={name}>
            {kWh(value)}
          </Row>
        ))}
      {energy.patternKWh >= 0.05 ? (
        <Row name="Given by the burning pattern">{`−${kWh(energy.patternKWh)}`}</Row>
      ) : null}
    </Sheet>
  );
}

const FILL_WORDS = {
  'likely-fills': 'likely fills',
  'may-misrun': 'may misrun',
  'likely-misruns': 'likely misruns',
} as const;

function furnaceRows(pour: PourEstimate, at: (timeS: number) => string): ReactNode {
  const fuel = pour.fuelKg > 0 ? `, ${formatNumber(pour.fuelKg, 1)}${THIN_SPACE}kg fuel` : '';
  return (
    <>
      <Row name="Heat of charge and crucible">
        {`${kWh(pour.heatKWh)} ± ${formatNumber(pour.chargeErrorKWh, 1)}`}
      </Row>
      {pour.inputKWh === null || pour.meltS === null ? null : (
        <Row name="Melting">{`${formatDuration(Math.round(pour.meltS / 60) * 60)}, ${kWh(pour.inputKWh)}${fuel}${pour.cost ? `, ${moneyText(pour.cost)}` : ''}`}</Row>
      )}
      {pour.furnaceStartS === null || pour.metalReadyS === null ? null : (
        <>
          <Row name="Light the furnace">{at(pour.furnaceStartS)}</Row>
          <Row name="Metal ready">{at(pour.metalReadyS)}</Row>
        </>
      )}
      {pour.atS === null ? null : <Row name="Pour">{at(pour.atS)}</Row>}
    </>
  );
}

function Pour({ pour, load, at }: { pour: PourEstimate; load: Load; at: (timeS: number) => string }) {
  const units = useUnits();
  const temp = (tempC: number): string => formatTemperature(tempC, units.temperature);
  const metal = findMaterial('metals', load.pour?.metal ?? '')?.name ?? 'metal';
  return (
    <Sheet
      title={`The pour: ${metal}`}
      foot="Component sum of the charge, the furnace’s input and efficiency, heat lost in the open. Whether a section fills is known to a factor of two in time; the flow of metal and gas in the mould are not computed."
    >
      {furnaceRows(pour, at)}
      <Row name="Metal as it enters the mould">
        {`${temp(pour.metalAtPourC)}, ${formatInterval(pour.metalAtPourC - pour.liquidusC, units.temperature)} above its liquidus`}
      </Row>
      <Row name="May be carried for">{formatDuration(Math.round(pour.metalWindowS))}</Row>
      {pour.moulds.map(({ mould, coreAtPourC, fill }) => (
        <Row key={mould} name={nameOf(load, mould)}>
          {`core ${temp(coreAtPourC)}${fill ? `, thinnest section ${FILL_WORDS[fill.judgement]}` : ''}`}
        </Row>
      ))}
    </Sheet>
  );
}

const nameOf = (load: Load, index: number): string => {
  const mould = load.moulds[index];
  return mould ? `${mould.count} × ${mould.label || mouldName(mould.material)}` : '';
};

function Pieces({ split, load }: { readonly split: Estimate['split']; readonly load: Load }) {
  const units = useUnits();
  return (
    <Sheet title="What each bears" foot="By mass with water and pattern; shelves and the kiln belong to all.">
      {split.map(({ mould, massKg, share, energyKWh, cost }) => (
        <Row key={mould} name={nameOf(load, mould)}>
          {`${formatMass(massKg, units.mass)}, ${Math.round(share * 100)} %: ${cost ? `${moneyText(cost)}, ` : ''}${kWh(energyKWh)}`}
        </Row>
      ))}
    </Sheet>
  );
}

/** What the firing comes to besides its curves: where the heat goes, the pour, and what each line of moulds bears. */
export function Outcome({ estimate, load, startMs, zone }: OutcomeProps) {
  return (
    <details className="outcome">
      <summary>Where the heat goes{estimate.pour ? ', the pour' : ''} and what it costs each</summary>
      <div className="outcome-sheets">
        <Energy {...estimate} />
        {estimate.pour && load ? (
          <Pour pour={estimate.pour} load={load} at={(timeS) => momentText(timeS, startMs, zone)} />
        ) : null}
        {estimate.split.length > 0 && load ? <Pieces split={estimate.split} load={load} /> : null}
      </div>
    </details>
  );
}
