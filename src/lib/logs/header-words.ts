import type { ChannelRole, TemperatureUnit, ThermocoupleType } from './schema';

/** What the name over a column says of it, in any of the languages that loggers and their users write. */
export interface HeaderWords {
  /** Temperature unit or mV stated in the name. */
  temperatureUnit: TemperatureUnit | null;
  /** Any other unit stated: `%`, `kW`, `A`, `s`, … */
  otherUnit: string | null;
  role: ChannelRole | null;
  thermocouple: ThermocoupleType | null;
  power: boolean;
  /** Some quantity that is neither a temperature nor power: humidity, pressure, gas flow, a battery. */
  foreign: boolean;
  setpoint: boolean;
  /** Names a temperature or its sensor at all. */
  temperature: boolean;
}

const CELSIUS =
  /°\s*c(?![a-z])|º\s*c(?![a-z])|℃|\ufffdc(?![a-z])|(?:^|[^a-z])deg\.?[\s_]?c(?![a-z])|celsius|\bgradi c\b|\bc°/i;
const FAHRENHEIT =
  /°\s*f(?![a-z])|º\s*f(?![a-z])|℉|\ufffdf(?![a-z])|(?:^|[^a-z])deg\.?[\s_]?f(?![a-z])|fahrenheit/i;
const KELVIN = /°\s*k(?![a-z])|kelvin|(?:^|[^a-z])deg\.?[\s_]?k(?![a-z])/i;
/** A single letter as a unit: in brackets, behind a slash, or last. */
const LETTER = /(?:[[(/]\s*([CFK])\s*[\])]?\s*$|[\s_.,-]([CFK])\s*$|^([CFK])$|[[(]([CFK])[\])])/;
const MILLIVOLT = /(?:^|[^A-Za-z])mV(?![A-Za-z])|millivolt/;
const OTHER_UNIT =
  /[[(/\s_]\s*(%|kWh|kW|W|kVA|VA|A|V|s|sec|ms|min|h|hPa|mbar|bar|kPa|Pa|m3\/h|l\/min|rpm|Hz|ppm)\s*[\])]?\s*$/;
const PERCENT = /%|\bpct\b|_pct|percent|prozent|pour ?cent|por ?ciento/i;

const TYPE =
  /(?:type|typ|tipo|thermocouple|thermoelement|tc)[\s_(-]*([BEJKNRST])(?![A-Za-z])|(?:^|[\s_(])([BEJKNRST])[\s_-]?(?:type|typ|tc)(?![a-z])/i;

const wordList = (...words: string[]): RegExp => new RegExp(words.join('|'), 'i');
const JUNCTION = wordList(
  'cold.?junction', 'ref(erence)?.?junction', '\\bcjc?\\b', '\\bcjt\\b', 'junction', 'vergleichsstelle', 'kaltstelle', 'klemme',
  'soudure.?froide', 'giunto.?freddo', 'junta.?fr', 'uni[oó]n.?fr', 'koude.?las',
); // prettier-ignore
const SETPOINT = wordList(
  'set.?point', 'set.?value', '\\bs\\.?p\\b', '_sp\\b', '\\bsv\\b', 'target', 'soll', 'consigne', 'consigna', 'setpunt', 'program(me)?\\b',
  'planned', 'b[öo]rv[äa]rde', 'richtwert', 'obiettivo',
); // prettier-ignore
const ROOM = wordList(
  '\\broom\\b', 'ambient', 'umgebung', '(^|[^a-zä-ü])raum', 'zimmer', 'werkstatt', 'ambian', 'ambiente', 'pi[eè]ce', 'stanza', 'habitaci',
  'omgeving', 'kamertemp', '\\bindoor', '\\boutside\\b', 'au[sß]en', 'workshop', '\\bstudio\\b', '\\brum(s|temp)',
); // prettier-ignore
const CHAMBER = wordList(
  'chamber', 'kiln', 'oven', 'furnace', 'muffle', 'kammer', 'ofen', '[öo]fen', 'muffel', 'chambre', '\\bfours?\\b', 'enceinte', 'c[aá]mara',
  'horno', 'mufla', 'camera', 'forno', 'ugn', 'piec', 'kachel', 'brennraum', 'garraum', '\\bpv\\b', 'ist.?wert', 'process.?value',
); // prettier-ignore
const MOULD = wordList(
  'mou?ld', 'shell', 'schale', 'gie[sß]form', '(^|[^a-z])form(e|teil|kern)?($|[^a-z])', 'moule', 'coquille', 'molde', 'stampo', 'guscio',
  '\\bvorm', '\\bcore\\b', 'investment', 'carapace', 'cascar',
); // prettier-ignore
const LOAD = wordList(
  'flask', 'flasche', 'k[üu]vette', 'cilindro', 'cylindre', 'zylinder', '\\bload\\b', '\\bcharge', 'ware\\b', 'beschickung', 'besatz', 'carico',
  'carga', '\\bpiece\\b', '\\bpart\\b', 'werkst[üu]ck', 'cone\\b', 'crucible', 'tiegel', 'creuset', 'crisol', 'crogiolo', 'metal\\b', 'melt\\b',
  'furniture', 'shelf',
); // prettier-ignore
const POWER = wordList(
  'power', 'duty', 'output', '\\bout\\b', '\\bssr\\b', 'heater', 'heating', 'leistung', 'stellgr', 'stellwert', 'heizung', 'ausgang', 'puissance',
  'sortie', 'chauffe', 'potencia', 'salida', 'potenza', 'uscita', 'vermogen', 'effekt', 'element', '\\bop\\b', '\\bmv\\s*%', 'relay', 'relais', 'burner',
  'brenner', 'moc\\b',
); // prettier-ignore
const FOREIGN = wordList(
  'humid', 'feucht', '\\brh\\b', '\\brf\\b', 'r\\.h\\.', 'pressure', 'druck', 'pression', 'presi[oó]n', 'batter', 'akku', 'volt', 'current', 'strom',
  'curr', 'intensit', 'flow', 'durchfluss', 'd[ée]bit', 'caudal', 'oxygen', '\\bo2\\b', '\\bco2?\\b', 'weight', 'gewicht', 'poids', 'energy', 'energie',
  'status', 'alarm', 'error', 'fault', 'event', 'segment', 'step\\b', 'stage', 'phase', '\\bmode', 'signal', 'rssi', 'checksum', 'crc', 'fan\\b',
  'vent\\b', 'door', 'serial', '\\bid\\b', 'lat\\b', 'lon\\b', 'dew', 'rate\\b', 'slope',
); // prettier-ignore
const TEMPERATURE = wordList(
  'temp', '^t$', '(^|[^a-z])t\\s?\\d+', '(^|[^a-z])tc', '(^|[^a-z])te?\\s?[-_]?\\d+', 'thermo', 'fühler', 'fuehler', 'sensor', 'sonde', 'sonda',
  'probe', 'pyro', '\\bpt100', 'kanal', 'channel', '(^|[^a-z])ch[-_ ]?\\d', 'zone', 'messstelle', 'voie', 'canal', 'top\\b', 'upper', 'lower',
  'bottom', 'middle', 'oben', 'unten', 'mitte', '\\bhaut\\b', '\\bbas\\b', 'front', 'back\\b', 'rear', 'left', 'right',
); // prettier-ignore

/** Reads what a column's name says. */
export function headerWords(name: string): HeaderWords {
  const text = name.trim();
  const thermocouple = thermocoupleOf(text);
  const temperatureUnit = temperatureUnitOf(text);
  const setpoint = SETPOINT.test(text);
  const percent = PERCENT.test(text);
  const foreign = FOREIGN.test(text) && temperatureUnit === null;
  const otherUnit = temperatureUnit ? null : percent ? '%' : (OTHER_UNIT.exec(text)?.[1] ?? null);
  const power =
    temperatureUnit === null && !setpoint && !/humid|feucht|\br[hf]\b/i.test(text) &&
    (POWER.test(text) || ['%', 'kW', 'W', 'kVA', 'VA'].includes(otherUnit ?? '')); // prettier-ignore
  return {
    temperatureUnit,
    otherUnit,
    role: roleOf(text, setpoint),
    thermocouple,
    power,
    foreign: foreign && !power,
    setpoint,
    temperature: TEMPERATURE.test(text) || CHAMBER.test(text) || MOULD.test(text) || LOAD.test(text),
  };
}

/** The unit of a cell in a units row or behind a word such as “Unit:”, and whether it is one at all. */
export function unitCell(cell: string): { temperature: TemperatureUnit | null; other: string | null } | null {
  const text = cell.trim().replace(/^[[({<]\s*|\s*[\])}>]$/g, '');
  const bracketed = text.length <= 12 && /^[[({<].*[\])}>]$/.test(cell.trim());
  if (text === '' || /^[-–—]+$/.test(text)) return { temperature: null, other: null };
  if (
    /^(?:°|º|\ufffd|deg\.?\s?|grad\s?)?c°?$|^℃$|^(?:grad |degrees? |gradi |degr[eé]s )?celsius$/i.test(text)
  ) {
    return { temperature: 'C', other: null };
  }
  if (/^(?:°|º|\ufffd|deg\.?\s?)?f$|^℉$|^(?:degrees? )?fahrenheit$/i.test(text))
    return { temperature: 'F', other: null };
  if (/^(?:°|deg\.?\s?)?k$|^kelvin$/i.test(text)) return { temperature: 'K', other: null };
  if (/^m[vV]$|^millivolts?$/i.test(text)) return { temperature: 'mV', other: null };
  if (bracketed || UNIT_WORD.test(text)) return { temperature: null, other: text };
  return null;
}
const UNIT_WORD =
  /^(?:%|% ?r\.?h\.?|pct|k?W|k?Wh|k?VA|m?A|V|s|sec(onds?)?|sek(unden)?|ms|min(ute[sn]?)?|h|hours?|stunden|d|days?|hPa|m?bar|k?Pa|[mk]?g|m|mm|cm|Hz|rpm|ppm|m3\/h|l\/min|text|[dDmMyYhHsSjJaATt:./ -]{4,23}|utc|local|iso(?: ?8601)?|-|—|#|unix|epoch|bool)$/i;

function thermocoupleOf(text: string): ThermocoupleType | null {
  const found = TYPE.exec(text);
  const letter = (found?.[1] ?? found?.[2])?.toUpperCase();
  return (letter ?? null) as ThermocoupleType | null;
}

function temperatureUnitOf(text: string): TemperatureUnit | null {
  if (MILLIVOLT.test(text)) return 'mV';
  if (CELSIUS.test(text)) return 'C';
  if (FAHRENHEIT.test(text)) return 'F';
  if (KELVIN.test(text)) return 'K';
  const bare = text.replace(TYPE, ' ');
  const found = LETTER.exec(bare === ' ' ? '' : bare);
  const letter = found?.[1] ?? found?.[2] ?? found?.[3] ?? found?.[4];
  if (!letter || /(?:zone|channel|kanal|probe|sensor|group|line|bank|canal|voie)[\s_-]*[CFK]$/i.test(text))
    return null;
  return letter as TemperatureUnit;
}

function roleOf(text: string, setpoint: boolean): ChannelRole | null {
  if (JUNCTION.test(text)) return 'junction';
  if (setpoint) return 'other';
  if (/kiln.?room|furnace.?room|oven.?room/i.test(text)) return 'room';
  if (MOULD.test(text)) return 'mould';
  if (LOAD.test(text)) return 'load';
  if (CHAMBER.test(text)) return 'chamber';
  if (ROOM.test(text)) return 'room';
  return null;
}
