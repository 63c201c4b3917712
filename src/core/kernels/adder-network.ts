/** Counting in bit slices: a vector holds one bit of each of 128 frames, and a number of each frame is a list of
 *  vectors, its binary digits ("planes"), lowest first. */

import { type FunctionBuilder, type Local, type Statement, type V128, v128 } from './assembler/index.ts';

export interface Planes {
  code: Statement[];
  /** Borrowed locals that hold the digits; the caller gives them back. */
  planes: Local<'v128'>[];
}

/** The sum of words, each a bit a frame, by a network of full adders in depth-first order: three words of one weight
 *  are joined as soon as they are there, so that about two words a digit are alive at any time and the registers
 *  suffice. A full adder costs two XOR and a select. */
export function sumOfBits(f: FunctionBuilder, words: readonly V128[]): Planes {
  const code: Statement[] = [];
  const waiting: Local<'v128'>[][] = [];
  const join = (level: number, word: Local<'v128'>) => {
    const group = [...(waiting[level] ?? []), word];
    waiting[level] = group;
    if (group.length < 3) return;
    waiting[level] = [];
    const { sum, carry } = fullAdder(f, group as [Local<'v128'>, Local<'v128'>, Local<'v128'>], code);
    join(level, sum);
    join(level + 1, carry);
  };
  for (const word of words) {
    const local = f.borrow('v128');
    code.push(local.set(word));
    join(0, local);
  }
  for (let level = 0; level < waiting.length; level++) {
    const [a, b] = waiting[level]!;
    if (!a || !b) continue;
    waiting[level] = [];
    const { sum, carry } = halfAdder(f, a, b, code);
    join(level, sum);
    join(level + 1, carry);
  }
  return { code, planes: waiting.map((group) => group[0]!) };
}

/** The planes' digits after adding a word, in place, to a counter that is wide enough: a half adder a digit. */
export function increment(f: FunctionBuilder, counter: readonly Local<'v128'>[], word: V128): Statement[] {
  const carry = f.borrow('v128');
  const next = f.borrow('v128');
  const code = [carry.set(word)];
  for (const digit of counter)
    code.push(next.set(v128.and(digit, carry)), digit.set(v128.xor(digit, carry)), carry.set(next));
  f.giveBack(carry, next);
  return code;
}

/** total += planes, in place, digit by digit; what passes the last digit of the total is lost. */
export function addPlanes(f: FunctionBuilder, total: readonly Local<'v128'>[], planes: readonly V128[]): Statement[] {
  const carry = f.borrow('v128');
  const next = f.borrow('v128');
  const differ = f.borrow('v128');
  const parts = [carry.set(v128.zero)];
  total.forEach((digit, k) => {
    const plane = planes[k];
    if (plane)
      parts.push(
        differ.set(v128.xor(digit, plane)),
        next.set(v128.bitselect(carry, digit, differ)),
        digit.set(v128.xor(differ, carry)),
      );
    else parts.push(next.set(v128.and(digit, carry)), digit.set(v128.xor(digit, carry)));
    parts.push(carry.set(next));
  });
  f.giveBack(carry, next, differ);
  return parts;
}

function fullAdder(
  f: FunctionBuilder,
  [a, b, c]: readonly [Local<'v128'>, Local<'v128'>, Local<'v128'>],
  code: Statement[],
) {
  const differ = f.borrow('v128');
  const sum = f.borrow('v128');
  code.push(differ.set(v128.xor(a, b)), sum.set(v128.xor(differ, c)));
  const carry = f.borrow('v128');
  // Where a and b differ the carry is c, else it is a.
  code.push(carry.set(v128.bitselect(c, a, differ)));
  f.giveBack(a, b, c, differ);
  return { sum, carry };
}

function halfAdder(f: FunctionBuilder, a: Local<'v128'>, b: Local<'v128'>, code: Statement[]) {
  const sum = f.borrow('v128');
  const carry = f.borrow('v128');
  code.push(sum.set(v128.xor(a, b)), carry.set(v128.and(a, b)));
  f.giveBack(a, b);
  return { sum, carry };
}

/** Frames whose number is at least `threshold`, a constant: the digits from the lowest, "or" where the threshold has a
 *  zero and "and" where it has a one. */
export function atLeast(planes: readonly V128[], threshold: number): V128 {
  if (threshold <= 0) return v128.ones;
  if (threshold >= 2 ** planes.length) return v128.zero;
  let met: V128 | null = null; // null stands for "always"
  planes.forEach((digit, k) => {
    if ((threshold >> k) & 1) met = met === null ? digit : v128.and(digit, met);
    else if (met !== null) met = v128.or(digit, met);
  });
  return met ?? v128.ones;
}

/** The same with a threshold of each frame's own, or one known at run time only, as planes. */
export const atLeastPlanes = (planes: readonly V128[], threshold: readonly V128[]): V128 =>
  comparePlanes(planes, threshold, v128.ones);

/** Frames whose number is above the threshold. */
export const abovePlanes = (planes: readonly V128[], threshold: readonly V128[]): V128 =>
  comparePlanes(planes, threshold, v128.zero);

/** Digit by digit from the lowest: the higher digit decides where they differ. `tie` is the answer at equality. The
 *  threshold has as many digits as the number, or more. */
function comparePlanes(planes: readonly V128[], threshold: readonly V128[], tie: V128): V128 {
  return threshold.reduce((met, limit, k) => {
    const digit = planes[k];
    return digit ? v128.bitselect(v128.and(digit, met), v128.or(digit, met), limit) : v128.andnot(met, limit);
  }, tie);
}
