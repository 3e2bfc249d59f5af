import { loadSchema } from '../thermal/load-schema';
import { z } from '../zod';
import {
  idSchema,
  instantSchema,
  listOf,
  listQuerySchema,
  noteSchema,
  personSchema,
  revisionSchema,
  wordsSchema,
} from './common';
import { defineRoute } from './route';
import { profileSchema } from '../profile/schema';

export const RUN_STATES = ['planned', 'under-way', 'cooling-down', 'closed', 'broken-off'] as const;
export const runStateSchema = z.enum(RUN_STATES);

export const runSchema = z.strictObject({
  id: idSchema,
  number: z.number().int().min(1),
  state: runStateSchema,
  revision: revisionSchema,
  kiln: z.strictObject({ id: idSchema, name: z.string() }),
  profile: z.strictObject({
    id: idSchema,
    name: z.string(),
    version: z.number().int(),
    versionId: idSchema,
    state: z.string(),
  }),
  /** The profile as planned or, once frozen, as fired. */
  plan: profileSchema,
  load: loadSchema.nullable(),
  plannedStartAt: instantSchema,
  startedAt: instantSchema.nullable(),
  finishedAt: instantSchema.nullable(),
  closedAt: instantSchema.nullable(),
  brokenOffReason: z.string(),
  note: z.string(),
  recorders: z.array(personSchema),
  handoutId: idSchema.nullable(),
  logs: z.array(
    z.strictObject({
      id: idSchema,
      fileName: z.string(),
      bytes: z.number().int(),
      createdAt: instantSchema,
      current: z.boolean(),
    }),
  ),
  /** One sentence once a log has been reviewed. */
  verdict: z.string().nullable(),
  openFindings: z.number().int(),
  findings: z.number().int(),
  signOff: z.strictObject({ by: personSchema, at: instantSchema, remark: z.string() }).nullable(),
});
export type Run = z.infer<typeof runSchema>;

const one = '/api/runs/{id}' as const;
export const runRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/runs',
    summary: 'List runs',
    response: listOf(runSchema),
    query: listQuerySchema.extend({
      state: runStateSchema.optional(),
      kilnId: idSchema.optional(),
      profileId: idSchema.optional(),
    }),
  }),
  create: defineRoute({
    method: 'POST',
    path: '/api/runs',
    summary: 'Plan a run',
    status: 201,
    response: runSchema,
    problems: [409, 422],
    body: z.strictObject({
      kilnId: idSchema,
      profileVersionId: idSchema,
      load: loadSchema.nullable().optional(),
      plannedStartAt: instantSchema,
      recorderIds: z.array(idSchema).max(50).optional(),
      handoutId: idSchema.nullable().optional(),
      note: noteSchema.optional(),
    }),
  }),
  get: defineRoute({ method: 'GET', path: one, summary: 'A run', response: runSchema }),
  update: defineRoute({
    method: 'PATCH',
    path: one,
    summary: 'Change a planned run, or its note',
    revision: true,
    response: runSchema,
    problems: [409],
    body: z.strictObject({
      kilnId: idSchema.optional(),
      load: loadSchema.nullable().optional(),
      plannedStartAt: instantSchema.optional(),
      recorderIds: z.array(idSchema).max(50).optional(),
      note: noteSchema.optional(),
    }),
  }),
  start: defineRoute({
    method: 'POST',
    path: `${one}/start`,
    summary: 'Start the firing',
    body: z.strictObject({ startedAt: instantSchema.optional() }),
    response: runSchema,
    problems: [409],
  }),
  finish: defineRoute({
    method: 'POST',
    path: `${one}/finish`,
    summary: 'Heating is over; the kiln cools',
    body: z.strictObject({ finishedAt: instantSchema.optional() }),
    response: runSchema,
    problems: [409],
  }),
  abandon: defineRoute({
    method: 'POST',
    path: `${one}/abandon`,
    summary: 'Break the run off',
    body: z.strictObject({ reason: wordsSchema(2000) }),
    response: runSchema,
    problems: [409],
  }),
  signOff: defineRoute({
    method: 'POST',
    path: `${one}/sign-off`,
    summary: 'Sign the review; the run is closed',
    body: z.strictObject({ remark: noteSchema.default('') }),
    response: runSchema,
    problems: [409],
  }),
};

// ------------------------------------------------------------------ findings and the review
export const FINDING_KINDS = [
  'overshoot',
  'undershoot',
  'late',
  'too-steep',
  'cooled-too-fast',
  'stalled',
  'hold-short',
  'hold-long',
  'opened',
  'power-cut',
  'sensor-open',
  'sensor-spike',
  'sensor-stuck',
  'channels-disagree',
  'gap',
  'clock-jump',
  'ended-early',
] as const;
export const findingKindSchema = z.enum([...FINDING_KINDS, 'other']);

const followUpSchema = z.strictObject({
  text: z.string().trim().min(1).max(2000),
  dueAt: instantSchema.nullable(),
  doneAt: instantSchema.nullable(),
});
const maybe = z.number().nullable();

export const findingSchema = z.strictObject({
  id: idSchema,
  revision: revisionSchema,
  kind: findingKindSchema,
  severity: z.enum(['note', 'warn', 'serious']),
  origin: z.enum(['computed', 'person']),
  state: z.enum(['open', 'confirmed', 'dismissed']),
  channelId: idSchema.nullable(),
  segment: z.number().int().nullable(),
  startS: z.number(),
  endS: z.number(),
  peakC: maybe,
  byC: maybe,
  byS: maybe,
  byCPerH: maybe,
  holdLostS: maybe,
  /** The segment asked for it: an opening to drain the tray. */
  expected: z.boolean(),
  /** One line with the figures in it. */
  text: z.string(),
  remark: z.string(),
  followUp: followUpSchema.nullable(),
  decidedBy: personSchema.nullable(),
  decidedAt: instantSchema.nullable(),
});
export type Finding = z.infer<typeof findingSchema>;

export const findingRoutes = {
  list: defineRoute({
    method: 'GET',
    path: `${one}/findings`,
    summary: 'Findings of a run, by time',
    query: listQuerySchema,
    response: listOf(findingSchema),
  }),
  create: defineRoute({
    method: 'POST',
    path: `${one}/findings`,
    summary: 'Add a finding by hand',
    status: 201,
    response: findingSchema,
    body: z.strictObject({
      kind: findingKindSchema,
      severity: z.enum(['note', 'warn', 'serious']).default('warn'),
      startS: z.number().min(-86400).max(1.3e6),
      endS: z.number().min(-86400).max(1.3e6),
      remark: noteSchema.default(''),
      channelId: idSchema.nullable().optional(),
    }),
  }),
  update: defineRoute({
    method: 'PATCH',
    path: `${one}/findings/{findingId}`,
    summary: 'Confirm, dismiss, remark, follow up',
    revision: true,
    response: findingSchema,
    body: z.strictObject({
      state: z.enum(['open', 'confirmed', 'dismissed']).optional(),
      remark: noteSchema.optional(),
      followUp: followUpSchema.nullable().optional(),
    }),
  }),
};

export const reviewSchema = z.strictObject({
  runId: idSchema,
  logId: idSchema,
  verdict: z.string(),
  /** Instant of run second 0, as aligned. */
  startAt: instantSchema,
  alignment: z.strictObject({
    method: z.enum(['clock', 'fit', 'person']),
    confidence: z.number(),
    startOffsetS: z.number(),
  }),
  segments: z.array(
    z.strictObject({
      startS: z.number(),
      arrivedS: maybe,
      endS: z.number(),
      rateCPerH: maybe,
      plannedRateCPerH: maybe,
      holdS: z.number(),
      plannedHoldS: z.number(),
      inBandS: z.number(),
      peakC: maybe,
      energyKWh: maybe,
      text: z.string(),
    }),
  ),
  figures: z.strictObject({
    peakC: maybe,
    largestDeviationC: maybe,
    rmsC: maybe,
    p95C: maybe,
    inBandShare: maybe,
    delayS: maybe,
    heatWorkH: maybe,
    plannedHeatWorkH: maybe,
    energyKWh: maybe,
    estimatedKWh: maybe,
    toleranceC: maybe,
    byStage: z.array(z.strictObject({ stage: z.string(), rmsC: maybe, p95C: maybe })),
  }),
});
export type Review = z.infer<typeof reviewSchema>;

const polyline = z.strictObject({ timeS: z.array(z.number()), valueC: z.array(z.number()) });
export const seriesSchema = z.strictObject({
  fromS: z.number(),
  toS: z.number(),
  planned: polyline,
  carried: polyline.nullable(),
  predicted: polyline.nullable(),
  channels: z.array(
    z.strictObject({
      id: idSchema,
      name: z.string(),
      role: z.string(),
      unit: z.string(),
      timeS: z.array(z.number()),
      min: z.array(z.number().nullable()),
      max: z.array(z.number().nullable()),
      mean: z.array(z.number().nullable()),
    }),
  ),
  samplesInWindow: z.number().int(),
  samplesPerPoint: z.number(),
});
export type Series = z.infer<typeof seriesSchema>;

export const reviewRoutes = {
  review: defineRoute({
    method: 'GET',
    path: `${one}/review`,
    summary: 'Verdict, figures and segments as they really went',
    response: reviewSchema,
  }),
  series: defineRoute({
    method: 'GET',
    path: `${one}/series`,
    summary: 'Plan, prediction and measurement over a window',
    response: seriesSchema,
    query: z.strictObject({
      fromS: z.coerce.number().min(-1.3e6).max(1.3e6).optional(),
      toS: z.coerce.number().min(-1.3e6).max(2.6e6).optional(),
      points: z.coerce.number().int().min(10).max(5000).default(1500),
    }),
  }),
};
