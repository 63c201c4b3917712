import type { Code } from '@/api/codes.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import {
  type EnumerationProgress,
  enumerationKey,
  isWhole,
  keepEnumeration,
  keptEnumerations,
  tallyOf,
  withPart,
} from './enumeration-store.ts';
import { enumeratePart } from './strata-pool.ts';

/** Most patterns, up to symmetry, that are decoded for a weight in a browser. */
export const MOST_PATTERNS = 20_000_000;

/** C(n, w) as a double. */
export function patternCount(n: number, weight: number): number {
  let count = 1;
  for (let i = 0; i < Math.min(weight, n - weight); i++) count *= (n - i) / (i + 1);
  return Math.round(count);
}

const PART_MS = 1500;

/** Enumerates a weight from where it was left, part by part, each kept as it is done.
 *  @throws Error as the engine refuses; AbortError when the signal fires, with all whole parts kept. */
export async function enumerateWeight(
  code: Pick<Code, 'id' | 'fingerprint'>,
  decoder: DecoderSpec,
  weight: number,
  signal: AbortSignal,
  part: typeof enumeratePart = enumeratePart,
): Promise<EnumerationProgress> {
  const key = enumerationKey(code.fingerprint, decoder);
  let progress = keptEnumerations(key).find((entry) => entry.weight === weight);
  let size = 1;
  while (!progress || !isWhole(progress)) {
    const from: number = progress?.done ?? 0;
    const range = { from, to: from + size, limitPatterns: MOST_PATTERNS };
    const { value, elapsedMs } = await part(code, decoder, weight, range, signal);
    const { branches, representatives, symmetryOrder } = value;
    const counts = { weight, branches, representatives, symmetryOrder, elapsedMs, tally: tallyOf(value) };
    progress = withPart(progress, { ...counts, to: range.to });
    keepEnumeration(key, progress);
    // Branches differ in size; the next part aims at a steady pace.
    size = Math.max(1, Math.min(4 * size, Math.floor((size * PART_MS) / Math.max(1, elapsedMs))));
  }
  return progress;
}
