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
}
