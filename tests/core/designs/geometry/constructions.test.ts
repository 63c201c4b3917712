import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { galoisField, subfieldOf } from '../../../../src/core/algebra/galois-field.ts';
import { binomial, gaussianBinomial } from '../../../../src/core/algebra/integers.ts';
import { blockOf } from '../../../../src/core/designs/block-design.ts';
import { BlockList } from '../../../../src/core/designs/geometry/block-list.ts';
import { developBaseBlock } from '../../../../src/core/designs/geometry/cyclic-design.ts';
import { projectiveFlats } from '../../../../src/core/designs/geometry/flats.ts';
import { specialLineMaps } from '../../../../src/core/designs/geometry/line-group.ts';
import { LINEAR_GROUP_SYSTEMS } from '../../../../src/core/designs/geometry/linear-group-systems.ts';
import { hermitianForm, parabolicForm, symplecticForm } from '../../../../src/core/designs/geometry/polar-forms.ts';
import { forEachPolarLine, type PolarForm, polarPoints } from '../../../../src/core/designs/geometry/polar-lines.ts';
import { rankFromSpectrum } from '../../../../src/core/designs/geometry/spectral-rank.ts';
import { spreadBasis } from '../../../../src/core/designs/geometry/spread.ts';
import { echelonBases } from '../../../../src/core/designs/geometry/subspaces.ts';
import { treeBound } from '../../../../src/core/designs/partial-linear-prediction.ts';
import { ParamError } from '../../../../src/core/errors.ts';
import { steinerUnions } from '../../../models/orbit-cover.ts';
import { plainPolarLines } from '../../../models/polar-lines.ts';
import { LineSubsetOrbits } from '../../../models/subset-orbits.ts';
import reference from '../../../reference/finite-geometry.json' with { type: 'json' };

test('developing a base block gives its translates, whatever the block', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 40 }), fc.uniqueArray(fc.nat(39), { minLength: 1 }), (n, points) => {
      const base = [...new Set(points.map((p) => p % n))];
      const design = developBaseBlock(n, base);
      for (let j = 0; j < n; j++) {
        expect([...blockOf(design, j)]).toEqual(base.map((p) => (p + j) % n).sort((a, b) => a - b));
      }
    }),
  );
});

test('reduced echelon bases are as many as there are subspaces, and no two alike', () => {
  for (const [q, dimension, n] of [
    [2, 2, 4],
    [2, 3, 6],
    [3, 2, 5],
    [4, 1, 3],
    [5, 2, 3],
  ] as const) {
    const seen = new Set<string>();
    for (const { rows } of echelonBases(q, dimension, 0, n - 1)) seen.add(rows.map((row) => row.join()).join(';'));
    expect(seen.size).toBe(gaussianBinomial(n, dimension, q));
  }
});

test('every flat of a projective geometry holds the whole line through any two of its points', () => {
  for (const [m, q, d] of [
    [3, 2, 2],
    [3, 3, 1],
    [4, 2, 2],
    [3, 4, 2],
    [5, 2, 3],
  ] as const) {
    const K = galoisField(q ** (m + 1));
    const flats = projectiveFlats(m, q, d);
    const scalars = subfieldOf(K, q).slice(1);
    const joins = (x: number, y: number) => scalars.map((s) => K.log[K.add(K.exp[x]!, K.mul(s, K.exp[y]!))]! % flats.v);
    let missing = 0;
    for (let i = 0; i < flats.b; i++) {
      const block = [...blockOf(flats, i)];
      for (const x of block) {
        for (const y of block) if (x < y) missing += joins(x, y).filter((point) => !block.includes(point)).length;
      }
    }
    expect(missing).toBe(0);
  }
});

test.each([
  ['H(3,4)', hermitianForm(2, 4)],
  ['H(4,4)', hermitianForm(2, 5)],
  ['Q(6,2)', parabolicForm(2)],
  ['Q(6,3)', parabolicForm(3)],
])('the lines of %s are those a search over pairs of points finds, each once', (_, form) => {
  const points = polarPoints(form);
  expectSameLines(form, plainPolarLines(form, points));
});

test('the lines of W(q) are those through orthogonal pairs of points, each once', () => {
  for (const q of [2, 3, 4]) {
    const form = symplecticForm(q);
    const { add, sub, mul } = form.field;
    const minor = (x: Uint32Array, y: Uint32Array, i: number, j: number) => sub(mul(x[i]!, y[j]!), mul(x[j]!, y[i]!));
    const orthogonal = (x: Uint32Array, y: Uint32Array) => add(minor(x, y, 0, 3), minor(x, y, 1, 2)) === 0;
    expectSameLines(form, plainPolarLines(form, polarPoints(form), orthogonal));
  }
});

function expectSameLines(form: PolarForm, plain: Set<string>): void {
  const lines: string[] = [];
  forEachPolarLine(form, polarPoints(form), (line) => lines.push([...line].sort((a, b) => a - b).join()));
  expect(lines.length).toBe(plain.size);
  expect(new Set(lines)).toEqual(plain);
}

describe('linear groups on the projective line', () => {
  test('PSL(2,q) has q(q² − 1)/2 elements, all different permutations', () => {
    for (const q of [3, 7, 11, 27]) {
      const seen = new Set<string>();
      for (const map of specialLineMaps(galoisField(q))) {
        expect(new Set(map).size).toBe(q + 1);
        seen.add(map.join());
      }
      expect(seen.size).toBe((q * (q * q - 1)) / 2);
    }
  });

  test('orbits of subsets add up to all of them', () => {
    for (const [q, k, semilinear] of [
      [11, 5, false],
      [19, 4, false],
      [23, 5, false],
      [27, 5, true],
    ] as const) {
      const orbits = new LineSubsetOrbits(galoisField(q), semilinear).orbits(k);
      const order = ((q * (q * q - 1)) / 2) * (semilinear ? 3 : 1);
      expect(orbits.reduce((sum, orbit) => sum + order / orbit.stabiliser, 0)).toBe(binomial(q + 1, k));
    }
  });

  test('six unions of PSL(2,23)-orbits are an S(5,6,24), and the first is the one built', () => {
    const unions = steinerUnions(new LineSubsetOrbits(galoisField(23), false), 6, 100);
    expect(unions).toHaveLength(reference.unions.count);
    expect(unions[0]).toEqual(LINEAR_GROUP_SYSTEMS[24]!.baseBlocks);
  });
});

describe('spreads', () => {
  test('the flats of a spread, one by one, partition the points', () => {
    for (const [m, q, flat] of [
      [3, 2, 1],
      [3, 3, 1],
      [5, 2, 2],
      [3, 4, 1],
    ] as const) {
      const field = galoisField(q);
      const count = (q ** (m + 1) - 1) / (q ** (flat + 1) - 1);
      const seen = new Set<string>();
      for (let index = 0; index < count; index++) {
        let span = [new Uint32Array(m + 1)];
        for (const row of spreadBasis({ m, q, flat }, index)) {
          span = span.flatMap((w) =>
            Array.from({ length: q }, (_, s) => w.map((c, j) => field.add(c, field.mul(s, row[j]!)))),
          );
        }
        for (const w of span) seen.add(w.join());
      }
      expect(seen.size).toBe(q ** (m + 1));
    }
  });

  test('any one flat of the spread of PG(11,9), of 3.5 billion lines, is at hand', () => {
    const [x, y] = spreadBasis({ m: 11, q: 9, flat: 1 }, 3_530_369_205);
    const field = galoisField(9);
    const multiples = Array.from({ length: 9 }, (_, s) => x!.map((c) => field.mul(s, c)).join());
    expect(multiples).not.toContain(y!.join());
    expect(() => spreadBasis({ m: 11, q: 9, flat: 1 }, 3_530_369_206)).toThrow(ParamError);
    expect(() => spreadBasis({ m: 11, q: 9, flat: 4 }, 0)).toThrow(ParamError);
  });
});

test('the tree bound: column weight + 1 at girth 6, twice it at girth 8, 14 for weight 3 at girth 12', () => {
  expect(treeBound(5, 6)).toBe(6);
  expect(treeBound(5, 8)).toBe(10);
  expect(treeBound(3, 10)).toBe(10);
  expect(treeBound(3, 12)).toBe(14);
});

test('a list of blocks that comes out short or long is caught', () => {
  const short = new BlockList(4, 2, 2);
  short.add([1, 0]);
  expect(() => short.finish()).toThrow('2 blocks expected, 1 found');
  expect(() => short.add([1, 2, 3])).toThrow();
});

test('the spectrum of the hexagon H(3) leaves two values short of 273 for its rank, and of an odd spectrum none', () => {
  const hexagon = [
    { value: 16, multiplicity: 1 },
    { value: 9, multiplicity: 104 },
    { value: 3, multiplicity: 168 },
  ];
  expect(rankFromSpectrum(hexagon)).toEqual({ lower: 271, upper: 273 });
  expect(rankFromSpectrum([{ value: 15, multiplicity: 4 }])).toEqual({ lower: 4, upper: 4 });
});
