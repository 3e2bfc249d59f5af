import { profileSchema } from '../profile/schema';
import { estimateSchema } from '../thermal/estimate-schema';
import { loadSchema } from '../thermal/load-schema';
import { z } from '../zod';
import {
  idSchema,
  instantSchema,
  listOf,
  listQuerySchema,
  nameSchema,
  noteSchema,
  personSchema,
  revisionSchema,
  versionNumberSchema,
  wordsSchema,
} from './common';
import { describedKilnSchema } from './equipment';
import { defineRoute } from './route';

export const VERSION_STATES = ['draft', 'in-review', 'approved', 'retired'] as const;
export const versionStateSchema = z.enum(VERSION_STATES);

export const versionSchema = z.strictObject({
  id: idSchema,
  number: z.number().int().min(1),
  state: versionStateSchema,
  revision: revisionSchema,
  profile: profileSchema,
  kilnId: idSchema.nullable(),
  load: loadSchema.nullable(),
  /** Hex SHA-256 over the canonical JSON (RFC 8785) of `{ profile, kilnId, load }`. */
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  authorId: idSchema,
  createdAt: instantSchema,
  /** What happened to it, oldest first: submitted, approved with reasons, returned with remarks, retired. */
  events: z.array(
    z.strictObject({
      what: z.enum(['submitted', 'approved', 'returned', 'retired']),
      at: instantSchema,
      by: personSchema,
      note: z.string(),
      overrides: z.array(
        z.strictObject({ code: z.string(), segment: z.number().int().nullable(), reason: z.string() }),
      ),
      segmentRemarks: z.array(z.strictObject({ segment: z.number().int(), remark: z.string() })),
    }),
  ),
});
export type Version = z.infer<typeof versionSchema>;

const versionSummarySchema = versionSchema.pick({
  id: true,
  number: true,
  state: true,
  revision: true,
  sha256: true,
  authorId: true,
  createdAt: true,
  kilnId: true,
});

export const profileSummarySchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  revision: revisionSchema,
  author: personSchema,
  createdAt: instantSchema,
  updatedAt: instantSchema,
  archivedAt: instantSchema.nullable(),
  latest: versionSummarySchema,
  /** Of the latest version: for the list's small curve and figures. */
  peakC: z.number(),
  plannedS: z.number().nullable(),
  segments: z.number().int(),
  profile: profileSchema,
});
export type ProfileSummary = z.infer<typeof profileSummarySchema>;

export const profileDetailSchema = profileSummarySchema.extend({ versions: z.array(versionSummarySchema) });
export type ProfileDetail = z.infer<typeof profileDetailSchema>;

const contentSchema = z.strictObject({
  profile: profileSchema,
  kilnId: idSchema.nullable().optional(),
  load: loadSchema.nullable().optional(),
});

export const estimateRequestSchema = z
  .strictObject({
    profile: profileSchema,
    kilnId: idSchema.optional(),
    kiln: describedKilnSchema.optional(),
    load: loadSchema.optional(),
    ambientC: z.number().min(-30).max(50).default(20),
    startAt: instantSchema.optional(),
    tariffId: idSchema.optional(),
  })
  .refine((body) => (body.kilnId === undefined) !== (body.kiln === undefined), {
    message: 'give kilnId or kiln, one of them',
    path: ['kilnId'],
  });

const at = '/api/profiles/{id}/versions/{n}' as const;
export const profileRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/profiles',
    summary: 'List profiles',
    response: listOf(profileSummarySchema),
    query: listQuerySchema.extend({
      state: versionStateSchema.optional(),
      archived: z.enum(['no', 'yes', 'all']).default('no'),
    }),
  }),
  create: defineRoute({
    method: 'POST',
    path: '/api/profiles',
    summary: 'Begin a profile; its first version is a draft',
    status: 201,
    body: z.strictObject({
      name: nameSchema,
      kilnId: idSchema.nullable().optional(),
      profile: profileSchema,
      load: loadSchema.nullable().optional(),
    }),
    response: z.strictObject({
      id: idSchema,
      name: z.string(),
      revision: revisionSchema,
      version: versionSchema,
    }),
  }),
  get: defineRoute({
    method: 'GET',
    path: '/api/profiles/{id}',
    summary: 'A profile and its versions',
    response: profileDetailSchema,
  }),
  update: defineRoute({
    method: 'PATCH',
    path: '/api/profiles/{id}',
    summary: 'Rename, archive or bring back a profile',
    revision: true,
    response: profileDetailSchema,
    body: z.strictObject({ name: nameSchema.optional(), archived: z.boolean().optional() }),
  }),
  duplicate: defineRoute({
    method: 'POST',
    path: '/api/profiles/{id}/duplicate',
    summary: 'A new profile, drafted from a version of this one',
    status: 201,
    body: z.strictObject({ version: versionNumberSchema.optional(), name: nameSchema.optional() }),
    response: z.strictObject({
      id: idSchema,
      name: z.string(),
      revision: revisionSchema,
      version: versionSchema,
    }),
  }),
  createVersion: defineRoute({
    method: 'POST',
    path: '/api/profiles/{id}/versions',
    summary: 'A new draft version',
    status: 201,
    response: versionSchema,
    problems: [409],
    body: z.union([contentSchema, z.strictObject({ from: versionNumberSchema })]),
  }),
  getVersion: defineRoute({ method: 'GET', path: at, summary: 'One version', response: versionSchema }),
  putVersion: defineRoute({
    method: 'PUT',
    path: at,
    summary: 'Save a draft',
    body: contentSchema,
    revision: true,
    response: versionSchema,
    problems: [409],
  }),
  submit: defineRoute({
    method: 'POST',
    path: `${at}/submit`,
    summary: 'Submit for review',
    body: z.strictObject({ note: noteSchema.optional() }),
    response: versionSchema,
    problems: [409],
  }),
  approve: defineRoute({
    method: 'POST',
    path: `${at}/approve`,
    summary: 'Approve; the version is sealed',
    response: versionSchema,
    problems: [409, 422],
    body: z.strictObject({
      overrides: z
        .array(
          z.strictObject({
            code: z.string().max(60),
            segment: z.number().int().nullable(),
            reason: wordsSchema(2000),
          }),
        )
        .max(100)
        .default([]),
    }),
  }),
  return: defineRoute({
    method: 'POST',
    path: `${at}/return`,
    summary: 'Return to its author with remarks',
    response: versionSchema,
    problems: [409],
    body: z.strictObject({
      remark: wordsSchema(4000),
      segments: z
        .array(
          z.strictObject({
            segment: z.number().int().min(0).max(63),
            remark: wordsSchema(2000),
          }),
        )
        .max(64)
        .default([]),
    }),
  }),
  retire: defineRoute({
    method: 'POST',
    path: `${at}/retire`,
    summary: 'Retire an approved version',
    body: z.strictObject({ reason: wordsSchema(2000) }),
    response: versionSchema,
    problems: [409],
  }),
};

export const estimateRoutes = {
  estimate: defineRoute({
    method: 'POST',
    path: '/api/estimates',
    summary: 'What a firing will do, need and cost',
    response: estimateSchema,
    body: estimateRequestSchema,
    query: z.strictObject({ mould: z.coerce.number().int().min(0).max(59).optional() }),
    problems: [422],
  }),
};
