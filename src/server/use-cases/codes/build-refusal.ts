import type { BuildFailure } from '@workers/build/api.ts';
import { Refusal, type RefusalCode } from '../../refusal.ts';

const engineCodes: readonly string[] = ['param', 'infeasible', 'limit', 'format'] satisfies RefusalCode[];

/** An engine error out of a worker, as the server's refusal; a defect of the program stays a plain error. */
export function refusalOfBuild(failure: BuildFailure): Refusal | Error {
  const { code, message, data } = failure;
  if (!engineCodes.includes(code)) return new Error(`The build worker failed: ${message}`);
  const fields = typeof data.param === 'string' ? { [fieldOf(data.param)]: acceptedOf(data, message) } : undefined;
  const reason =
    code === 'infeasible'
      ? { rule: String(data.rule), statement: String(data.statement), source: data.source }
      : undefined;
  return new Refusal(code as RefusalCode, message, { ...(fields && { fields }), ...(reason && { reason }) });
}

const acceptedOf = (data: Record<string, unknown>, message: string): string =>
  typeof data.accepted === 'string' ? data.accepted : message;

/** The engine names a family's parameter; the request holds it under `design.params`. */
function fieldOf(param: string): string {
  if (param.startsWith('design.') || param.startsWith('derivation.')) return param;
  if (param === 'family' || param.startsWith('params')) return `design.${param}`;
  if (param === 'checks' || param === 'kind' || param.startsWith('transforms')) return `derivation.${param}`;
  return `design.params.${param}`;
}
