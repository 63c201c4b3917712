import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { DecoderDraft } from './run-draft.ts';

/** Settings found by trial, as they stand in the form. */
export function takenOver(decoder: DecoderSpec): Partial<DecoderDraft> {
  if (decoder.kind === 'bit-flipping') return { threshold: text(decoder.threshold) };
  if (decoder.kind === 'min-sum') return { scale: decoder.scale ?? '', c: text(decoder.c), rMax: text(decoder.rMax) };
  return {};
}

const text = (value: number | undefined): string => (value === undefined ? '' : String(value));
