import { ParamError } from '../../errors.ts';
import { type ConstantWeightCode, codeOf, complementWords, wordOf } from './constant-weight-code.ts';

/** Every word with ones and zeros exchanged: weight n − w, the same distances. */
export function complementCode(code: ConstantWeightCode): ConstantWeightCode {
  const { design, classes, complement, distanceEvidence } = code;
  return codeOf(complementWords(code), { design, classes, complement: !complement }, distanceEvidence);
}

/** The words that hold `value` at a position, which is then left out. With 1 this is the code of the derived design, of
 *  length n − 1 and weight w − 1; with 0 that of the residual, of weight w. Distances do not fall, so that
 *  A(n, d, w) ≤ n/w · A(n − 1, d, w − 1) and n/(n − w) · A(n − 1, d, w) (Johnson 1962).
 *  @throws ParamError on a position out of range, or where no word is left. */
export function shortenAt(code: ConstantWeightCode, position: number, value: 0 | 1): ConstantWeightCode {
  const { n, w, M, complement } = code;
  if (!Number.isInteger(position) || position < 0 || position >= n)
    throw new ParamError('position', position, `a position from 0 to ${n - 1}`);
  if (value !== 0 && value !== 1) throw new ParamError('value', value, '0 or 1');
  const kept: number[] = [];
  for (let i = 0; i < M; i++) if (wordOf(code, i).includes(position) === (value === 1)) kept.push(i);
  if (kept.length === 0) throw new ParamError('value', value, `the other: no word holds ${value} at ${position}`);
  const weight = w - value;
  const ones = new Uint32Array(kept.length * weight);
  let at = 0;
  for (const i of kept) for (const p of wordOf(code, i)) if (p !== position) ones[at++] = p > position ? p - 1 : p;
  return codeOf({ n: n - 1, w: weight, M: kept.length, ones }, { complement });
}

/** The words at the places named, in that order. */
export function selectWords(code: ConstantWeightCode, places: ArrayLike<number>): ConstantWeightCode {
  const { n, w, complement, design } = code;
  const ones = new Uint32Array(places.length * w);
  for (let i = 0; i < places.length; i++) ones.set(wordOf(code, places[i]!), i * w);
  return codeOf({ n, w, M: places.length, ones }, { complement, design });
}
