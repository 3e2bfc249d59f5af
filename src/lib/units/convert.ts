/** Exact by definition: the international pound and inch (1959). */
export const KG_PER_LB = 0.45359237;
export const M_PER_IN = 0.0254;
/** kWh in a million British thermal units (International Table, 1055.05585262 J). */
export const KWH_PER_MILLION_BTU = 1055.05585262 / 3.6;
/** kWh in a US therm (105.4804 MJ). */
export const KWH_PER_THERM = 105.4804 / 3.6;
/** Litres in a US gallon. */
export const L_PER_US_GALLON = 3.785411784;

/** A reading in °F as °C. For a difference or a rate use {@link fIntervalToC}. */
export const fToC = (tempF: number): number => ((tempF - 32) * 5) / 9;
/** A reading in °C as °F. For a difference or a rate use {@link cIntervalToF}. */
export const cToF = (tempC: number): number => (tempC * 9) / 5 + 32;
/** A difference in °F, or a rate in °F per anything, as °C: × 5/9 and never − 32. */
export const fIntervalToC = (intervalF: number): number => (intervalF * 5) / 9;
/** A difference in °C, or a rate in °C per anything, as °F. */
export const cIntervalToF = (intervalC: number): number => (intervalC * 9) / 5;
