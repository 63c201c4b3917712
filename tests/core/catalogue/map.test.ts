import { expect, test } from 'vitest';
import { findCandidate } from '@/core/catalogue/find-candidate.ts';
import { mapCatalogue } from '@/core/catalogue/map.ts';
import { searchTable } from '@/core/catalogue/search.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';
import { ParamError } from '@/core/errors.ts';

const table = catalogueTable();

test('the map holds every match, in few enough cells to draw', () => {
  const { cells, matching } = mapCatalogue(table, {});
  expect(matching).toBe(searchTable(table, {}).matching);
  expect(cells.reduce((sum, { count }) => sum + count, 0)).toBe(matching);
  expect(cells.length).toBeLessThan(6000);
});

test('a narrow window is drawn candidate by candidate, each at its length and least rate', () => {
  const query = { n: { min: 270, max: 280 }, structure: 'cyclic' as const };
  const { cells } = mapCatalogue(table, query);
  const { candidates } = searchTable(table, query);
  const places = candidates.map(({ n, rank }) => `${n} ${(1 - rank.upper / n).toFixed(6)}`);
  expect(cells.length).toBeGreaterThan(0);
  for (const { n, rate } of cells) expect(places).toContain(`${n} ${rate.toFixed(6)}`);
});

test('after shortening the map shows the length and rate that are left', () => {
  const { cells } = mapCatalogue(table, { payloadBits: 128, parityBits: 82 });
  expect(cells.length).toBeGreaterThan(0);
  for (const { n, rate } of cells) expect([n, rate]).toEqual([210, 128 / 210]);
});

test('a candidate is found by its id far down the listing, with its verdicts, and only where it matches', () => {
  const query = { n: { min: 200, max: 4000 }, rate: { min: 0.7 } };
  const [deep] = searchTable(table, { ...query, offset: 900, limit: 1 }).candidates;
  expect(findCandidate(table, query, deep!.id)).toEqual(deep);
  expect(findCandidate(table, { ...query, n: { max: 10 } }, deep!.id)).toBeNull();
  expect(findCandidate(table, query, 'no-family;q=2;blocks')).toBeNull();
  expect(() => findCandidate(table, { girthMin: -1 }, deep!.id)).toThrow(ParamError);
});

test('asked for, candidates that surely meet everything come first, each part in its order and none lost', () => {
  const query = {
    n: { min: 20, max: 150 },
    rate: { min: 0.45 },
    sort: 'distance' as const,
    descending: true,
    limit: 5000,
  };
  const plain = searchTable(table, query).candidates;
  const first = searchTable(table, { ...query, meetsFirst: true }).candidates;
  const meets = ({ verdicts }: (typeof plain)[number]) => verdicts.every(({ outcome }) => outcome === 'meets');
  expect(first.map(({ id }) => id)).toEqual(
    [...plain.filter(meets), ...plain.filter((candidate) => !meets(candidate))].map(({ id }) => id),
  );
  expect(plain.map(({ id }) => id)).not.toEqual(first.map(({ id }) => id));
});
