import { describe, expect, test } from 'vitest';
import { nearestAlternatives } from '@/core/catalogue/nearest.ts';
import { matchingEntries, searchCatalogue, searchTable } from '@/core/catalogue/search.ts';
import { catalogueTable } from '@/core/catalogue/table.ts';
import { ParamError } from '@/core/errors.ts';

const table = catalogueTable();

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

test('a plain scan over all entries finds the same as the search', () => {
  const query = { n: { min: 200, max: 1100 }, rate: { min: 0.6 }, girthMin: 6, radiusMin: 8 } as const;
  const plain = table.entries.filter(
    (e) => e.n >= 200 && e.n <= 1100 && 1 - e.rank.lower / e.n >= 0.6 && e.girth.upper >= 6 && e.radius >= 8,
  );
  expect(new Set(matchingEntries(table, query))).toEqual(new Set(plain));
});

describe('sorting', () => {
  test.each(['n', 'rate', 'distance', 'radius', 'parity'] as const)('by %s runs both ways', (sort) => {
    const value = (i: number, list: ReturnType<typeof searchCatalogue>) => {
      const { n, rank, distance, radius } = list[i]!;
      return { n, rate: 1 - rank.upper / n, distance: distance.lower, radius, parity: rank.lower }[sort];
    };
    const up = searchCatalogue({ n: { max: 2000 }, sort, limit: 5000 });
    const down = searchCatalogue({ n: { max: 2000 }, sort, descending: true, limit: 5000 });
    for (let i = 1; i < up.length; i++) {
      expect(value(i, up)).toBeGreaterThanOrEqual(value(i - 1, up));
      expect(value(i, down)).toBeLessThanOrEqual(value(i - 1, down));
    }
  });
});

test('a target at a raw error rate is met by proof where the one-step radius reaches it, and unknown elsewhere', () => {
  const found = searchCatalogue({ n: { min: 255, max: 273 }, p: 0.001, targetFer: 1e-9, limit: 5000 });
  const outcome = (family: string, q: number) =>
    found
      .find((c) => c.design.family === family && c.design.params.q === q)
      ?.verdicts.find((v) => v.requirement === 'frame error rate');
  expect(outcome('projective-plane', 16)).toMatchObject({ outcome: 'meets', grade: 'proved' });
  const impossible = searchCatalogue({ n: { min: 273, max: 273 }, p: 0.05, targetFer: 1e-9 });
  expect(impossible[0]!.verdicts.at(-1)!.outcome).toBe('unknown');
});

test('a payload asks for shortening by the bits that are over', () => {
  const [plane] = searchCatalogue({ n: { min: 273, max: 273 }, payloadBits: 128, parityBits: 82 });
  expect(plane!.shortenBy).toEqual({ lower: 191 - 128, upper: 191 - 128 });
});

test('when nothing fits, the nearest on each side of each window is named', () => {
  const query = { n: { min: 274, max: 306 }, structure: 'cyclic', radiusMin: 8, rate: { min: 0.5 } } as const;
  expect(searchTable(table, query).matching).toBe(0);
  const nearest = nearestAlternatives(table, query);
  expect(nearest.find((x) => x.givenUp === 'length' && x.direction === 'below')!.entry.n).toBe(273);
  expect(nearest.find((x) => x.givenUp === 'length' && x.direction === 'above')!.entry.n).toBe(1023);
});

test('a wrong part of a query is named with what it accepts', () => {
  expect(() => searchCatalogue({ girthMin: -1 })).toThrow(/^girthMin: got -1/);
  expect(() => searchCatalogue({ colour: 'red' } as never)).toThrow(ParamError);
  expect(() => searchCatalogue({ n: { least: 3 } } as never)).toThrow(ParamError);
});
