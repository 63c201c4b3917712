import { describe, expect, test } from 'vitest';
import type { Entry } from '@/core/catalogue/entry.ts';
import { nearestAlternatives } from '@/core/catalogue/nearest.ts';
import { obstaclesTo } from '@/core/catalogue/obstacles.ts';
import { type CatalogueQuery, sortColumns } from '@/core/catalogue/query.ts';
import { Search, searchCatalogue, searchTable } from '@/core/catalogue/search.ts';
import { catalogueTable, MAX_CATALOGUE_LENGTH } from '@/core/catalogue/table.ts';
import { ParamError } from '@/core/errors.ts';
import { logBinomialTail } from '@/core/statistics/binomial-tail.ts';

const table = catalogueTable();

describe('the whole catalogue', () => {
  test('holds at least 50,000 candidates, up to 70,000 bits', () => {
    expect(table.count).toBeGreaterThanOrEqual(50_000);
    const longest = table.column('n').reduce((most, n) => Math.max(most, n), 0);
    expect(longest).toBeGreaterThan(65_000);
    expect(longest).toBeLessThanOrEqual(MAX_CATALOGUE_LENGTH);
  });

  test('never predicts a rank above the length, a dimension of nothing, or an empty enclosure', () => {
    const column = (name: Parameters<typeof table.column>[0]) => table.column(name);
    const [n, rankLower, rankUpper] = [column('n'), column('rankLower'), column('rankUpper')];
    const [girthLower, girthUpper] = [column('girthLower'), column('girthUpper')];
    const [distanceLower, distanceUpper, radius] = [column('distanceLower'), column('distanceUpper'), column('radius')];
    const wrong = Array.from(n.keys()).filter(
      (i) =>
        rankLower[i]! > rankUpper[i]! ||
        rankUpper[i]! > n[i]! ||
        rankLower[i]! >= n[i]! ||
        girthLower[i]! > girthUpper[i]! ||
        distanceLower[i]! > distanceUpper[i]! ||
        distanceUpper[i]! > n[i]! ||
        2 * radius[i]! + 1 > distanceUpper[i]!,
    );
    expect(wrong.map((row) => table.entry(row))).toEqual([]);
  });

  test('gives every row back as it was taken in', () => {
    const search = new Search(table, {});
    for (let row = 0; row < table.count; row += 997) {
      const { n, rank, columnWeight, rowWeight, checks, keptClasses = 0 } = search.candidate(row);
      const stored = (['n', 'rankLower', 'columnWeight', 'rowWeight', 'keptClasses'] as const).map(
        (name) => table.column(name)[row],
      );
      expect([n, rank.lower, columnWeight, rowWeight, keptClasses]).toEqual(stored);
      expect(table.column('checks')[row]).toBe(checks === 'blocks' ? 0 : 1);
    }
  });
});

test('every candidate names a design that its family accepts, and no two share a name', () => {
  const { candidates } = searchTable(table, { n: { max: 400 }, limit: 5000 });
  expect(new Set(candidates.map(({ id }) => id)).size).toBe(candidates.length);
  expect(candidates.length).toBeGreaterThan(50);
});

test('the plane of order 16 is found by its length, rate and structure', () => {
  const [first] = searchCatalogue({ n: { min: 273, max: 273 }, rate: { min: 0.69 }, structure: 'cyclic', sort: 'n' });
  expect(first).toMatchObject({
    design: { family: 'projective-plane', params: { q: 16 } },
    n: 273,
    structure: 'cyclic',
  });
  expect(first!.rank).toMatchObject({ lower: 82, upper: 82, grade: 'proved' });
  expect(first!.verdicts.map(({ outcome }) => outcome)).toEqual(['meets', 'meets', 'meets']);
});

describe('a plain scan over all entries finds the same as the search', () => {
  const k = (e: Entry) => ({ least: e.n - e.rank.upper, most: e.n - e.rank.lower });
  test.each<[CatalogueQuery, (entry: Entry) => boolean]>([
    [
      { n: { min: 200, max: 1100 }, rate: { min: 0.6 }, girthMin: 6, radiusMin: 8 },
      (e) => e.n >= 200 && e.n <= 1100 && k(e).most / e.n >= 0.6 && e.girth.upper >= 6 && e.radius >= 8,
    ],
    [
      { k: { min: 100, max: 130 }, columnWeight: { max: 4 }, rowWeight: { min: 5 } },
      (e) => k(e).most >= 100 && k(e).least <= 130 && e.columnWeight <= 4 && e.rowWeight >= 5,
    ],
    [{ distanceMin: 60, n: { max: 5000 } }, (e) => e.distance.upper >= 60 && e.n <= 5000],
    [{ structure: 'quasi-cyclic', n: { max: 300 } }, (e) => e.structure !== 'none' && e.n <= 300],
    [{ resolvable: false, n: { max: 120 } }, (e) => !e.resolvable && e.n <= 120],
    [
      { families: ['witt', 'denniston'], radiusMin: 2 },
      (e) => ['witt', 'denniston'].includes(e.design.family) && e.radius >= 2,
    ],
    [
      { payloadBits: 128, parityBits: 82 },
      (e) => e.n >= 128 + 82 && k(e).most >= 128 && e.rank.lower <= 82 && e.rank.upper >= 82,
    ],
    [{ shortenTo: 1000, k: { min: 900 } }, (e) => e.n >= 1000 && 1000 - e.rank.lower >= 900],
    [
      { payloadBits: 500, n: { max: 600 }, rate: { min: 0.85 } },
      (e) => k(e).most >= 500 && 500 + e.rank.lower <= 600 && 500 / (500 + e.rank.lower) >= 0.85,
    ],
  ])('%o', (query, keeps) => {
    const plain = Array.from({ length: table.count }, (_, row) => row).filter(
      (row) => table.column('n')[row]! <= 12_000,
    );
    const found = [...new Search(table, query).matching()].filter((row) => table.column('n')[row]! <= 12_000);
    expect(found.length).toBeGreaterThan(0);
    const kept = plain.filter((row) => keeps(entryOf(row)));
    expect(found.sort((a, b) => a - b)).toEqual(kept);
  });

  const entries = new Map<number, Entry>();
  function entryOf(row: number): Entry {
    const entry = entries.get(row) ?? table.entry(row);
    entries.set(row, entry);
    return entry;
  }
});

describe('sorting', () => {
  const value = ({ n, rank, ...rest }: ReturnType<typeof searchCatalogue>[number], by: string): number => {
    const k = n - rank.upper;
    const { girth, distance, radius, columnWeight, rowWeight } = rest;
    const parity = rank.lower;
    const plain = {
      n,
      k,
      rate: k / n,
      parity,
      radius,
      columnWeight,
      rowWeight,
      girth: girth.lower,
      distance: distance.lower,
    };
    return plain[by as keyof typeof plain];
  };
  test.each(sortColumns)('by %s runs both ways', (sort) => {
    const up = searchCatalogue({ n: { max: 1000 }, sort, limit: 5000 });
    const down = searchCatalogue({ n: { max: 1000 }, sort, descending: true, limit: 5000 });
    for (let i = 1; i < up.length; i++) {
      expect(value(up[i]!, sort)).toBeGreaterThanOrEqual(value(up[i - 1]!, sort));
      expect(value(down[i]!, sort)).toBeLessThanOrEqual(value(down[i - 1]!, sort));
    }
  });

  test.each(['n', 'k', 'rate', 'parity'] as const)('by %s follows the shortened code', (sort) => {
    for (const fit of [{ payloadBits: 200 }, { shortenTo: 400 }]) {
      const settled = searchCatalogue({
        ...fit,
        families: ['projective-plane', 'affine-plane'],

        n: { max: 1500 },
        sort,
        limit: 5000,
      }).filter(({ rank, shortenBy }) => rank.lower === rank.upper && shortenBy!.lower === shortenBy!.upper);
      expect(settled.length).toBeGreaterThan(10);
      for (let i = 1; i < settled.length; i++)
        expect(value(settled[i]!, sort)).toBeGreaterThanOrEqual(value(settled[i - 1]!, sort) - 1e-12);
    }
  });

  test('pages join without a gap', () => {
    const query = { n: { max: 200 }, sort: 'rate' } as const;
    const all = searchCatalogue({ ...query, limit: 300 }).map(({ id }) => id);
    const pages = [0, 100, 200].flatMap((offset) => searchCatalogue({ ...query, offset, limit: 100 }));
    expect(pages.map(({ id }) => id)).toEqual(all);
  });
});

describe('a target at a raw error rate', () => {
  const outcomeOf = (family: string, q: number, query: CatalogueQuery) =>
    searchCatalogue({ families: [family], ...query, limit: 5000 })
      .find(({ design, checks }) => design.params.q === q && checks === 'blocks')
      ?.verdicts.find(({ requirement }) => requirement === 'frame error rate');

  test('is met by proof where the one-step radius reaches it, and unknown where only a run can tell', () => {
    const plane = (p: number) => outcomeOf('projective-plane', 16, { p, targetFer: 1e-9 });
    expect(plane(0.001)).toMatchObject({ outcome: 'meets', grade: 'proved' });
    expect(plane(0.003)).toMatchObject({ outcome: 'unknown' });
  });

  test('rules a code out when the likely patterns outnumber its syndromes', () => {
    expect(outcomeOf('projective-plane', 16, { p: 0.2, targetFer: 1e-9 })).toBeUndefined();
    // Capacity is 0.531 at a raw error rate of 0.1.
    const left = searchCatalogue({ n: { min: 500, max: 2000 }, p: 0.1, targetFer: 1e-12, limit: 5000 });
    for (const { n, rank } of left) expect(1 - rank.upper / n).toBeLessThan(0.531);
  });

  test('agrees with the tail of the binomial law itself', () => {
    for (const row of [200, 20_000, 60_000, 90_000]) {
      const { n, radius } = table.entry(row);
      for (const p of [1e-4, 1e-3, 0.01]) {
        for (const targetFer of [1e-3, 1e-9, 1e-15]) {
          const outcome = new Search(table, { p, targetFer }).requirements[0]!.outcome(row);
          expect(outcome === 'meets').toBe(logBinomialTail(n, p, radius) <= Math.log(targetFer));
        }
      }
    }
  });
});

test('a payload asks for shortening by the bits that are over, to the bit', () => {
  const query = { payloadBits: 128, parityBits: 82, radiusMin: 8, structure: 'cyclic' } as const;
  const plane = searchCatalogue(query).find(({ design }) => design.family === 'projective-plane');
  expect(plane).toMatchObject({
    design: { family: 'projective-plane', params: { q: 16 } },
    n: 128 + 82,
    shortenBy: { lower: 63, upper: 63 },
    transforms: [{ kind: 'shorten', bits: 63 }],
  });
  expect(plane!.distance).toMatchObject({ lower: 18, grade: 'bounded' });
});

test('where the rank is only bounded, shortening is said in bounds and left for after the build', () => {
  const open = searchCatalogue({ payloadBits: 100, n: { max: 400 }, limit: 5000 }).find(
    (c) => c.rank.lower < c.rank.upper,
  );
  expect(open!.shortenBy!.lower).toBeLessThan(open!.shortenBy!.upper);
  expect(open!.transforms.some(({ kind }) => kind === 'shorten')).toBe(false);
});

describe('when nothing fits', () => {
  const query = { n: { min: 274, max: 306 }, structure: 'cyclic', radiusMin: 8, rate: { min: 0.5 } } as const;

  test('the nearest on each side of each window is named', () => {
    expect(searchTable(table, query).matching).toBe(0);
    const nearest = nearestAlternatives(table, query);
    const lengths = [...new Search(table, { ...query, n: undefined }).matching()].map((row) => table.column('n')[row]!);
    const found = (direction: string) =>
      nearest.find((each) => each.givenUp === 'length' && each.direction === direction)!.entry.n;
    expect([found('below'), found('above')]).toEqual([
      Math.max(...lengths.filter((n) => n < 274)),
      Math.min(...lengths.filter((n) => n > 306)),
    ]);
    expect(found('below')).toBe(273);
  });

  test('parity and payload name the nearest on both sides', () => {
    const tight = { payloadBits: 190, parityBits: 83, structure: 'cyclic' } as const;
    const nearest = nearestAlternatives(table, tight);
    const parity = nearest.filter(({ givenUp }) => givenUp === 'parity');
    expect(parity.map(({ direction }) => direction)).toEqual(['below', 'above']);
    expect(parity[0]!.words).toBe('parity 82, below 83');
  });

  test('the theorem that forbids a plane of order 6 stands in the way of 43 bits with orthogonal checks', () => {
    const rules = obstaclesTo({ n: { min: 43, max: 43 }, structure: 'cyclic', radiusMin: 3 }).map(({ rule }) => rule);
    expect(rules).toContain('bruck-ryser-chowla');
  });

  test.each<[string, CatalogueQuery]>([
    ['singleton', { n: { max: 20 }, k: { min: 12 }, distanceMin: 10 }],
    ['plotkin', { n: { max: 20 }, k: { min: 8 }, distanceMin: 12 }],
    ['hamming', { n: { max: 100 }, rate: { min: 0.9 }, k: { min: 90 }, distanceMin: 7 }],
    ['sphere-packing-converse', { payloadBits: 900, parityBits: 100, p: 0.05, targetFer: 1e-6 }],
    ['tree-bound', { n: { max: 30 }, girthMin: 8, columnWeight: { min: 6 }, rowWeight: { min: 6 } }],
  ])('%s is named when it forbids what is asked', (rule, asked) => {
    const found = obstaclesTo(asked).find((reason) => reason.rule === rule);
    expect(found?.statement).toBeTruthy();
    expect(searchTable(table, asked).candidates.every((c) => c.verdicts.some((v) => v.outcome !== 'meets'))).toBe(true);
  });

  test('no theorem is named against what the catalogue has', () => {
    expect(obstaclesTo({ n: { min: 273, max: 273 }, rate: { min: 0.69 }, distanceMin: 18, girthMin: 6 })).toEqual([]);
  });
});

test('a wrong part of a query is named with what it accepts', () => {
  expect(() => searchCatalogue({ girthMin: -1 })).toThrow(/^girthMin: got -1/);
  expect(() => searchCatalogue({ colour: 'red' } as never)).toThrow(ParamError);
  expect(() => searchCatalogue({ n: { least: 3 } } as never)).toThrow(ParamError);
  expect(() => searchCatalogue({ families: ['nonesuch'] })).toThrow(/^families: got/);
  expect(() => searchCatalogue({ shortenTo: 0 })).toThrow(/^shortenTo: got 0/);
});
