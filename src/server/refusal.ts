/** Why the server says no. One table in http/error-status.ts maps each to its HTTP status. */
export type RefusalCode =
  | 'invalid'
  | 'param'
  | 'infeasible'
  | 'limit'
  | 'format'
  | 'unauthenticated'
  | 'forbidden'
  | 'origin'
  | 'not-found'
  | 'method'
  | 'conflict'
  | 'duplicate'
  | 'fingerprint'
  | 'in-use'
  | 'run-closed'
  | 'quarantined'
  | 'too-large'
  | 'media-type'
  | 'busy'
  | 'storage'
  | 'internal';

export interface RefusalDetail {
  /** Each bad field and what is accepted in it. */
  fields?: Record<string, string>;
  /** The rule behind an `infeasible` refusal. */
  reason?: { rule: string; statement: string; source: unknown };
  /** Id of the object that is already there, for `duplicate`. */
  existing?: string;
}

export class Refusal extends Error {
  override readonly name = 'Refusal';
  constructor(
    readonly code: RefusalCode,
    message: string,
    readonly detail: RefusalDetail = {},
  ) {
    super(message);
  }
}

export const notFound = (what: string): Refusal =>
  new Refusal('not-found', `There is no such ${what}, or it is not shared with you.`);

const namedInMessage = 3;

/** A refusal of several fields at once. */
export function badFields(fields: Record<string, string>): Refusal {
  const entries = Object.entries(fields);
  const named = entries.slice(0, namedInMessage).map(([field, accepted]) => `${field}: accepted is ${accepted}`);
  const rest = entries.length - named.length;
  const message = `${named.join('; ')}${rest > 0 ? `; and ${rest} more` : ''}.`;
  return new Refusal('invalid', message, { fields });
}
