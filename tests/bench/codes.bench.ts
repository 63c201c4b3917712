import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';
import { countCycles } from '../../src/core/codes/analysis/cycles.ts';
import { weightDistribution } from '../../src/core/codes/analysis/distance/weight-distribution.ts';
import { girth } from '../../src/core/codes/analysis/girth.ts';
import { tannerOrbits } from '../../src/core/codes/analysis/tanner-orbits.ts';
import { matrixFromRows, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';
import { singerDifferenceSet } from '../../src/core/designs/geometry/singer.ts';
import { cyclicRank } from '../../src/core/gf2/cyclic.ts';
import { type QuasiCyclicForm, quasiCyclicForm } from '../../src/core/gf2/quasi-cyclic.ts';
import { quasiCyclicRank } from '../../src/core/gf2/quasi-cyclic-rank.ts';
import { eliminationRank } from '../../src/core/gf2/rank.ts';
import { circulantMatrix, quasiCyclicMatrix } from '../models/gf2-models.ts';
import quasiCyclicCodes from '../reference/quasi-cyclic-codes.json' with { type: 'json' };
import type { Row } from './row.ts';

/** The least of five times, the figure that a loaded machine disturbs least. */
function leastMs(task: () => unknown): number {
  const times = Array.from({ length: 5 }, () => {
    const start = performance.now();
    task();
    return performance.now() - start;
  });
  return Math.min(...times);
}

/** The least processor time of so many runs, as the native program measures its own: what other work on the machine takes
 *  is left out on both sides. */
function leastProcessorMs(task: () => unknown, runs: number): number {
  const times = Array.from({ length: runs }, () => {
    const before = process.cpuUsage();
    task();
    const { user, system } = process.cpuUsage(before);
    return (user + system) / 1000;
  });
  return Math.min(...times);
}

/** A rate one half code whose words cannot all be told by its dual's being smaller: H = [A | I] with a circulant A. */
function halfRate(k: number): SparseMatrix {
  return matrixFromRows(
    2 * k,
    Array.from({ length: k }, (_, i) => [...[0, 1, 3, 7].map((d) => (d + i) % k), k + i]),
  );
}

export async function bench(): Promise<Row[]> {
  const rows: Row[] = [];
  for (const q of [64, 128]) {
    const offsets = Array.from(singerDifferenceSet(q, 2));
    const n = q * q + q + 1;
    const H = circulantMatrix(n, offsets);
    const generic = leastMs(() => eliminationRank(H));
    const size = `${n} × ${n}`;
    rows.push(
      { metric: `rank of ${size}, any matrix`, value: generic, unit: 'ms', must: q === 64 ? 20 : 1000 },
      { metric: `rank of ${size}, cyclic`, value: leastMs(() => cyclicRank(H)), unit: 'ms', must: 5 },
      nativeRatio(
        n,
        offsets,
        leastProcessorMs(() => eliminationRank(H), q === 64 ? 25 : 5),
      ),
    );
    if (q === 64)
      rows.push({
        metric: 'girth and 6-cycles of PG(2,64)',
        value: leastMs(() => sixCycles(H)),
        unit: 'ms',
        must: 200,
      });
  }
  const ccsds = quasiCyclicMatrix(511, quasiCyclicCodes['G-ccsds-c2'].value.first_row_positions);
  const form = quasiCyclicForm(ccsds) as QuasiCyclicForm;
  rows.push(
    {
      metric: 'rank of the CCSDS 1022 × 8176 matrix by elimination',
      value: leastMs(() => eliminationRank(ccsds)),
      unit: 'ms',
    },
    { metric: 'the same, circulant by circulant', value: leastMs(() => quasiCyclicRank(form)), unit: 'ms' },
    {
      metric: 'weight distribution of a [24,12] code',
      value: leastMs(() => weightDistribution(halfRate(12))),
      unit: 'ms',
      must: 10,
    },
    {
      metric: 'weight distribution of a [48,24] code',
      value: leastMs(() => weightDistribution(halfRate(24))),
      unit: 'ms',
      must: 2000,
    },
  );
  return rows;
}

function sixCycles(H: SparseMatrix) {
  const orbits = tannerOrbits(H);
  return countCycles(H, girth(H, orbits), 6, orbits);
}

/** Our speed, packing included, over that of libm4ri's elimination alone; processor times of one run of the bench. */
function nativeRatio(n: number, offsets: number[], ms: number): Row {
  const row = {
    metric: `rank of ${n} × ${n}: speed over libm4ri`,
    unit: 'ratio',
    must: 0.5,
    aim: 0.8,
    better: 'higher' as const,
  };
  const folder = mkdtempSync(join(tmpdir(), 'rank-'));
  try {
    const program = join(folder, 'rank');
    const source = fileURLToPath(new URL('./native/rank.c', import.meta.url));
    execFileSync('gcc', ['-O3', '-march=native', source, '-o', program, '-lm4ri'], { stdio: 'pipe' });
    const answer = execFileSync(program, { input: `${n} ${offsets.length} ${offsets.join(' ')}\n` }).toString();
    return { ...row, value: (Number(answer.trim().split(' ')[1]) * 1000) / ms };
  } catch {
    return { ...row, value: Number.NaN, note: 'left out: needs gcc and libm4ri (Debian: libm4ri-dev)' };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
