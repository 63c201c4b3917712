// Run by a Node.js whose processor is said to lack what WebAssembly SIMD needs, or that has no WebAssembly at all: prints
// the path that two shards take, whether a kernel was to be had, and their tallies.
import { register } from 'tsx/esm/api';

register();
const { describeKernel, runShard } = await import('../../../src/core/simulation/shard.ts');
const { fastShard } = await import('../../../src/core/kernels/index.ts');
const { matrixFromRows } = await import('../../../src/core/codes/sparse-matrix.ts');

const offsets = [0, 1, 4, 14, 16];
const H = matrixFromRows(
  21,
  Array.from({ length: 21 }, (_, i) => offsets.map((d) => (d + i) % 21).sort((a, b) => a - b)),
);
const told = [];
for (const decoder of [{ kind: 'bit-flipping' }, { kind: 'min-sum' }]) {
  const spec = { H, channel: { kind: 'bsc', p: 0.06 }, decoder, seed: 'plain', framesPerShard: 500 };
  const described = await describeKernel(spec);
  told.push({ ...described, hasKernel: fastShard(spec, 3) !== null, tally: await runShard(spec, 3) });
}
console.log(JSON.stringify(told));
