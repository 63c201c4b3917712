import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import { decoderShortName } from '@/client/curves/decoder-text.ts';
import { OFFERED_DECODERS, type RunDraft } from './run-draft.ts';

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

/** "PG(2,16), EG(2,32): Gallager B, sum-product". */
export function proposedName(draft: RunDraft, codes: readonly Pick<Code, 'id' | 'name'>[]): string {
  const names = draft.codeIds.map((id) => codes.find((code) => code.id === id)?.name ?? '').filter(Boolean);
  const decoders = OFFERED_DECODERS.filter((kind) => draft.decoders[kind].isChosen).map((kind) =>
    decoderShortName({ kind }),
  );
  if (names.length === 0) return '';
  return `${names.join('; ')}: ${decoders.join(', ')}`.slice(0, 120);
}
