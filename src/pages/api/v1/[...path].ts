import type { APIRoute } from 'astro';
import { errorResponse } from '@/server/http/error-response.ts';
import { Refusal } from '@/server/refusal.ts';

/** Addresses of the interface that nothing answers to, in the interface's error shape. */
export const ALL: APIRoute = ({ url }) =>
  errorResponse(new Refusal('not-found', `Nothing is at ${url.pathname}; see /api/v1/openapi.json.`), url.pathname);
