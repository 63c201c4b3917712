import type { Code } from '@/api/codes.ts';
import { Refusal } from '../../refusal.ts';

type Derived = Pick<Code, 'derivation'>;

export const isWords = ({ derivation }: Derived): boolean => derivation.kind === 'constant-weight';

/** @throws Refusal for a constant-weight code, of which `what` cannot be told. */
export function refuseWords(code: Derived, what: string): void {
  if (!isWords(code)) return;
  const accepted = 'a code given by parity checks';
  throw new Refusal('param', `A constant-weight code has no parity checks, so no ${what}; accepted is ${accepted}.`, {
    fields: { id: accepted },
  });
}
