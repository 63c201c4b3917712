import { execFileSync } from 'node:child_process';
import { performance } from 'node:perf_hooks';
import { gcdPolynomials, polynomialOf, xToTheNMinusOne } from '../../src/core/algebra/gf2-polynomial.ts';
import type { DesignSpec } from '../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../src/core/designs/design.ts';
import { singerDifferenceSet } from '../../src/core/designs/geometry/singer.ts';
import { verifyDesign } from '../../src/core/designs/verify.ts';
import type { Row } from './row.ts';

/** The middle of five times of the task, after one that is thrown away. */
function medianMs(task: () => unknown): number {
  task();
  const times = Array.from({ length: 5 }, () => {
    const start = performance.now();
    task();
    return performance.now() - start;
  });
  return times.sort((a, b) => a - b)[2]!;
}

const built = (family: string, params: DesignSpec['params']) => medianMs(() => buildDesign({ family, params }));

/** Times of the check that counts every subset; no symmetry is told, so that none is used. */
function verified(family: string, params: DesignSpec['params']): number {
  const { t, lambda } = predictDesign({ family, params });
  const design = { ...buildDesign({ family, params }), symmetry: undefined };
  return medianMs(() => verifyDesign(design, { t, lambda }));
}

/** Wall time of the contract suite over every family, in a process of its own. */
function contractSuiteMs(): number {
  const start = performance.now();
  const suite = ['run', '--config', 'tests/vitest.config.ts', '--project', 'core', 'tests/contracts/families.test.ts'];
  execFileSync('node_modules/.bin/vitest', suite, { stdio: 'ignore' });
  return performance.now() - start;
}

export async function bench(): Promise<Row[]> {
  // First, while the process is small: the highest it stands after one build tells what the build takes.
  buildDesign({ family: 'projective-plane', params: { q: 256 } });
  const residentMb = process.resourceUsage().maxRSS / 1024;
  const singer128 = polynomialOf(singerDifferenceSet(128, 2));
  const circulant128 = xToTheNMinusOne(16_513);
  const rows: Row[] = [
    { metric: 'PG(2,256) built', value: built('projective-plane', { q: 256 }), unit: 'ms', must: 3000 },
    { metric: 'memory of the process at its highest, PG(2,256)', value: residentMb, unit: 'MB', must: 600 },
    {
      metric: 'PG(2,64) verified, all pairs counted',
      value: verified('projective-plane', { q: 64 }),
      unit: 'ms',
      must: 1000,
    },
    { metric: 'S(5,8,24) verified, all 5-subsets counted', value: verified('witt', { v: 24 }), unit: 'ms', must: 100 },
    {
      metric: 'triple system on 999 points verified',
      value: verified('steiner-triple', { v: 999, method: 'bose' }),
      unit: 'ms',
      must: 200,
    },
    {
      metric: 'Singer set of order 256',
      value: medianMs(() => singerDifferenceSet(256, 2)),
      unit: 'ms',
      must: 150,
      aim: 15,
    },
    {
      metric: 'gcd for the rank of PG(2,128)',
      value: medianMs(() => gcdPolynomials(singer128, circulant128)),
      unit: 'ms',
      aim: 5,
    },
    {
      metric: 'AG(2,256) without the origin built',
      value: built('punctured-affine-plane', { q: 256 }),
      unit: 'ms',
      must: 3000,
    },
    { metric: 'lines of PG(3,23) built', value: built('projective-geometry', { m: 3, q: 23, flat: 1 }), unit: 'ms' },
    { metric: 'unital of order 16 built', value: built('hermitian-unital', { q: 16 }), unit: 'ms' },
    { metric: 'H(4,25) built', value: built('generalised-quadrangle', { kind: 'H4', q: 5 }), unit: 'ms' },
    { metric: 'S(5,6,48) built', value: built('linear-group-steiner', { v: 48 }), unit: 'ms' },
  ];
  return [...rows, { metric: 'contract suite of every family', value: contractSuiteMs() / 1000, unit: 's', must: 180 }];
}
