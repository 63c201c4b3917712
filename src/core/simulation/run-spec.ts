import type { Channel } from '../channels/channel.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';

/** All that a shard depends on, besides its index. */
export interface RunSpec {
  H: SparseMatrix;
  channel: Channel;
  decoder: DecoderSpec;
  /** Any text; the same text gives the same frames everywhere. */
  seed: string;
  framesPerShard: number;
  /** k/n, for the channels stated by Eb/N0; worked out from the rank of H when not given. */
  rate?: number;
  /** The all-zero word, or a random codeword from a stream of its own, so that the error patterns are the same. By
   *  default random words on the Z channel, whose errors depend on them, and zeros elsewhere. */
  sent?: 'zero' | 'random';
  /** Positions over which bit errors are counted: all n, unless only those that carry information in the code's
   *  systematic encoder are asked for. Counted by the reference decoders only. */
  bits?: 'all' | 'information';
}
