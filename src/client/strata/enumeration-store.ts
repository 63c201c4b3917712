import { z } from 'zod';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Stratum } from '@/core/simulation/stratified-rate.ts';
import { mergeTallies, type Tally, tallySchema } from '@/core/simulation/tally.ts';
import { decoderKey } from '../curves/decoder-text.ts';

/** How far the enumeration of a weight is: branches 0 … done − 1 of all, and what they came to. */
const progressSchema = z.object({
  weight: z.int().min(0),
  branches: z.int().min(1),
  done: z.int().min(0),
  representatives: z.int().min(0),
  symmetryOrder: z.number(),
  elapsedMs: z.number(),
  tally: tallySchema,
});
export type EnumerationProgress = z.infer<typeof progressSchema>;

/** A decoder's counts on a matrix are the same for everybody, so that matrix and decoder name them. */
export const enumerationKey = (fingerprint: string, decoder: DecoderSpec): string =>
  `enumerated~${fingerprint}~${decoderKey(decoder)}`;

export const isWhole = ({ done, branches }: EnumerationProgress): boolean => done >= branches;

/** Adds the next part to what was done before it. */
export function withPart(
  before: EnumerationProgress | undefined,
  part: Omit<EnumerationProgress, 'done'> & { to: number },
): EnumerationProgress {
  const { to, ...rest } = part;
  const done = Math.min(to, rest.branches);
  if (!before) return { ...rest, done };
  const tally = mergeTallies(before.tally, rest.tally);
  if (!Number.isSafeInteger(Math.max(tally.bits, tally.bitErrorsSquared)))
    throw new Error('The counts of this weight pass 2^53 and would no longer be exact.');
  return {
    ...rest,
    done,
    representatives: before.representatives + rest.representatives,
    elapsedMs: before.elapsedMs + rest.elapsedMs,
    tally,
  };
}

export const tallyOf = (counts: Tally): Tally => tallySchema.strip().parse(counts);

/** The strata of which every pattern was tried. */
export function wholeStrata(entries: readonly EnumerationProgress[]): Map<number, Stratum> {
  return new Map(
    entries.filter(isWhole).map(({ weight, tally }): [number, Stratum] => {
      const { frames, frameErrors, bitErrors, bitErrorsSquared } = tally;
      return [weight, { weight, frames, frameErrors, bitErrors, bitErrorsSquared, grade: 'computed' }];
    }),
  );
}

const CHANGE = 'enumerationchange';
const parsed = new Map<string, { text: string | null; entries: readonly EnumerationProgress[] }>();
const nothing: readonly EnumerationProgress[] = [];

/** What this browser has enumerated under a key; the same array until it changes. */
export function keptEnumerations(key: string): readonly EnumerationProgress[] {
  const text = read(key);
  const known = parsed.get(key);
  if (known && known.text === text) return known.entries;
  const entries = text === null ? nothing : entriesOf(text);
  parsed.set(key, { text, entries });
  return entries;
}

/** Keeps the progress of one weight in this browser, over page loads. */
export function keepEnumeration(key: string, progress: EnumerationProgress): void {
  const others = keptEnumerations(key).filter(({ weight }) => weight !== progress.weight);
  try {
    localStorage.setItem(key, JSON.stringify([...others, progress]));
  } catch {
    // No room: the counts live until the page is left.
    parsed.set(key, { text: read(key), entries: [...others, progress] });
  }
  window.dispatchEvent(new Event(CHANGE));
}

export function onEnumerationChange(listener: () => void): () => void {
  window.addEventListener(CHANGE, listener);
  window.addEventListener('storage', listener);
  return () => {
    window.removeEventListener(CHANGE, listener);
    window.removeEventListener('storage', listener);
  };
}

function read(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
}

function entriesOf(text: string): readonly EnumerationProgress[] {
  try {
    return z.array(progressSchema).parse(JSON.parse(text));
  } catch {
    return nothing;
  }
}
