import { materialsSchema } from '../materials/schema';
import { defineRoute } from './route';

export const materialRoutes = {
  list: defineRoute({
    method: 'GET',
    path: '/api/materials',
    summary: 'The materials table: each value with its unit, source and confidence',
    response: materialsSchema,
  }),
};
