export * from './tariff-schema';
export { minorDigits, shareOut, type Money } from './money';
export { localMinute, offsetSpans, zoneOffset, type OffsetMinutesAt } from './local-time';
export { costOf, priceAt, tariffFits, type Cost, type EnergyCurve, type PricePart } from './tariff-cost';
export { co2Of, fuelOf, type Co2 } from './fuel';
export { massesKg, splitCost, type CostShare } from './split';
