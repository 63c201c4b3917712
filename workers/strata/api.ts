import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Graded } from '@/core/evidence.ts';
import type { Enumeration } from '@/core/simulation/enumerate-stratum.ts';
import type { WorkerFailure } from '../failure.ts';

export type Answer<T> = { ok: true; value: T; elapsedMs: number } | { ok: false; failure: WorkerFailure };

/** What is known of a code's weight strata beside samples. A worker keeps the matrices it has been given. */
export interface StrataApi {
  load(key: string, H: SparseMatrix): void;
  /** The radius a theorem guarantees; null where none is known for the decoder. */
  prove(key: string, decoder: DecoderSpec): Answer<Graded<number> | null>;
  /** Decodes all patterns of a weight, up to symmetry, in branches `from` up to, without, `to`. */
  enumerate(
    key: string,
    decoder: DecoderSpec,
    weight: number,
    range: { from: number; to: number; limitPatterns: number },
  ): Promise<Answer<Enumeration>>;
}
