import { type BlockDesign, blockOf } from './block-design.ts';

/** Whether the blocks, each as often as it occurs, are also the complements of the blocks. */
export function isSelfComplementary(design: BlockDesign): boolean {
  const { v, b } = design;
  const surplus = new Map<string, number>();
  const add = (words: Uint32Array, change: number) => {
    const key = String.fromCharCode(...new Uint16Array(words.buffer));
    surplus.set(key, (surplus.get(key) ?? 0) + change);
  };
  const all = wordsOf(
    v,
    Array.from({ length: v }, (_, point) => point),
  );
  for (let i = 0; i < b; i++) {
    const words = wordsOf(v, blockOf(design, i));
    add(words, 1);
    add(
      words.map((word, at) => word ^ all[at]!),
      -1,
    );
  }
  return [...surplus.values()].every((count) => count === 0);
}

function wordsOf(v: number, points: Iterable<number>): Uint32Array {
  const words = new Uint32Array(Math.ceil(v / 32));
  for (const point of points) words[point >> 5]! |= 1 << (point & 31);
  return words;
}
