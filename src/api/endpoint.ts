import { z } from 'zod';
import type { Scope } from './tokens.ts';

/** One route of the HTTP interface, said once: the server parses by it, the client is typed by it, the OpenAPI
 *  description is made from it. Paths are relative to /api/v1 and name their parameters `:like-this`. */
export interface Endpoint<
  Q extends z.ZodType = z.ZodType,
  B extends z.ZodType = z.ZodType,
  R extends z.ZodType = z.ZodType,
> {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  path: string;
  summary: string;
  query: Q;
  body: B;
  response: R;
  /** Statuses of success, the usual one first. */
  success: readonly number[];
  /** What the body is: JSON by the schema, or a file as it is. */
  takes: 'json' | 'file';
  /** Any one of these lets a token in; with none, only a session does. */
  scopes: readonly Scope[];
}

const nothing = z.object({}).optional();

/** Unless its `scopes` say otherwise, an endpoint that only reads is open to tokens with `read`, and one that changes
 *  something to none. */
export function endpoint<
  Q extends z.ZodType = typeof nothing,
  B extends z.ZodType = typeof nothing,
  R extends z.ZodType = typeof nothing,
>(
  method: Endpoint['method'],
  path: string,
  summary: string,
  shapes: {
    query?: Q;
    body?: B;
    response?: R;
    success?: readonly number[];
    takes?: 'json' | 'file';
    scopes?: readonly Scope[];
  },
): Endpoint<Q, B, R> {
  return {
    method,
    path,
    summary,
    query: shapes.query ?? (nothing as unknown as Q),
    body: shapes.body ?? (nothing as unknown as B),
    response: shapes.response ?? (nothing as unknown as R),
    success: shapes.success ?? [200],
    takes: shapes.takes ?? 'json',
    scopes: shapes.scopes ?? (method === 'GET' ? ['read'] : []),
  };
}

/** The one shape of every refusal. `fields` says, field by field, what would be accepted. */
export const errorSchema = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    fields: z.record(z.string(), z.string()).optional(),
    /** Id of the object that is there already, for `duplicate`. */
    existing: z.string().optional(),
    /** The rule and source behind an `infeasible` refusal. */
    reason: z.object({ rule: z.string(), statement: z.string(), source: z.unknown() }).optional(),
  }),
});
export type ApiError = z.infer<typeof errorSchema>['error'];
