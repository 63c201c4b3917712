import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import { decoderShortName } from '@/client/curves/decoder-text.ts';
import { MOST_WEIGHTS, OFFERED_DECODERS, type RunDraft } from './run-draft.ts';

/** A fresh seed: 96 random bits in hexadecimal, in groups that can be read out. */
export function freshSeed(): string {
  const words = crypto.getRandomValues(new Uint16Array(6));
  return Array.from(words, (word) => word.toString(16).padStart(4, '0')).join('-');
}

const BITS_A_SHARD = 2e6;

/** Frames for a shard of about two million bits, as 1, 2 or 5 times a power of ten: long enough that handing in costs
 *  little, short enough that a pause is answered soon. */
export function proposedFramesPerShard(codes: readonly Pick<Code, 'n'>[]): number {
  const longest = Math.max(1, ...codes.map((code) => code.n));
  const most = BITS_A_SHARD / longest;
  const power = 10 ** Math.floor(Math.log10(Math.max(1, most)));
  const digit = [5, 2, 1].find((d) => d * power <= most) ?? 1;
  return digit * power;
}

/** A sweep that ends at the required channel point and starts at three times it. */
export function proposedSweep(requirements: Requirements | null | undefined): { from: string; to: string } | null {
  const channel = requirements?.channel;
  if (channel?.kind !== 'bsc') return null;
  return { from: String(Number(Math.min(0.5, channel.p * 3).toPrecision(3))), to: String(channel.p) };
}

/** The required rate: UBER where one is stated, else FER. */
export function proposedLimit(
  requirements: Requirements | null | undefined,
): Pick<RunDraft, 'limitRate' | 'limitTarget'> | null {
  const { targetUber, targetFer } = requirements ?? {};
  if (targetUber !== undefined) return { limitRate: 'uber', limitTarget: String(targetUber) };
  return targetFer === undefined ? null : { limitRate: 'fer', limitTarget: String(targetFer) };
}

/** Weights from the first that a decoder of large column weights may fail at up to where hardly a frame of p is
 *  heavier; the chosen codes' own limits where they differ. */
export function proposedWeights(
  codes: readonly Pick<Code, 'n' | 'columnWeights'>[],
  p: number,
): { weightFrom: string; weightTo: string } | null {
  if (codes.length === 0 || !(p > 0 && p <= 0.5)) return null;
  const shortest = Math.min(...codes.map(({ n }) => n));
  const longest = Math.max(...codes.map(({ n }) => n));
  const lightest = Math.min(...codes.flatMap(({ columnWeights }) => columnWeights.map(([weight]) => weight)));
  const from = Math.max(1, Math.floor((Number.isFinite(lightest) ? lightest : 0) / 2) + 1);
  const heavy = Math.ceil(longest * p + 6 * Math.sqrt(longest * p * (1 - p)) + 4);
  const to = Math.min(shortest, Math.max(heavy, from), from + MOST_WEIGHTS - 1);
  return { weightFrom: String(Math.min(from, to)), weightTo: String(to) };
}

/** "PG(2,16), EG(2,32): Gallager B, sum-product". */
export function proposedName(draft: RunDraft, codes: readonly Pick<Code, 'id' | 'name'>[]): string {
  const names = draft.codeIds.map((id) => codes.find((code) => code.id === id)?.name ?? '').filter(Boolean);
  const decoders = OFFERED_DECODERS.filter((kind) => draft.decoders[kind].isChosen).map((kind) =>
    decoderShortName({ kind }),
  );
  if (names.length === 0) return '';
  const what = { sweep: '', curve: ', planned', strata: ', strata', limit: ', limit' }[draft.points];
  return `${names.join('; ')}: ${decoders.join(', ')}`.slice(0, 120 - what.length) + what;
}
