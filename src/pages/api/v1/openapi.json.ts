import type { APIRoute } from 'astro';
import { openApiDocument } from '@/server/http/openapi.ts';

export const GET: APIRoute = () => Response.json(openApiDocument());
