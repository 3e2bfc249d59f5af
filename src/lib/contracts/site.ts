import { z } from '../zod';
import { defineRoute } from './route';

export const siteRoutes = {
  health: defineRoute({
    method: 'GET',
    path: '/api/health',
    summary: 'Whether the service and its database are up; 503 while the database is away',
    response: z.strictObject({
      status: z.enum(['ok', 'unavailable']),
      database: z.enum(['ok', 'away']),
      version: z.string(),
    }),
    problems: [503],
  }),
};
