import { performance } from 'node:perf_hooks';
import { singerDifferenceSet } from '../../src/core/designs/geometry/singer.ts';
import { exportMatrix, importMatrix } from '../../src/core/formats/index.ts';
import { circulantMatrix } from '../models/gf2-models.ts';
import type { Row } from './row.ts';

/** The least of three times, and what the task gave. */
function leastMs<T>(task: () => T): { ms: number; result: T } {
  let best = Number.POSITIVE_INFINITY;
  let result!: T;
  for (let i = 0; i < 3; i++) {
    const start = performance.now();
    result = task();
    best = Math.min(best, performance.now() - start);
  }
  return { ms: best, result };
}

/** Files of the 16 513 × 16 513 matrix of the plane of order 128, 2.1 million ones. */
export async function bench(): Promise<Row[]> {
  const H = circulantMatrix(16513, Array.from(singerDifferenceSet(128, 2)));
  const rows: Row[] = [];
  for (const format of ['alist', 'npz', 'mtx', 'csv', 'json', 'mat', 'c', 'qc']) {
    const written = leastMs(() => exportMatrix(H, format));
    const read = leastMs(() => importMatrix(written.result, format));
    if (Buffer.compare(Buffer.from(read.result.colIndex.buffer), Buffer.from(H.colIndex.buffer)) !== 0)
      throw new Error(`${format} did not come back as it was`);
    const megabytes = (written.result.length / 1e6).toFixed(1);
    const must = format === 'alist' || format === 'npz';
    rows.push(
      { metric: `${format}, ${megabytes} MB, written`, value: written.ms, unit: 'ms', ...(must && { must: 1000 }) },
      { metric: `${format}, read`, value: read.ms, unit: 'ms', ...(must && { must: 2000 }) },
    );
  }
  return rows;
}
