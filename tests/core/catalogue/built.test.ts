import { describe, expect, test } from 'vitest';
import { seededRandom } from '@/core/algebra/seeded-random.ts';
import type { CatalogueColumns } from '@/core/catalogue/columns.ts';
import { type Candidate, Search } from '@/core/catalogue/search.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { searchResolution } from '@/core/designs/resolve.ts';
import type { Enclosure } from '@/core/evidence.ts';
import { breadthFirstGirth } from '../../models/girth.ts';
import { eliminationRank, exhaustiveDistance } from '../../models/rank.ts';

// Small candidates of every family, drawn by a seed, built and measured by the slow plain twins.
const MAX_LENGTH = 260;
const MAX_INCIDENCES = 8000;
const WHOLE_A_FAMILY = 3;
const KEPT_A_FAMILY = 8;

const table = catalogueTable();
const drawn = [...drawByFamily(table)];

test('more than sixty candidates are drawn, from every family that has small ones', () => {
  expect(drawn.length).toBeGreaterThanOrEqual(60);
  expect(new Set(drawn.map(([, { design }]) => design.family)).size).toBeGreaterThanOrEqual(25);
});

describe('a candidate is what its formulas said once it is built', () => {
  test.each(drawn)('%s', (_, candidate) => holds(candidate));
});

test('a candidate shortened to a payload or a length has exactly the bits asked for', () => {
  const random = seededRandom('shortened');
  for (const query of [{ payloadBits: 24 }, { shortenTo: 60 }, { payloadBits: 40, parityBits: 37 }] as const) {
    const search = new Search(table, { n: { max: 150 }, ...query });
    const rows = [...search.matching()].filter(
      (row) => search.fit.settledShortening(row) !== undefined && isSmall(row),
    );
    expect(rows.length, JSON.stringify(query)).toBeGreaterThan(0);
    for (const row of random.shuffle(Uint32Array.from(rows)).subarray(0, 6)) {
      const { id, n, rank, distance, transforms, checks, design } = search.candidate(row);
      const { H } = deriveLdpc(buildDesign(design), { checks, transforms });
      const parity = eliminationRank(H);
      expect([H.cols, parity >= rank.lower && parity <= rank.upper], id).toEqual([n, true]);
      if ('payloadBits' in query) expect(H.cols - parity, id).toBe(query.payloadBits);
      if ('parityBits' in query) expect(parity, id).toBe(query.parityBits);
      if ('shortenTo' in query) expect(H.cols, id).toBe(query.shortenTo);
      if (H.cols - parity <= 12) encloses(distance, exhaustiveDistance(H), `${id} distance`);
    }
  }
});

function isSmall(row: number): boolean {
  const [n, columnWeight] = [table.column('n')[row]!, table.column('columnWeight')[row]!];
  return n <= MAX_LENGTH && n * columnWeight <= MAX_INCIDENCES;
}

function* drawByFamily(columns: CatalogueColumns): Iterable<[string, Candidate]> {
  const search = new Search(columns, {});
  const random = seededRandom('candidates');
  const byFamily = new Map<string, number[]>();
  for (const row of search.matching()) {
    if (!isSmall(row)) continue;
    const key = `${columns.designOf(row).family}/${columns.column('keptClasses')[row]! > 0}`;
    byFamily.set(key, [...(byFamily.get(key) ?? []), row]);
  }
  for (const [key, rows] of byFamily) {
    const wanted = key.endsWith('true') ? KEPT_A_FAMILY : WHOLE_A_FAMILY;
    for (const row of random.shuffle(Uint32Array.from(rows)).subarray(0, wanted)) {
      const candidate = search.candidate(row);
      yield [candidate.id, candidate];
    }
  }
}

function holds(candidate: Candidate): void {
  const { id, design, checks, transforms, n, rank, girth, distance, columnWeight, rowWeight, radius } = candidate;
  const built = buildDesign(design);
  const { H } = deriveLdpc(built, { checks, transforms });
  const parity = eliminationRank(H);
  expect(H.cols, 'n').toBe(n);
  encloses(rank, parity, `${id} rank`);
  expect(rank.upper).toBeLessThanOrEqual(n);
  encloses(girth, breadthFirstGirth(H), `${id} girth`);
  expect(distance.lower <= distance.upper && distance.upper <= n, 'distance').toBe(true);
  if (n - parity <= 14) encloses(distance, exhaustiveDistance(H), `${id} distance`);
  expect([...rowWeightsOf(H)], 'row weights').toEqual([rowWeight]);
  expect([...columnWeightsOf(H)], 'column weights').toEqual([columnWeight]);
  expect(2 * radius).toBeLessThanOrEqual(columnWeight);
  const shifts = shiftSizes(H);
  if (candidate.structure === 'cyclic') expect(shifts, 'cyclic').toContain(n);
  if (candidate.structure === 'quasi-cyclic') expect(shifts.length, 'quasi-cyclic').toBeGreaterThan(0);
  if (candidate.resolvable) expect(searchResolution(built).reason, 'resolvable').toBe('given');
}

function encloses({ lower, upper }: Enclosure, value: number, said: string): void {
  expect(lower <= value && value <= upper, `${said}: ${value} in ${lower}..${upper}`).toBe(true);
}

const rowWeightsOf = ({ rows, rowStart }: SparseMatrix) =>
  new Set(Array.from({ length: rows }, (_, r) => rowStart[r + 1]! - rowStart[r]!));

function columnWeightsOf({ cols, colIndex }: SparseMatrix): Set<number> {
  const weights = new Uint32Array(cols);
  for (const c of colIndex) weights[c]!++;
  return new Set(weights);
}

/** Sizes of runs of columns whose shift by one maps the rows onto themselves. */
function shiftSizes({ rows, cols, rowStart, colIndex }: SparseMatrix): number[] {
  const name = (columns: readonly number[]) => [...columns].sort((a, b) => a - b).join();
  const all = Array.from({ length: rows }, (_, r) => [...colIndex.subarray(rowStart[r], rowStart[r + 1])]);
  const named = all.map(name).sort();
  return Array.from({ length: cols - 1 }, (_, i) => i + 2)
    .filter((size) => cols % size === 0)
    .filter((size) => {
      const moved = all.map((row) => name(row.map((c) => ((c + 1) % size === 0 ? c + 1 - size : c + 1)))).sort();
      return moved.every((row, i) => row === named[i]);
    });
}
