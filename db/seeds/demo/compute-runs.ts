// Computes the demo's results with the engine, from the seeds that the scenario states, and writes runs.json beside
// this file: `node --import tsx db/seeds/demo/compute-runs.ts [run key …]`. With keys, the other runs are kept.
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { runShard } from '@/core/simulation/shard.ts';
import { stoppingReason } from '@/core/simulation/stopping.ts';
import { emptyTally, mergeTallies } from '@/core/simulation/tally.ts';
import { buildDemoCode } from './build.ts';
import { kernelFor } from './kernel.ts';
import { type DemoRun, demoProjects } from './scenario.ts';
import { type PackedTally, packTally, type StoredResults } from './stored-results.ts';

const target = new URL('./runs.json', import.meta.url);
const results: StoredResults = existsSync(target)
  ? JSON.parse(readFileSync(target, 'utf8'))
  : { fingerprints: {}, runs: {} };
const only = process.argv.slice(2);

async function computePoint(run: DemoRun, position: number, H: SparseMatrix): Promise<PackedTally[]> {
  const { channel, decoder } = run.points[position]!;
  const { seed, framesPerShard, stopping } = run;
  const spec = { H, channel, decoder, seed, framesPerShard };
  const shards: PackedTally[] = [];
  let sum = emptyTally();
  while (stoppingReason(sum, stopping) === null) {
    const tally = await runShard(spec, shards.length, kernelFor(decoder));
    shards.push(packTally(tally));
    sum = mergeTallies(sum, tally);
  }
  console.log(run.key, JSON.stringify(channel), decoder.kind, `${sum.frameErrors} of ${sum.frames}`);
  return shards;
}

for (const project of demoProjects) {
  const matrices = new Map<string, SparseMatrix>();
  for (const code of project.codes) {
    const { H, fingerprint } = await buildDemoCode(code);
    matrices.set(code.key, H);
    results.fingerprints[code.key] = fingerprint;
  }
  for (const run of project.runs) {
    if (only.length > 0 && !only.includes(run.key)) continue;
    const points: PackedTally[][] = [];
    for (const [position, { code }] of run.points.entries()) {
      points.push(await computePoint(run, position, matrices.get(code)!));
    }
    results.runs[run.key] = points;
    writeFileSync(target, `${JSON.stringify(results).replaceAll('],[[', '],\n[[')}\n`);
  }
}
