import type { BuildFailure } from '@workers/build/api.ts';
import { refusalOfFailure } from '../../jobs/worker-refusal.ts';
import type { Refusal } from '../../refusal.ts';

/** An engine error out of a build, by the names that the request for it uses. */
export const refusalOfBuild = (failure: BuildFailure): Refusal | Error => refusalOfFailure(failure, fieldOf);

/** The engine names a family's parameter; the request holds it under `design.params`. */
function fieldOf(param: string): string {
  if (param.startsWith('design.') || param.startsWith('derivation.')) return param;
  if (param === 'family' || param.startsWith('params')) return `design.${param}`;
  if (param === 'checks' || param === 'kind' || param.startsWith('transforms')) return `derivation.${param}`;
  return `design.params.${param}`;
}
