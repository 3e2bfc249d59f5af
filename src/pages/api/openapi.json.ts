import type { APIRoute } from 'astro';
import { json, methodNotAllowed } from '~/lib/server/http/endpoint';
import { openApiDocument } from '~/lib/server/openapi';

export const GET: APIRoute = () => json(openApiDocument());
export const ALL = methodNotAllowed({ GET });
