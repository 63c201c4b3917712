import { defineMiddleware } from 'astro:middleware';
import { identify } from './server/auth/identity.ts';
import { database, ready, type Seeder } from './server/db/database.ts';
import { checkOrigin } from './server/http/check-origin.ts';
import { errorResponse } from './server/http/error-response.ts';
import { anyUser } from './server/repositories/users.ts';

// Loaded only where there may be something to seed.
const seedDemo: Seeder = async (db) =>
  (await anyUser(db)) === false && (await import('../db/seeds/demo.ts')).seedDemo(db);

/** Before every route: the database is ready, the change comes from our own pages or bears a token, and
 *  `locals.user` says who asks.
 *  Headers are set in src/server/main.mjs, where static files pass too. */
export const onRequest = defineMiddleware(async (context, next) => {
  const { request, url, locals } = context;
  locals.user = null;
  locals.by = null;
  try {
    await ready(seedDemo);
    const identity = await identify(database(), request);
    // No browser adds a token by itself, so a request that bears one is nobody's forgery.
    if (identity?.by.kind !== 'token') checkOrigin(request, url.origin);
    locals.user = identity?.user ?? null;
    locals.by = identity?.by ?? null;
  } catch (error) {
    const refusal = errorResponse(error, `${request.method} ${url.pathname}`);
    return url.pathname.startsWith('/api/') ? refusal : asText(refusal);
  }
  return next();
});

/** For pages: the same refusal in words, since no page can be rendered without its database. */
async function asText(refusal: Response): Promise<Response> {
  const { error } = await refusal.json();
  const headers = { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' };
  return new Response(`Blockwright: ${error.message}\n`, { status: refusal.status, headers });
}
