import type { Words } from '@/core/codes/constant-weight/constant-weight-code.ts';

export type Typed<T> = { ok: true; value: T } | { ok: false; error: string };

/** Places of ones as typed, "3 7 12", ascending; or a word written out in n digits 0 and 1. */
export function onesFrom(text: string, n: number): Typed<number[]> {
  const trimmed = text.trim();
  if (trimmed.length === n && /^[01]+$/.test(trimmed))
    return { ok: true, value: [...trimmed].flatMap((bit, p) => (bit === '1' ? [p] : [])) };
  const parts = trimmed.split(/[\s,;]+/).filter(Boolean);
  const ones = parts.map((part) => (/^\d{1,9}$/.test(part) && Number(part) < n ? Number(part) : -1));
  if (ones.includes(-1))
    return { ok: false, error: `places from 0 to ${n - 1} with spaces between, or ${n} digits 0 and 1` };
  return { ok: true, value: [...new Set(ones)].sort((a, b) => a - b) };
}

/** A word's number. */
export function rankFrom(text: string, M: number): Typed<number | null> {
  const trimmed = text.trim();
  if (trimmed === '') return { ok: true, value: null };
  if (/^\d{1,9}$/.test(trimmed) && Number(trimmed) < M) return { ok: true, value: Number(trimmed) };
  return { ok: false, error: `a number from 0 to ${M - 1}` };
}

/** Ranks of the words with ones at all the places given. */
export function ranksWith({ w, ones }: Words, order: Uint32Array, places: readonly number[]): Uint32Array {
  if (places.length === 0) return Uint32Array.from(order.keys());
  const found: number[] = [];
  for (const [rank, word] of order.entries()) {
    const held = ones.subarray(word * w, (word + 1) * w);
    if (places.every((place) => held.includes(place))) found.push(rank);
  }
  return Uint32Array.from(found);
}
