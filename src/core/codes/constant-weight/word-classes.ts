import { designFromBlocks } from '../../designs/block-design.ts';
import { type ResolutionOutcome, searchResolution } from '../../designs/resolve.ts';
import { ParamError } from '../../errors.ts';
import { type ConstantWeightCode, complementWords, wordOf } from './constant-weight-code.ts';
import { selectWords } from './smaller-codes.ts';

/** The words in disjoint codes, one a class. Classes may be parallel ones, when the words of a class share no one and
 *  differ in 2w places; or the designs of a large set, when each class is a code of the whole's weight and every word of a
 *  space is in one class, so that a class can carry a message of its own.
 *  @throws ParamError unless there is one label a word. */
export function partitionByClasses(code: ConstantWeightCode, classes: ArrayLike<number>): ConstantWeightCode[] {
  if (classes.length !== code.M)
    throw new ParamError('classes', classes.length, `one class for each of ${code.M} words`);
  const places = new Map<number, number[]>();
  for (let i = 0; i < code.M; i++) {
    const list = places.get(classes[i]!);
    if (list) list.push(i);
    else places.set(classes[i]!, [i]);
  }
  return [...places].sort(([a], [b]) => a - b).map(([, list]) => selectWords(code, list));
}

/** A partition of the words into parallel classes: the construction's own, checked, or one found by search; with the
 *  reason when there is none. Complements are resolved by their blocks. */
export function parallelClassesOf(
  code: ConstantWeightCode,
  options: { seed?: string; limit?: number } = {},
): ResolutionOutcome {
  const words = code.complement ? complementWords(code) : code;
  const blocks = Array.from({ length: words.M }, (_, i) => wordOf(words, i));
  return searchResolution(designFromBlocks(words.n, blocks, { classes: code.classes }), options);
}
