import { localMinute, offsetSpans, type OffsetMinutesAt } from './local-time';
import { add, decimal, type Decimal, money, type Money, multiply, quantity, ZERO } from './money';
import { fuelOf } from './fuel';
import type { TariffPlan } from './tariff-schema';

const MINUTE_MS = 60_000;
const DAY_MINUTES = 1440;

/** Energy taken in since the start, as it grows; straight lines between the moments. */
export interface EnergyCurve {
  timeS: ArrayLike<number>;
  energyKWh: ArrayLike<number>;
}

/** What was used at one price. */
export interface PricePart {
  price: string;
  /** kWh, kg or m³, as the tariff meters it. */
  amount: number;
}

export interface Cost {
  cost: Money;
  parts: PricePart[];
}

/** Whether a tariff prices what a kiln burns. */
export function tariffFits(
  plan: TariffPlan,
  kiln: { energy: 'electric' } | { energy: 'gas'; fuel: string },
): boolean {
  return kiln.energy === 'electric' ? plan.energy === 'electricity' : plan.energy === kiln.fuel;
}

/**
 * Cost of a firing: energy in each stretch of one price × that price, summed exactly and rounded once at the end.
 *
 * @param plan what the studio pays; fuel by mass or volume is metered on the higher heating value
 * @param curve energy since the start
 * @param startMs instant of the start, ms since 1970 UTC
 * @param offsetMinutesAt the studio's time zone, for prices by local time of use; a change of the clocks inside the
 *   firing is honoured
 */
export function costOf(
  plan: TariffPlan,
  curve: EnergyCurve,
  startMs: number,
  offsetMinutesAt: OffsetMinutesAt,
): Cost {
  const parts =
    plan.bands.length === 0 ? [flatPart(plan, curve)] : bandParts(plan, curve, startMs, offsetMinutesAt);
  const total = parts.reduce<Decimal>(
    (sum, { price, amount }) => add(sum, multiply(decimal(price), quantity(amount))),
    ZERO,
  );
  return { cost: money(total, plan.currency), parts };
}

function flatPart(plan: TariffPlan, { energyKWh }: EnergyCurve): PricePart {
  const totalKWh = (energyKWh[energyKWh.length - 1] ?? 0) - (energyKWh[0] ?? 0);
  return { price: plan.price, amount: meteredAmount(plan, totalKWh) };
}

function meteredAmount(plan: TariffPlan, energyKWh: number): number {
  if (plan.per === 'kWh' || plan.energy === 'electricity') return energyKWh;
  const { fuelKg, fuelM3 } = fuelOf(plan.energy, energyKWh);
  return plan.per === 'kg' ? fuelKg : fuelM3;
}

function bandParts(
  plan: TariffPlan,
  curve: EnergyCurve,
  startMs: number,
  offsetMinutesAt: OffsetMinutesAt,
): PricePart[] {
  const firstS = curve.timeS[0] ?? 0;
  const lastS = curve.timeS[curve.timeS.length - 1] ?? 0;
  const stretches = priceStretches(plan, startMs + firstS * 1000, startMs + lastS * 1000, offsetMinutesAt);
  const read = readerOf(curve);
  const byPrice = new Map<string, number>();
  let beforeKWh = read(firstS);
  for (const { toMs, price } of stretches) {
    const untilKWh = read((toMs - startMs) / 1000);
    byPrice.set(price, (byPrice.get(price) ?? 0) + untilKWh - beforeKWh);
    beforeKWh = untilKWh;
  }
  return [...byPrice].map(([price, energyKWh]) => ({ price, amount: meteredAmount(plan, energyKWh) }));
}

/** Stretches of one price in time order. */
export function priceStretches(
  plan: TariffPlan,
  fromMs: number,
  toMs: number,
  offsetMinutesAt: OffsetMinutesAt,
): { fromMs: number; toMs: number; price: string }[] {
  const edges = [
    ...new Set([0, ...plan.bands.flatMap((band) => [band.fromMinute, band.toMinute % DAY_MINUTES])]),
  ];
  edges.sort((a, b) => a - b);
  const stretches: { fromMs: number; toMs: number; price: string }[] = [];
  for (const span of offsetSpans(fromMs, toMs, offsetMinutesAt)) {
    let atMs = span.fromMs;
    while (atMs < span.toMs) {
      const { weekday, minute } = localMinute(atMs, span.offsetMinutes);
      const nextEdge = edges.find((edge) => edge > minute) ?? DAY_MINUTES;
      const wholeMinuteMs = Math.floor(atMs / MINUTE_MS) * MINUTE_MS;
      const untilMs = Math.min(span.toMs, wholeMinuteMs + (nextEdge - minute) * MINUTE_MS);
      stretches.push({ fromMs: atMs, toMs: untilMs, price: priceAt(plan, weekday, minute) });
      atMs = untilMs;
    }
  }
  return stretches;
}

/** Price at a local weekday and minute: the first band that holds, else the plan's own. A band may pass midnight. */
export function priceAt(plan: TariffPlan, weekday: number, minute: number): string {
  const yesterday = weekday === 1 ? 7 : weekday - 1;
  const found = plan.bands.find(({ days, fromMinute, toMinute }) => {
    if (fromMinute < toMinute) return days.includes(weekday) && minute >= fromMinute && minute < toMinute;
    return (
      (days.includes(weekday) && minute >= fromMinute) || (days.includes(yesterday) && minute < toMinute)
    );
  });
  return found?.pricePerKWh ?? plan.price;
}

/** Reads the curve at rising times in constant time each. */
function readerOf({ timeS, energyKWh }: EnergyCurve): (atS: number) => number {
  let at = 0;
  return (atS) => {
    while (at < timeS.length - 2 && (timeS[at + 1] ?? Infinity) <= atS) at += 1;
    const [t0 = 0, t1 = 0, e0 = 0, e1 = 0] = [timeS[at], timeS[at + 1], energyKWh[at], energyKWh[at + 1]];
    if (timeS.length < 2 || t1 === t0) return energyKWh[at] ?? 0;
    const share = Math.min(1, Math.max(0, (atS - t0) / (t1 - t0)));
    return e0 + (e1 - e0) * share;
  };
}
