/** Highest temperature of a thermocouple and where that is from. */
export interface ThermocoupleLimit {
  maxC: number;
  source: string;
}

const PROTECTED = 'Upper limits of protected thermocouples by type, ASTM E230, recalled';
const SHEATHED = 'Upper limits of mineral-insulated thermocouples by sheath, ASTM E608, recalled';

const BY_TYPE: Readonly<Record<string, number>> = {
  B: 1700,
  E: 870,
  J: 760,
  K: 1260,
  N: 1260,
  R: 1480,
  S: 1480,
  T: 370,
};

/** [smallest sheath in metres, limit of types K and N in °C], largest first. */
const SHEATHS: readonly (readonly [number, number])[] = [
  [0.0045, 1150],
  [0.003, 1070],
  [0.0023, 1000],
  [0.0015, 920],
  [0, 700],
];

/**
 * Limit of a thermocouple: what its studio states, else by type and, for types K and N, by the sheath of
 * mineral-insulated wire.
 */
export function thermocoupleLimit(of: {
  type: string;
  sheathM: number | null;
  maxC: number | null;
}): ThermocoupleLimit | null {
  if (of.maxC !== null) return { maxC: of.maxC, source: "The thermocouple's own limit, as entered" };
  const byType = Object.hasOwn(BY_TYPE, of.type) ? BY_TYPE[of.type] : undefined;
  if (byType === undefined) return null;
  if (of.sheathM === null || !['K', 'N'].includes(of.type)) return { maxC: byType, source: PROTECTED };
  const sheathM = of.sheathM;
  const bySheath = SHEATHS.find(([smallestM]) => sheathM >= smallestM - 1e-6)?.[1] ?? byType;
  return bySheath < byType ? { maxC: bySheath, source: SHEATHED } : { maxC: byType, source: PROTECTED };
}
