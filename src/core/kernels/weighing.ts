import { addPlanes, sumOfBits } from './adder-network.ts';
import {
  base,
  countLoop,
  type FunctionBuilder,
  type FunctionRef,
  i32,
  type Local,
  type ModuleBuilder,
  type Statement,
  type V128,
  v128,
} from './assembler/index.ts';
import { type MemoryLayout, vectorBytes } from './memory-layout.ts';
import { digitsFor } from './votes.ts';

/** Words added in one network: 15 make exactly four digits. */
const group = 15;

/** Counts the ones of all 128 lanes of n vectors at once, and gives the count of one lane. */
export function emitWeighing(
  m: ModuleBuilder,
  layout: MemoryLayout,
  n: number,
  word: number,
): { beforeWeighing: FunctionRef; weigh: FunctionRef } {
  const digits = digitsFor(n);
  const planes = layout.reserve(vectorBytes * digits);
  const beforeWeighing = m.func({ params: [], results: [] }, (f) => {
    const at = f.local('i32');
    const total = Array.from({ length: digits }, () => f.local('v128'));
    const whole = n - (n % group);
    const words = (count: number, offset: number) =>
      Array.from({ length: count }, (_, t) => v128.load(at, word + offset + vectorBytes * t));
    f.emit(
      countLoop(
        at,
        { from: 0, to: vectorBytes * whole, step: vectorBytes * group },
        addWords(f, total, words(group, 0)),
      ),
      at.set(vectorBytes * whole),
      ...addWords(f, total, words(n % group, 0)),
      ...total.map((digit, k) => v128.store(base, digit, planes + vectorBytes * k)),
    );
  });
  const weigh = m.func({ params: ['i32'], results: ['i32'] }, (f) => {
    const lane = f.param(0, 'i32');
    const byte = f.local('i32');
    const digit = (k: number) => i32.and(i32.shrU(i32.load8U(byte, planes + vectorBytes * k), i32.and(lane, 7)), 1);
    f.emit(
      byte.set(i32.shrU(lane, 3)),
      Array.from({ length: digits }, (_, k) => i32.shl(digit(k), k)).reduce((sum, part) => i32.or(sum, part)),
    );
  });
  return { beforeWeighing, weigh };
}

/** total += the sum of the words, digit by digit. */
function addWords(f: FunctionBuilder, total: readonly Local<'v128'>[], words: readonly V128[]): Statement[] {
  if (words.length === 0) return [];
  const { code, planes } = sumOfBits(f, words);
  const parts = [...code, ...addPlanes(f, total, planes)];
  f.giveBack(...planes);
  return parts;
}
