import { performance } from 'node:perf_hooks';
import { seededRandom } from '../../src/core/algebra/seeded-random.ts';
import { nearestAlternatives } from '../../src/core/catalogue/nearest.ts';
import { obstaclesTo } from '../../src/core/catalogue/obstacles.ts';
import { type CatalogueQuery, sortColumns } from '../../src/core/catalogue/query.ts';
import { searchTable } from '../../src/core/catalogue/search.ts';
import { catalogueTable } from '../../src/core/catalogue/table.ts';
import type { Row } from './row.ts';

const QUERIES = 300;

/** First use, then the 95th centile over queries that mix every filter, each sort and both directions. */
export async function bench(): Promise<Row[]> {
  const [firstUse, table] = timed(() => {
    const made = catalogueTable();
    searchTable(made, { n: { min: 900, max: 1100 }, rate: { min: 0.8 } });
    return made;
  });
  const queries = variedQueries();
  for (const query of queries.slice(0, 30)) searchTable(table, query);
  const times = queries.map((query) => timed(() => searchTable(table, query))[0]);
  const impossible: CatalogueQuery = {
    n: { min: 274, max: 306 },
    structure: 'cyclic',
    radiusMin: 8,
    rate: { min: 0.5 },
  };
  const [nearest] = timed(() => [nearestAlternatives(table, impossible), obstaclesTo(impossible)]);
  const [longPage] = timed(() => searchTable(table, { limit: 5000 }));
  return [
    { metric: 'candidates', value: table.count, unit: 'candidates', must: 50_000, better: 'higher' },
    { metric: 'first use: catalogue made and searched', value: firstUse, unit: 'ms', must: 500 },
    { metric: `searchCatalogue, median of ${QUERIES} queries`, value: centile(times, 0.5), unit: 'ms' },
    {
      metric: `searchCatalogue, 95th centile of ${QUERIES} queries`,
      value: centile(times, 0.95),
      unit: 'ms',
      must: 50,
    },
    { metric: 'nearest alternatives and obstacles when nothing fits', value: nearest, unit: 'ms' },
    { metric: 'a page of 5,000 candidates', value: longPage, unit: 'ms' },
  ];
}

function timed<T>(task: () => T): [number, T] {
  const start = performance.now();
  const result = task();
  return [performance.now() - start, result];
}

const centile = (times: readonly number[], share: number) =>
  [...times].sort((a, b) => a - b)[Math.ceil(times.length * share) - 1]!;

/** Each part is asked about one time in three. */
function variedQueries(): CatalogueQuery[] {
  const random = seededRandom('catalogue bench');
  const below = (n: number) => random.below(n);
  const maybe = <T>(value: () => T): T | undefined => (below(3) === 0 ? value() : undefined);
  return Array.from({ length: QUERIES }, () => {
    const n = 100 + below(20_000);
    const query: CatalogueQuery = {
      n: maybe(() => ({ min: n, max: n + below(5000) })),
      k: maybe(() => ({ min: below(5000) })),
      rate: maybe(() => ({ min: below(95) / 100 })),
      columnWeight: maybe(() => ({ max: 3 + below(30) })),
      rowWeight: maybe(() => ({ min: 3 + below(30) })),
      girthMin: maybe(() => 4 + 2 * below(3)),
      distanceMin: maybe(() => below(40)),
      radiusMin: maybe(() => below(12)),
      structure: maybe(() => (below(2) ? 'cyclic' : 'quasi-cyclic')),
      resolvable: maybe(() => below(2) === 1),
      payloadBits: maybe(() => 64 + below(4096)),
      parityBits: below(9) === 0 ? 32 + below(1024) : undefined,
      shortenTo: below(9) === 0 ? 200 + below(8000) : undefined,
      ...maybe(() => ({ p: 10 ** -(1 + below(4)), targetFer: 10 ** -(3 + below(12)) })),
      sort: sortColumns[below(sortColumns.length)],
      descending: below(2) === 1,
    };
    return Object.fromEntries(Object.entries(query).filter(([, value]) => value !== undefined));
  });
}
