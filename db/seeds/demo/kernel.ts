import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Kernel } from '@/core/simulation/shard.ts';

/** Hard decisions give the same tally by either kernel, so the fast one may compute and re-compute them; for
 *  floating-point sum-product only the readable reference repeats to the last integer. */
export const kernelFor = (decoder: DecoderSpec): Kernel => (decoder.kind === 'sum-product' ? 'reference' : 'wasm');
