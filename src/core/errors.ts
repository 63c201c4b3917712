/** The engine's four ways of saying no. Each carries a code for programs, data for forms, and a sentence that says
 *  what would be accepted. */

/** A published source: who, when, where, and which statement of it is used. */
export interface Citation {
  authors: string;
  year: number;
  title: string;
  where?: string;
  /** The theorem, table or page relied on. */
  part?: string;
}

abstract class EngineError extends Error {
  abstract readonly code: string;
  override get name(): string {
    return this.constructor.name;
  }
}

/** A parameter of the wrong kind, range or arithmetic. */
export class ParamError extends EngineError {
  readonly code = 'param';
  constructor(
    /** Name of the parameter, a path such as `params.q` when nested. */
    readonly param: string,
    readonly given: unknown,
    /** What would be accepted, as a phrase: "a prime power from 2 to 256". */
    readonly accepted: string,
  ) {
    super(`${param}: got ${describe(given)}; accepted is ${accepted}.`);
  }
}

/** Parameters that no object can have, with the rule that forbids them. */
export class InfeasibleError extends EngineError {
  readonly code = 'infeasible';
  constructor(
    /** Short id of the rule, e.g. `bruck-ryser-chowla`. */
    readonly rule: string,
    /** The rule applied to these parameters, in one sentence. */
    readonly statement: string,
    readonly source: Citation,
    readonly param?: string,
  ) {
    super(statement);
  }
}

/** The object may exist but passes what this program builds; says the limit. */
export class LimitError extends EngineError {
  readonly code = 'limit';
  constructor(
    readonly what: string,
    readonly given: number,
    readonly limit: number,
    readonly unit: string,
  ) {
    super(`${what}: ${given} ${unit} asked for; the limit here is ${limit} ${unit}.`);
  }
}

/** A file that is not what its format says, with the place. Lines and columns count from 1. */
export class FormatError extends EngineError {
  readonly code = 'format';
  constructor(
    readonly line: number,
    readonly column: number,
    readonly expected: string,
    readonly found: string,
  ) {
    super(`line ${line}, column ${column}: expected ${expected}, found ${found}.`);
  }
}

function describe(value: unknown): string {
  if (typeof value === 'string') return JSON.stringify(value.length > 40 ? `${value.slice(0, 40)}…` : value);
  if (typeof value === 'number' || typeof value === 'bigint' || typeof value === 'boolean') return String(value);
  if (value === null || value === undefined) return 'nothing';
  return Array.isArray(value) ? `a list of ${value.length}` : 'an object';
}
