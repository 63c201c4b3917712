import type { RefusalCode } from '../refusal.ts';

/** The one table from reasons to HTTP statuses. */
export const statusOf: Record<RefusalCode, number> = {
  invalid: 400,
  param: 400,
  format: 400,
  unauthenticated: 401,
  forbidden: 403,
  origin: 403,
  'not-found': 404,
  method: 405,
  conflict: 409,
  duplicate: 409,
  fingerprint: 409,
  'in-use': 409,
  'run-closed': 409,
  quarantined: 409,
  'too-large': 413,
  'media-type': 415,
  infeasible: 422,
  limit: 422,
  busy: 429,
  internal: 500,
  storage: 503,
};
