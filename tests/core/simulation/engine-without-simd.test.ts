import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import { type KernelDescription, runShard } from '../../../src/core/simulation/shard.ts';
import type { Tally } from '../../../src/core/simulation/tally.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';

const program = fileURLToPath(new URL('./engine-without-simd.mjs', import.meta.url));

const withoutInstructions: [string, string[]] = [
  'on a processor without the instructions',
  ['--no-enable-sse4-1', '--no-enable-ssse3'],
];

/** Other processors than x64 always have the instructions. */
const engines: [string, string[]][] = [
  ['without any WebAssembly', ['--jitless']],
  ...(process.arch === 'x64' ? [withoutInstructions] : []),
];

type Told = KernelDescription & { hasKernel: boolean; tally: Tally };

const toldBy = (...flags: string[]): Told[] =>
  JSON.parse(
    execFileSync(process.execPath, [...flags, program], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }),
  );

const here = (decoder: DecoderSpec) =>
  runShard(
    {
      H: developed(21, planarDifferenceSets[4].set),
      channel: { kind: 'bsc', p: 0.06 },
      decoder,
      seed: 'plain',
      framesPerShard: 500,
    },
    3,
    'wasm',
  );

describe('an engine without WebAssembly SIMD', () => {
  it.each(engines)(
    '%s decodes hard decisions 32 frames at a time, the rest one by one, and says so',
    async (_, flags) => {
      const [flipping, minSum] = toldBy(...flags);
      expect(flipping).toMatchObject({ kernel: 'lanes', hasKernel: false });
      expect(flipping!.reason).toBe('this engine has no WebAssembly SIMD: 32 frames at a time in TypeScript');
      expect(minSum).toMatchObject({ kernel: 'reference', hasKernel: false });
      expect(minSum!.reason).toBe('this engine has no WebAssembly SIMD: one frame at a time');
      expect(flipping!.tally).toEqual(await here({ kind: 'bit-flipping' }));
      expect(minSum!.tally).toEqual(await here({ kind: 'min-sum' }));
    },
  );
});
