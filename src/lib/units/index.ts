export * from './preferences';
export * from './convert';
export type { Parsed } from './parsed';
export { parseNumber } from './number';
export { parseInterval, parseRate, parseTemperature } from './temperature';
export { parseDuration } from './duration';
export { parseLength, parseMass } from './amount';
export * from './format';
export { DRAPER_POINT_C, glow, type Glow } from './glow';
