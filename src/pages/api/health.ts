import type { APIRoute } from 'astro';
import { programVersion } from '@/server/version.ts';

/** Whether the server answers and its database is ready (the middleware has seen to that before). */
export const GET: APIRoute = () =>
  Response.json({ ok: true, version: programVersion }, { headers: { 'Cache-Control': 'no-store' } });
