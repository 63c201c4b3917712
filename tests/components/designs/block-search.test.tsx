import { describe, expect, test } from 'vitest';
import { disjointGroups, groupsFromClasses, membersOf } from '@/components/designs/block-groups.ts';
import { blockFrom, blocksWith, pointsFrom } from '@/components/designs/block-search.ts';
import { fittingDrawings } from '@/components/designs/fitting-drawings.ts';
import { addressFrom } from '@/components/designs/use-design-address.ts';
import { blockOf } from '@/core/designs/block-design.ts';
import { outlineOf } from '@/core/designs/questions/question.ts';
import { opened } from './opened.ts';

const witt = opened('witt', { v: 12 }).design;

describe('the search for blocks', () => {
  test('reads points with spaces or commas between, each once', () => {
    expect(pointsFrom(' 3  17,3 ', 24)).toEqual({ ok: true, value: [3, 17] });
    expect(pointsFrom('', 24)).toEqual({ ok: true, value: [] });
  });

  test.each(['24', '-1', '3 x', '1.5', '1e1'])('does not read %s as points of 24, and says what it accepts', (text) => {
    expect(pointsFrom(text, 24)).toEqual({ ok: false, error: 'points from 0 to 23, with spaces between' });
  });

  test('reads a block number below the number of blocks', () => {
    expect(blockFrom('131', 132)).toEqual({ ok: true, value: 131 });
    expect(blockFrom('', 132)).toEqual({ ok: true, value: null });
    expect(blockFrom('132', 132)).toEqual({ ok: false, error: 'a block from 0 to 131' });
  });

  test('finds the blocks that hold all points, as the plain way does', () => {
    for (const points of [[], [0], [3, 7], [1, 4, 9], [0, 1, 2, 3, 4]]) {
      const plain = Array.from({ length: witt.b }, (_, i) => i).filter((i) =>
        points.every((p) => blockOf(witt, i).includes(p)),
      );
      expect([...blocksWith(witt, points)]).toEqual(plain);
    }
    expect(blocksWith(witt, [0, 1, 2, 3, 4])).toHaveLength(1);
  });
});

describe('groups of blocks', () => {
  test('share no point within a group', () => {
    for (const [i, members] of membersOf(disjointGroups(witt)).entries()) {
      const points = members.flatMap((block) => [...blockOf(witt, block)]);
      expect(new Set(points).size, `group ${i}`).toBe(points.length);
    }
  });

  test('of a resolution are its classes, numbered from 0 as blocks name them', () => {
    expect(groupsFromClasses([7, 7, 2, 9, 2])).toEqual({
      kind: 'classes',
      of: Uint32Array.from([0, 0, 1, 2, 1]),
      count: 3,
    });
  });
});

describe('the drawing', () => {
  test.each([
    ['kirkman-triple', { v: 39 }, ['graph', 'incidence', 'plot']],
    ['quadratic-residue', { q: 11 }, ['graph', 'incidence', 'plot']],
    ['affine-plane', { q: 7 }, ['incidence', 'plot']],
    ['witt', { v: 24 }, ['incidence', 'plot']],
    ['generalised-quadrangle', { kind: 'W', q: 3 }, ['incidence', 'plot']],
    ['projective-plane', { q: 8 }, ['plot']],
  ] as const)('of %s %j can be %j', (family, params, expected) => {
    expect(fittingDrawings(outlineOf(opened(family, params)), true)).toEqual(expected);
  });
});

test('an address restores block, points, class and drawing, and leaves out what it does not know', () => {
  expect(addressFrom('?block=5&through=3+17&class=2&drawing=incidence')).toEqual({
    block: '5',
    through: '3 17',
    class: '2',
    drawing: 'incidence',
  });
  expect(addressFrom('?drawing=cube&other=1')).toEqual({});
});
