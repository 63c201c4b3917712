import { ZodError } from 'zod';
import type { ApiError } from '@/api/endpoint.ts';
import { FormatError, InfeasibleError, LimitError, ParamError } from '@/core/errors.ts';
import { isStorageError } from '../db/storage-error.ts';
import { badFields, Refusal } from '../refusal.ts';
import { statusOf } from './error-status.ts';
import { fieldsOf } from './zod-fields.ts';

const retryAfterSeconds = '5';

/** Any error as the interface's one answer shape. What is not a refusal is a defect: it is logged, and the answer
 *  says no more than that. */
export function errorResponse(error: unknown, where: string): Response {
  const { code, message, detail } = asRefusal(error, where);
  const status = statusOf[code];
  const body: { error: ApiError } = { error: { code, message, ...detail } };
  const headers: Record<string, string> = { 'Cache-Control': 'no-store' };
  if (status === 503 || status === 429) headers['Retry-After'] = retryAfterSeconds;
  if (status === 401) headers['WWW-Authenticate'] = 'Bearer realm="Blockwright"';
  return Response.json(body, { status, headers });
}

function asRefusal(error: unknown, where: string): Refusal {
  if (error instanceof Refusal) return error;
  if (error instanceof ZodError) return badFields(fieldsOf(error));
  if (error instanceof ParamError) {
    return new Refusal('param', error.message, { fields: { [error.param]: error.accepted } });
  }
  if (error instanceof InfeasibleError) {
    const { rule, statement, source } = error;
    return new Refusal('infeasible', error.message, { reason: { rule, statement, source } });
  }
  if (error instanceof LimitError) return new Refusal('limit', error.message);
  if (error instanceof FormatError) return new Refusal('format', error.message);
  console.error(`${where}:`, error);
  if (isStorageError(error)) {
    const message =
      'The database cannot be read or written just now (disk full, read-only or locked). Nothing of this request was ' +
      'stored and nothing acknowledged before is lost; try again shortly.';
    return new Refusal('storage', message);
  }
  return new Refusal('internal', 'Something went wrong on the server; it has been logged.');
}
