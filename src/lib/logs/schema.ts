import { z } from '../zod';

/** Letter-designated thermocouples of ITS-90 reference functions. */
export const THERMOCOUPLE_TYPES = ['B', 'E', 'J', 'K', 'N', 'R', 'S', 'T'] as const;
export const thermocoupleTypeSchema = z.enum(THERMOCOUPLE_TYPES);
export type ThermocoupleType = z.infer<typeof thermocoupleTypeSchema>;

export const TEMPERATURE_UNITS = ['C', 'F', 'K', 'mV'] as const;
/** What a temperature channel may be logged in. */
export const temperatureUnitSchema = z.enum(TEMPERATURE_UNITS);
export type TemperatureUnit = z.infer<typeof temperatureUnitSchema>;

export const CHANNEL_QUANTITIES = ['temperature', 'emf', 'power', 'other'] as const;
export const CHANNEL_ROLES = ['chamber', 'mould', 'load', 'junction', 'room', 'other'] as const;
export const channelQuantitySchema = z.enum(CHANNEL_QUANTITIES);
export const channelRoleSchema = z.enum(CHANNEL_ROLES);
export type ChannelQuantity = z.infer<typeof channelQuantitySchema>;
export type ChannelRole = z.infer<typeof channelRoleSchema>;

export const DATE_ORDERS = ['dmy', 'mdy', 'ymd'] as const;
export const dateOrderSchema = z.enum(DATE_ORDERS);
export type DateOrder = z.infer<typeof dateOrderSchema>;

/** A column by its name in the header, or by its index from 0. */
const columnSchema = z.union([z.string().trim().min(1).max(200), z.number().int().min(0).max(999)]);

/** An IANA time zone that this runtime knows, or `UTC`. */
export const timeZoneSchema = z
  .string()
  .min(1)
  .max(80)
  .refine(isTimeZone, { message: 'not a time zone name such as Europe/Berlin' });

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en-GB', { timeZone: name }).resolvedOptions().timeZone.length > 0;
  } catch {
    return false;
  }
}

/** A person's answers to what a file leaves open, by the field names of the questions. `interval` is in seconds. */
export const mappingSchema = z.strictObject({
  dateOrder: dateOrderSchema.optional(),
  unit: temperatureUnitSchema.optional(),
  interval: z.coerce
    .number()
    .min(0.001)
    .max(7 * 86400)
    .optional(),
  timeZone: timeZoneSchema.optional(),
  timeColumn: columnSchema.optional(),
  controlColumn: columnSchema.optional(),
  thermocouple: thermocoupleTypeSchema.optional(),
  date: z.iso.date().optional(),
});
export type Mapping = z.infer<typeof mappingSchema>;

export type ParsedMapping =
  { ok: true; mapping: Mapping } | { ok: false; issues: { path: string; message: string }[] };

/** Reads a mapping as sent beside a file: JSON text or an object; nothing at all is an empty mapping. */
export function parseMapping(input: unknown): ParsedMapping {
  let value: unknown = input ?? {};
  if (typeof value === 'string') {
    if (value.trim() === '') value = {};
    else {
      try {
        value = JSON.parse(value);
      } catch {
        return { ok: false, issues: [{ path: 'mapping', message: 'not JSON' }] };
      }
    }
  }
  const parsed = mappingSchema.safeParse(value);
  if (parsed.success) return { ok: true, mapping: parsed.data };
  const issues = parsed.error.issues.map((issue) => ({
    path: ['mapping', ...issue.path].join('.'),
    message: issue.message,
  }));
  return { ok: false, issues };
}

export const QUESTION_FIELDS = [
  'dateOrder',
  'unit',
  'interval',
  'timeZone',
  'timeColumn',
  'controlColumn',
  'thermocouple',
  'date',
] as const;
const answerSchema = z.union([z.string(), z.number()]);

/** What a file leaves open. Empty `choices`: any value of that kind may be typed in. */
export const logQuestionSchema = z.strictObject({
  field: z.enum(QUESTION_FIELDS),
  choices: z.array(z.strictObject({ value: answerSchema, example: z.string() })),
  guess: answerSchema.nullable(),
});
export type LogQuestion = z.infer<typeof logQuestionSchema>;

export const ENCODINGS = ['utf-8', 'utf-8-bom', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type LogEncoding = (typeof ENCODINGS)[number];

export const DELIMITERS = [',', ';', '\t', '|'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

/** How the file's times were to be read: which of the kinds of §12 they are. */
export const TIME_KINDS = ['instant', 'local', 'clock', 'elapsed', 'none'] as const;
export type TimeKind = (typeof TIME_KINDS)[number];

export const dialectSchema = z.strictObject({
  encoding: z.enum(ENCODINGS),
  delimiter: z.enum(DELIMITERS),
  decimal: z.enum(['.', ',']),
  /** Physical line of the header from 1; null where the file has none. */
  headerLine: z.number().int().min(1).nullable(),
  /** The pattern of the times: `dd.MM.yyyy HH:mm:ss`, `epoch s`, `elapsed min`, … */
  time: z.string(),
  /** `instant`: the file fixes the moment itself; `local`: a wall clock with a date; `clock`: without; `elapsed`: a counter; `none`. */
  timeKind: z.enum(TIME_KINDS),
  /** The zone that local times were read in; null where the file fixes its moments itself or has only a counter. */
  timeZone: z.string().nullable(),
});
export type LogDialect = z.infer<typeof dialectSchema>;

const maybe = z.number().nullable();
/** One channel as read. `min`, `max` are in the file's unit; those ending in C in °C (null for other quantities). */
export const readChannelSchema = z.strictObject({
  name: z.string(),
  /** Index of its column in the file, from 0. */
  column: z.number().int().min(0),
  quantity: channelQuantitySchema,
  role: channelRoleSchema,
  /** The file's own unit: `C`, `F`, `K`, `mV`, `%`, `kW`, … or an empty string where it names none. */
  unit: z.string(),
  thermocouple: thermocoupleTypeSchema.nullable(),
  /** For emf: where the reference junction's temperature comes from, a channel of this report or a fixed °C. */
  junction: z
    .union([z.strictObject({ channel: z.number().int().min(0) }), z.strictObject({ tempC: z.number() })])
    .nullable(),
  samples: z.number().int().min(0),
  missing: z.number().int().min(0),
  min: maybe,
  max: maybe,
  minC: maybe,
  maxC: maybe,
  firstC: maybe,
  lastC: maybe,
  firstAt: z.iso.datetime().nullable(),
  lastAt: z.iso.datetime().nullable(),
  /** Texts found where a number was expected, with how often. At most 20 are told apart. */
  markers: z.array(
    z.strictObject({ text: z.string(), count: z.number().int(), kind: z.enum(['open', 'missing']) }),
  ),
});
export type ReadChannel = z.infer<typeof readChannelSchema>;

export const clockEventSchema = z.strictObject({
  /** Corrected instant of the first row after the step, ms since 1970 (elapsed logs: on the anchored axis). */
  atMs: z.number(),
  /** Seconds that were added to this and every later time. */
  shiftS: z.number(),
  kind: z.enum(['backward', 'restart']),
});
export type ClockEvent = z.infer<typeof clockEventSchema>;

/** What the reader alone can say of a file; the server adds ids, hash and alignment to make the import report. */
export const readReportSchema = z.strictObject({
  bytes: z.number().int(),
  rows: z.number().int(),
  acceptedRows: z.number().int(),
  rejectedRows: z.number().int(),
  /** The first 1,000 by physical line from 1. */
  rejected: z.array(z.strictObject({ line: z.number().int(), reason: z.string() })).max(1000),
  dialect: dialectSchema,
  channels: z.array(readChannelSchema),
  /** Index into `channels` of the channel the kiln is controlled by; null if there is no temperature at all. */
  controlChannel: z.number().int().nullable(),
  firstAt: z.iso.datetime().nullable(),
  lastAt: z.iso.datetime().nullable(),
  /** Median seconds between rows over the first rows. */
  intervalS: maybe,
  clockEvents: z.array(clockEventSchema),
  /** What was taken by evidence rather than stated in the file, one plain sentence each. */
  assumptions: z.array(z.string()),
  /** `ascending`: blocks came in time order; otherwise they must be ordered (and, if `overlapping`, merged) by time. */
  blockOrder: z.enum(['ascending', 'descending', 'overlapping']),
});
export type ReadReport = z.infer<typeof readReportSchema>;

/** The import report of the API. */
export const importReportSchema = readReportSchema.omit({ controlChannel: true, channels: true }).extend({
  logId: z.uuid(),
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  channels: z.array(readChannelSchema.extend({ id: z.uuid() })),
  controlChannelId: z.uuid().nullable(),
  /** Seconds from the first sample to the run's start, positive if the log begins earlier. */
  startOffsetS: z.number(),
  alignment: z.strictObject({
    method: z.enum(['clock', 'fit', 'person']),
    confidence: z.number().min(0).max(1),
  }),
});
export type ImportReport = z.infer<typeof importReportSchema>;
