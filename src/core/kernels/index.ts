/** The fast decoders: WebAssembly made at run time for the matrix at hand. */
export { type FastShardOptions, fastShard } from './fast-shard.ts';
export { simdAvailable } from './simd-available.ts';
