import { describe, expect, test } from 'vitest';
import type { Requirements } from '@/api/projects.ts';
import { derivationOf, designOf, standingOf } from '@/components/candidates/candidate-words.ts';
import { orderOf, queryFrom, statedBehind } from '@/components/candidates/filters.ts';
import { filtersFrom, isFromRequirements, leftOut } from '@/components/candidates/from-requirements.ts';
import { scatterScale, windowBetween } from '@/components/candidates/scatter-scale.ts';
import { columnsFor, tableColumns } from '@/components/candidates/table-columns.tsx';
import { candidate } from './example-candidates.ts';

const link: Requirements = {
  channel: { kind: 'bsc', p: 0.004 },
  targetFer: 1e-9,
  payloadBits: 512,
  lengthMin: 600,
  lengthMax: 1100,
  rateMin: 0.5,
  structure: 'any',
};

describe('the window of a project’s requirements', () => {
  test('states what formulas can search by', () => {
    expect(filtersFrom(link)).toEqual({
      n: '600..1100',
      rate: '0.5..',
      payloadBits: '512',
      p: '0.004',
      targetFer: '1e-9',
    });
    expect(leftOut(link)).toEqual([]);
  });

  test('leaves out a payload of several words and a target that only runs measure, and says so', () => {
    const archive: Requirements = { targetUber: 1e-15, payloadBits: 32_768, lengthMax: 4200, structure: 'cyclic' };
    expect(filtersFrom(archive)).toEqual({ n: '..4200', structure: 'cyclic' });
    const [payload, target] = leftOut(archive);
    expect(payload!.replaceAll('\u202f', '')).toBe(
      'the payload of 32768 bits, which takes several words of at most 4200',
    );
    expect(target).toBe('the target UBER, which runs measure');
  });

  test('is told from any other window, whatever its order', () => {
    expect(isFromRequirements({ ...filtersFrom(link), sort: 'rate' }, link)).toBe(true);
    expect(isFromRequirements({ ...filtersFrom(link), girthMin: '8' }, link)).toBe(false);
    expect(isFromRequirements({}, link)).toBe(false);
  });
});

describe('the query', () => {
  test('takes the largest distance first once redundancy is bounded, and else the shortest code', () => {
    expect(orderOf({ rate: '0.5..' })).toEqual({ sort: 'distance', descending: true });
    expect(orderOf({ n: '..100' })).toEqual({ sort: 'n', descending: false });
    expect(orderOf({ rate: '0.5..', sort: 'girth' })).toEqual({ sort: 'girth', descending: false });
  });

  test('puts those that meet everything first unless told not to', () => {
    expect(queryFrom({ n: '7' }).query).toEqual({ n: '7', sort: 'n', meetsFirst: 'true' });
    expect(queryFrom({ n: '7', mixed: 'true' }).query).toEqual({ n: '7', sort: 'n' });
  });

  test('leaves out what it cannot read and says what it would accept', () => {
    const { query, errors } = queryFrom({ n: 'long', girthMin: '6', p: '0.7' });
    expect(query).toEqual({ girthMin: '6', sort: 'n', meetsFirst: 'true' });
    expect(errors).toEqual({
      n: 'a window such as 900..1100, 0.8.. or ..2000',
      p: 'a probability above 0 and at most 0.5',
    });
  });

  test('says what is stated behind "more"', () => {
    expect(statedBehind({ n: '7', payloadBits: '32', families: 'witt' })).toEqual(['payload bits 32', 'one family']);
  });
});

describe('the columns', () => {
  const keys = (columns: readonly { key: string }[]) => columns.map(({ key }) => key);

  test('beside the panel on a screen of 1280 pixels are those that decide', () => {
    expect(keys(columnsFor(null, 840 / 16, true))).toEqual(['n', 'k', 'rate', 'distance', 'standing']);
  });

  test('grow with the room, and never pass it', () => {
    expect(keys(columnsFor(null, 90, true))).toEqual(['n', 'k', 'rate', 'girth', 'distance', 'radius', 'standing']);
    for (const widthRem of [36, 45, 52.5, 60, 80]) {
      const sum = columnsFor(null, widthRem, true).reduce((total, column) => total + column.widthRem + 0.75, 12);
      expect(sum).toBeLessThanOrEqual(widthRem);
    }
  });

  test('asked for are all there, in their own order; without requirements none says how it stands', () => {
    expect(keys(columnsFor(['rowWeight', 'n'], 30, true))).toEqual(['n', 'rowWeight']);
    expect(keys(columnsFor(null, 90, false))).not.toContain('standing');
    expect(tableColumns.length).toBe(11);
  });
});

describe('a drag over the scatter', () => {
  const scale = scatterScale(
    [
      { n: 100, rate: 0.5 },
      { n: 10_000, rate: 0.9 },
    ],
    800,
    260,
  );

  test('becomes a window of length and rate, whichever corner it began at', () => {
    const from = [scale.x(200), scale.y(0.8)] as const;
    const to = [scale.x(2000), scale.y(0.6)] as const;
    const found = windowBetween(scale, from, to)!;
    expect(found).toEqual(windowBetween(scale, to, from));
    const [n0, n1] = found.n.split('..').map(Number);
    expect([n0! <= 200 && n0! >= 199, n1! >= 2000 && n1! <= 2001]).toEqual([true, true]);
    expect(found.rate).toBe('0.600..0.800');
  });

  test('that slipped by a few pixels means nothing', () => {
    expect(windowBetween(scale, [100, 100], [104, 180])).toBeNull();
  });
});

describe('a candidate in words', () => {
  test('is its design, and how its code comes from it', () => {
    const row = candidate({ checks: 'points', keptClasses: 5, transforms: [{ kind: 'shorten', bits: 13 }] });
    expect([designOf(row), derivationOf(row)]).toEqual([
      'Projective plane PG(2,16)',
      'one check a point, 5 classes kept, shortened by 13',
    ]);
  });

  test('meets all, or names the first requirement that stays open', () => {
    const verdict = (requirement: string, outcome: 'meets' | 'unknown') =>
      ({ requirement, outcome, grade: 'bounded', method: '' }) as const;
    expect(standingOf(candidate({ verdicts: [verdict('rate', 'meets')] })).word).toBe('meets 1 of 1');
    const open = [verdict('rate', 'meets'), verdict('length', 'unknown'), verdict('girth', 'unknown')];
    expect(standingOf(candidate({ verdicts: open })).word).toBe('length open, +1');
  });
});
