import { performance } from 'node:perf_hooks';
import { gcdPolynomials, polynomialOf, xToTheNMinusOne } from '../../src/core/algebra/gf2-polynomial.ts';
import type { DesignSpec } from '../../src/core/designs/block-design.ts';
import { buildDesign } from '../../src/core/designs/design.ts';
import { singerDifferenceSet } from '../../src/core/designs/geometry/singer.ts';
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

export async function bench(): Promise<Row[]> {
  const singer128 = polynomialOf(singerDifferenceSet(128, 2));
  const circulant128 = xToTheNMinusOne(16_513);
  const rows: Row[] = [
    { metric: 'PG(2,256) built', value: built('projective-plane', { q: 256 }), unit: 'ms', must: 3000 },
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
  const residentMb = process.resourceUsage().maxRSS / 1024;
  return [...rows, { metric: 'memory of this process at its highest', value: residentMb, unit: 'MB', must: 600 }];
}
