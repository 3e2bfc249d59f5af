import { formatNumber, type Quantity } from '~/lib/units';

/** `6 kW`, `10.5 kW`: a decimal place only where there is something in it. */
export const kilowatts = (powerKW: number): Quantity => ({
  number: formatNumber(powerKW, Number.isInteger(powerKW) ? 0 : 1),
  unit: 'kW',
});
