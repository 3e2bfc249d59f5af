import { SAFETY_NOTES, type SafetyNote } from '../profile/safety';
import { CAUTION_CODES, cautionSchema } from '../thermal/estimate-schema';
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
  roleSchema,
  wordsSchema,
} from './common';
import { defineRoute } from './route';
import { versionSchema } from './profiles';

export const peopleRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/people',
    summary: 'People of the studio, by name; no addresses',
    query: listQuerySchema.extend({ role: roleSchema.optional() }),
    response: listOf(personSchema.extend({ roles: z.array(roleSchema) })),
  }),
};

export const classSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  term: z.string(),
  revision: revisionSchema,
  createdAt: instantSchema,
  archivedAt: instantSchema.nullable(),
  teacher: personSchema,
  members: z.array(personSchema),
});
export type StudioClass = z.infer<typeof classSchema>;

export const classRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/classes',
    summary: 'List classes',
    query: listQuerySchema,
    response: listOf(classSchema),
  }),
  create: defineRoute({
    method: 'POST',
    path: '/api/classes',
    summary: 'Begin a class',
    status: 201,
    response: classSchema,
    body: z.strictObject({
      name: nameSchema,
      term: z.string().trim().max(60).default(''),
      memberIds: z.array(idSchema).max(500).default([]),
    }),
  }),
  get: defineRoute({ method: 'GET', path: '/api/classes/{id}', summary: 'A class', response: classSchema }),
  update: defineRoute({
    method: 'PATCH',
    path: '/api/classes/{id}',
    summary: 'Change a class',
    revision: true,
    response: classSchema,
    body: z.strictObject({
      name: nameSchema.optional(),
      term: z.string().trim().max(60).optional(),
      memberIds: z.array(idSchema).max(500).optional(),
      archived: z.boolean().optional(),
    }),
  }),
};

/** A caution of the estimate, or a danger of the work itself; both are read and acknowledged. */
export const handoutCautionSchema = cautionSchema.extend({
  code: z.enum([...CAUTION_CODES, ...(Object.keys(SAFETY_NOTES) as SafetyNote[])]),
});
export type HandoutCaution = z.infer<typeof handoutCautionSchema>;

export const handoutSchema = z.strictObject({
  id: idSchema,
  profile: z.strictObject({ id: idSchema, name: z.string() }),
  version: versionSchema.pick({
    id: true,
    number: true,
    state: true,
    profile: true,
    load: true,
    sha256: true,
  }),
  kiln: z.strictObject({ id: idSchema, name: z.string() }),
  class: z.strictObject({ id: idSchema, name: z.string() }).nullable(),
  /** Those it is for. A student sees only their own entry. */
  people: z.array(personSchema.extend({ acknowledgedAt: instantSchema.nullable() })),
  fromAt: instantSchema,
  untilAt: instantSchema,
  note: z.string(),
  handedOutBy: personSchema,
  createdAt: instantSchema,
  withdrawnAt: instantSchema.nullable(),
  withdrawnReason: z.string(),
  state: z.enum(['ahead', 'in-force', 'over', 'withdrawn']),
  /** What a reader acknowledges, one by one. */
  cautions: z.array(handoutCautionSchema),
});
export type Handout = z.infer<typeof handoutSchema>;

export const handoutRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/handouts',
    summary: 'List handouts',
    query: listQuerySchema,
    response: listOf(handoutSchema),
  }),
  create: defineRoute({
    method: 'POST',
    path: '/api/handouts',
    summary: 'Hand an approved version to a class or to people',
    status: 201,
    response: handoutSchema,
    problems: [409, 422],
    body: z.strictObject({
      profileVersionId: idSchema,
      kilnId: idSchema,
      classId: idSchema.nullable().default(null),
      personIds: z.array(idSchema).max(500).default([]),
      fromAt: instantSchema,
      untilAt: instantSchema,
      note: noteSchema.default(''),
    }),
  }),
  get: defineRoute({
    method: 'GET',
    path: '/api/handouts/{id}',
    summary: 'A handout',
    response: handoutSchema,
  }),
  acknowledge: defineRoute({
    method: 'POST',
    path: '/api/handouts/{id}/acknowledge',
    summary: 'Say that the cautions were read',
    /** How many were read, checked against how many the handout shows; left out: all of them. */
    body: z.strictObject({ cautions: z.number().int().min(0).optional() }),
    response: handoutSchema,
    problems: [409],
  }),
  withdraw: defineRoute({
    method: 'POST',
    path: '/api/handouts/{id}/withdraw',
    summary: 'Withdraw a handout',
    body: z.strictObject({ reason: wordsSchema(2000) }),
    response: handoutSchema,
    problems: [409],
  }),
};
