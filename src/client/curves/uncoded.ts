import type { RateKind } from './curve.ts';

/** Error rate over the binary symmetric channel with no code: each bit is wrong with probability p, and a frame of n
 *  bits with probability 1 − (1 − p)^n, computed so that small p keeps its digits. */
export const uncodedRate = (kind: RateKind, p: number, n: number): number =>
  kind === 'ber' ? p : -Math.expm1(n * Math.log1p(-p));

/** The reference lines as named on a chart; frames of different lengths have a line each. */
export const uncodedLabel = (kind: RateKind, lengths: readonly number[]): string =>
  kind === 'ber' ? 'uncoded, BER = p' : `uncoded, n = ${lengths.join(', ')}`;

/** The formula, for tooltips and captions. */
export const uncodedFormula = (kind: RateKind): string =>
  kind === 'ber' ? 'uncoded: BER = p' : 'uncoded: FER = 1 − (1 − p)ⁿ';
