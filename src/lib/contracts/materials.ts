import { materialsSchema } from '../materials/schema';
import { figuresSchema, studioFiguresSchema } from '../materials/studio-figures';
import { z } from '../zod';
import { noteSchema } from './common';
import { defineRoute } from './route';

export const materialRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/materials',
    summary:
      'The materials table, each value with its unit, source and confidence; and the studio’s own figures',
    response: materialsSchema.extend({ studioFigures: z.array(studioFiguresSchema) }),
  }),
  setFigures: defineRoute({
    method: 'POST',
    path: '/api/materials/{kind}/{id}/figures',
    summary: 'Put the studio’s own figures in place of the table’s for one material; none: the table’s again',
    body: z.strictObject({
      figures: figuresSchema,
      note: noteSchema.default(''),
      /** Of the figures as they were read; 0 where there were none. */
      revision: z.number().int().min(0),
    }),
    response: studioFiguresSchema,
    problems: [409, 422],
  }),
};
