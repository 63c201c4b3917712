import type { RateKind } from './curve.ts';

/** Error rate over the binary symmetric channel with no code: each bit is wrong with probability p, and a frame of n
 *  bits with probability 1 − (1 − p)^n, computed so that small p keeps its digits. */
export const uncodedRate = (kind: RateKind, p: number, n: number): number =>
  kind === 'ber' ? p : -Math.expm1(n * Math.log1p(-p));

/** The reference line as said beside it. */
export const uncodedLabel = (kind: RateKind, n: number): string => (kind === 'ber' ? 'uncoded' : `uncoded, ${n} bits`);

/** The formula, for tooltips and descriptions. */
export const uncodedFormula = (kind: RateKind, n: number): string =>
  kind === 'ber' ? 'BER = p' : `FER = 1 − (1 − p)^${n}`;
