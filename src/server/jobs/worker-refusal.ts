import type { WorkerFailure } from '@workers/failure.ts';
import { Refusal, type RefusalCode } from '../refusal.ts';

const engineCodes: readonly string[] = ['param', 'infeasible', 'limit', 'format'] satisfies RefusalCode[];

/** An engine error out of a worker, as the server's refusal; a defect of the program stays a plain error.
 *  @param fieldOf The request's own name for the engine's parameter. */
export function refusalOfFailure(
  { code, message, data }: WorkerFailure,
  fieldOf: (param: string) => string = (param) => param,
): Refusal | Error {
  if (!engineCodes.includes(code)) return new Error(`The worker failed: ${message}`);
  const accepted = typeof data.accepted === 'string' ? data.accepted : message;
  const fields = typeof data.param === 'string' ? { [fieldOf(data.param)]: accepted } : undefined;
  const reason =
    code === 'infeasible'
      ? { rule: String(data.rule), statement: String(data.statement), source: data.source }
      : undefined;
  return new Refusal(code as RefusalCode, message, { ...(fields && { fields }), ...(reason && { reason }) });
}
