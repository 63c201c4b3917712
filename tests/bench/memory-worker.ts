// A process that reads a matrix from a file, decodes a shard on it and prints its resident memory in KiB: before it had the
// matrix, and at its highest.
import { readFileSync } from 'node:fs';
import { type DecoderSpec, runShard } from '../../src/core/index.ts';

const [path, kind] = process.argv.slice(2) as [string, 'bit-flipping' | 'gallager-b' | 'sum-product'];
const idle = process.resourceUsage().maxRSS;
const words = new Uint32Array(readFileSync(path).buffer);
const [rows, cols] = words as unknown as [number, number];
const H = { rows, cols, rowStart: words.subarray(2, rows + 3), colIndex: words.subarray(rows + 3) };
const decoder: DecoderSpec = { kind, iterations: 3 };
const tally = await runShard(
  { H, channel: { kind: 'bsc', p: 0.002 }, decoder, seed: 'memory', framesPerShard: 130 },
  0,
);
console.log(JSON.stringify({ idle, highest: process.resourceUsage().maxRSS, frames: tally.frames }));
