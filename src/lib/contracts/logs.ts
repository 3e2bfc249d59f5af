import { importReportSchema, logQuestionSchema, mappingSchema } from '../logs/schema';
import { z } from '../zod';
import { idSchema, problemSchema, revisionSchema } from './common';
import { defineRoute } from './route';

/** The import report of one reading of a kept file. `revision` counts changes of its alignment. */
export const logSchema = importReportSchema.extend({
  runId: idSchema,
  fileName: z.string(),
  revision: revisionSchema,
  mapping: mappingSchema,
});
export type Log = z.infer<typeof logSchema>;

/** The 422 of a file that can be read in two ways: it is kept, and the questions say what to answer. */
export const logQuestionsSchema = problemSchema.extend({
  logId: idSchema,
  questions: z.array(logQuestionSchema),
});
export type LogQuestions = z.infer<typeof logQuestionsSchema>;

const one = '/api/runs/{id}/logs/{logId}' as const;
export const logRoutes = {
  upload: defineRoute({
    method: 'POST',
    path: '/api/runs/{id}/logs',
    status: 201,
    response: logSchema,
    problems: [409, 413, 415, 422],
    summary: 'Upload a thermocouple log; the same bytes and mapping again answer 200 with the first report',
    rawBody: 'multipart/form-data',
  }),
  get: defineRoute({ method: 'GET', path: one, summary: 'The import report of a log', response: logSchema }),
  align: defineRoute({
    method: 'PATCH',
    path: one,
    summary: 'Lay the log on the plan by hand, or by itself again',
    revision: true,
    response: logSchema,
    problems: [409],
    body: z.strictObject({
      alignment: z.discriminatedUnion('method', [
        z.strictObject({ method: z.literal('auto') }),
        z.strictObject({ method: z.literal('person'), startOffsetS: z.number().min(-1.3e6).max(1.3e6) }),
      ]),
    }),
  }),
  answer: defineRoute({
    method: 'POST',
    path: `${one}/answers`,
    summary: 'Answer the questions about a kept file',
    status: 201,
    response: logSchema,
    body: z.strictObject({ mapping: mappingSchema }),
    problems: [409, 422],
  }),
};
