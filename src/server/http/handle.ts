import type { APIContext, APIRoute } from 'astro';
import type { z } from 'zod';
import type { Endpoint } from '@/api/endpoint.ts';
import { type Admission, demandScope } from '../auth/identity.ts';
import type { Context } from '../context.ts';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { errorResponse } from './error-response.ts';
import { readJson } from './read-json.ts';

export interface Call<E extends Endpoint> extends Context {
  /** Path parameters: every address that has one calls the first `id`; a file's second is its `name`. */
  params: { id: string; name: string };
  query: z.output<E['query']>;
  body: z.output<E['body']>;
  request: Request;
  by: Admission;
}

type Answer<E extends Endpoint> = z.input<E['response']> | Response | Reply<E>;

/** An answer with another status than the endpoint's usual one. */
export class Reply<E extends Endpoint> {
  constructor(
    readonly status: number,
    readonly body: z.input<E['response']>,
  ) {}
}

const usualBodyLimitBytes = 1024 * 1024;

/** A route: parses by the endpoint's schemas, demands a signed-in caller or a token of the right
 *  scope, lets `work` call its use case, and answers
 *  in the interface's shapes only. Rights to the object are the use case's to check. */
export function handle<E extends Endpoint>(
  endpoint: E,
  work: (call: Call<E>) => Promise<Answer<E>>,
  { bodyLimitBytes = usualBodyLimitBytes } = {},
): APIRoute {
  return async (api) => {
    try {
      const answer = await work(await parse(endpoint, api, bodyLimitBytes));
      return answer instanceof Response ? answer : serialise(endpoint, answer);
    } catch (error) {
      return errorResponse(error, `${endpoint.method} ${api.url.pathname}`);
    }
  };
}

async function parse<E extends Endpoint>(
  endpoint: E,
  { request, url, params, locals }: APIContext,
  bodyLimitBytes: number,
): Promise<Call<E>> {
  if (!locals.user || !locals.by) throw new Refusal('unauthenticated', 'Sign in first, or send a token.');
  demandScope(endpoint, locals.by);
  const query = endpoint.query.parse(Object.fromEntries(url.searchParams));
  const takesBody = endpoint.takes === 'json' && endpoint.method !== 'GET' && endpoint.method !== 'DELETE';
  const body = takesBody ? endpoint.body.parse(await readJson(request, bodyLimitBytes)) : undefined;
  return {
    db: database(),
    caller: locals.user,
    params: { id: params.id ?? '', name: params.name ?? '' },
    query: query as z.output<E['query']>,
    body: body as z.output<E['body']>,
    request,
    by: locals.by,
  };
}

function serialise<E extends Endpoint>(endpoint: E, answer: z.input<E['response']> | Reply<E>): Response {
  const reply = answer instanceof Reply ? answer : new Reply<E>(endpoint.success[0]!, answer);
  const headers = { 'Cache-Control': 'no-store' };
  if (reply.status === 204) return new Response(null, { status: 204, headers });
  return Response.json(endpoint.response.parse(reply.body), { status: reply.status, headers });
}

/** The answer to methods that an address does not take. */
export function methodNotAllowed(...methods: Endpoint['method'][]): APIRoute {
  return ({ request, url }) => {
    const message = `${url.pathname} does not take ${request.method}; accepted is ${methods.join(', ')}.`;
    const response = errorResponse(new Refusal('method', message), url.pathname);
    response.headers.set('Allow', methods.join(', '));
    return response;
  };
}
