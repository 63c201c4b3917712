import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type ConstantWeightCode,
  deriveConstantWeight,
  wordMatrix,
  wordOf,
} from '../../../../src/core/codes/constant-weight/constant-weight-code.ts';
import { disjunctness } from '../../../../src/core/codes/constant-weight/disjunctness.ts';
import { complementCode, shortenAt } from '../../../../src/core/codes/constant-weight/smaller-codes.ts';
import { parallelClassesOf, partitionByClasses } from '../../../../src/core/codes/constant-weight/word-classes.ts';
import { byPackedWords, byPositions, leastDistance } from '../../../../src/core/codes/constant-weight/word-distance.ts';
import { nearestWord } from '../../../../src/core/decoders/nearest-word.ts';
import { designFromBlocks } from '../../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { searchExactCover } from '../../../../src/core/designs/exact-cover.ts';
import { plainDisjunctness, plainDistance, plainWords } from '../../../models/constant-weight.ts';

const codeOfFamily = (family: string, params: Record<string, number | string>, complement = false) =>
  deriveConstantWeight(buildDesign({ family, params }), { complement });

/** Two to nine words of one weight on up to 70 positions, repeats allowed. */
const anyCode = fc.tuple(fc.integer({ min: 3, max: 70 }), fc.integer({ min: 1, max: 8 })).chain(([n, size]) =>
  fc
    .array(fc.uniqueArray(fc.nat(n - 1), { minLength: Math.min(n, size), maxLength: Math.min(n, size) }), {
      minLength: 2,
      maxLength: 9,
    })
    .map((blocks) => designFromBlocks(n, blocks)),
);

describe('the words of a design', () => {
  it('are its blocks: S(5, 8, 24) gives 759 words of weight 8, 8 apart', () => {
    const code = codeOfFamily('witt', { v: 24 });
    expect([code.n, code.w, code.M, code.distance]).toEqual([24, 8, 759, 8]);
    expect(code.distanceEvidence.grade).toBe('computed');
  });

  it.each([
    ['steiner-triple', { v: 13, method: 'cyclic' }, 2, 3],
    ['projective-plane', { q: 5 }, 2, 6],
    ['steiner-quadruple', { v: 14 }, 3, 4],
    ['inversive-plane', { q: 4 }, 3, 5],
    ['witt', { v: 11 }, 4, 5],
    ['witt', { v: 12 }, 5, 6],
    ['witt', { v: 23 }, 4, 7],
  ] as const)(
    'of the t-design %s %j with one block on t points are exactly 2(k − t + 1) apart',
    (family, params, t, k) => {
      expect(codeOfFamily(family, params).distance).toBe(2 * (k - t + 1));
    },
  );

  it('complemented keep their distances and exchange weight n − w for w', () => {
    fc.assert(
      fc.property(anyCode, (design) => {
        const code = deriveConstantWeight(design);
        const complement = deriveConstantWeight(design, { complement: true });
        expect(complement.w).toBe(code.n - code.w);
        expect(complement.distance).toBe(code.distance);
        expect(plainDistance(complement)).toBe(code.distance);
        expect(complementCode(complement)).toEqual({ ...code, complement: false });
      }),
      { numRuns: 100 },
    );
  });

  it('of two sizes are refused, naming the block', () => {
    const design = designFromBlocks(4, [
      [0, 1],
      [1, 2, 3],
    ]);
    expect(() => deriveConstantWeight(design)).toThrow(/blocks\[1\]: got 3; accepted is blocks all of size 2/);
  });

  it('fewer than two are no pair: the distance given is 2w', () => {
    expect(deriveConstantWeight(designFromBlocks(5, [[0, 1, 2]])).distance).toBe(6);
    expect(deriveConstantWeight(designFromBlocks(5, [])).M).toBe(0);
  });
});

describe('the least distance', () => {
  it('by subsets, by positions and by packed words is that of every pair compared bit by bit', () => {
    fc.assert(
      fc.property(anyCode, (design) => {
        const code = deriveConstantWeight(design);
        const plain = plainDistance(code);
        expect(leastDistance(code).value).toEqual({ lower: plain, upper: plain });
        expect([byPositions(code), byPackedWords(code)]).toEqual([code.w - plain / 2, code.w - plain / 2]);
      }),
      { numRuns: 200 },
    );
  });

  it('of 99,975 triples is found within a second, of 85,344 quadruples too', () => {
    for (const [family, params, M, distance] of [
      ['steiner-triple', { v: 775, method: 'cyclic' }, 99_975, 4],
      ['steiner-quadruple', { v: 128 }, 85_344, 4],
    ] as const) {
      const code = codeOfFamily(family, params);
      expect([code.M, code.distance, code.distanceEvidence.grade]).toEqual([M, distance, 'computed']);
    }
  });

  it('of words too many to compare is left as a bound that holds, with the reason', () => {
    fc.assert(
      fc.property(anyCode, (design) => {
        const code = deriveConstantWeight(design);
        const { value, grade, method } = leastDistance(code, 0);
        if (grade !== 'bounded') return;
        expect(method).toMatch(/too many to compare each two/);
        expect(value.lower <= code.distance && code.distance <= value.upper).toBe(true);
      }),
      { numRuns: 100 },
    );
    expect(leastDistance(codeOfFamily('witt', { v: 24 }), 0)).toMatchObject({
      grade: 'bounded',
      value: { lower: 0, upper: 8 },
    });
  });
});

describe('shortening at a position', () => {
  it('with a one there gives the derived design’s words, with a zero the residual’s', () => {
    const code = codeOfFamily('steiner-quadruple', { v: 10 });
    const one = shortenAt(code, 3, 1);
    const zero = shortenAt(code, 3, 0);
    expect([one.n, one.w, one.M, one.distance]).toEqual([9, 3, 12, 4]);
    expect([zero.n, zero.w, zero.M, zero.distance]).toEqual([9, 4, 18, 4]);
  });

  it('parts the words in two and lowers no distance', () => {
    fc.assert(
      fc.property(anyCode, fc.nat(69), (design, pick) => {
        const code = deriveConstantWeight(design);
        const position = pick % code.n;
        const parts = ([0, 1] as const).flatMap((value) => {
          try {
            return [shortenAt(code, position, value)];
          } catch {
            return [];
          }
        });
        expect(parts.reduce((sum, part) => sum + part.M, 0)).toBe(code.M);
        for (const part of parts) if (part.M > 1) expect(part.distance).toBeGreaterThanOrEqual(code.distance);
        for (const part of parts) if (part.M > 1) expect(plainDistance(part)).toBe(part.distance);
      }),
      { numRuns: 100 },
    );
  });

  it('is refused off the word and where no word is left', () => {
    const code = deriveConstantWeight(designFromBlocks(3, [[0, 1]]));
    expect(() => shortenAt(code, 3, 1)).toThrow(/positions? from 0 to 2/);
    expect(() => shortenAt(code, 0, 0)).toThrow(/no word holds 0 at 0/);
  });
});

describe('classes of words', () => {
  it('of a Kirkman system are seven codes of five disjoint words', () => {
    const code = codeOfFamily('kirkman-triple', { v: 15 });
    const { classes, reason } = parallelClassesOf(code);
    expect(reason).toBe('given');
    const parts = partitionByClasses(code, classes!);
    expect(parts.map(({ M, distance }) => [M, distance])).toEqual(Array(7).fill([5, 6]));
    expect(new Set(parts.flatMap((part) => words(part))).size).toBe(35);
  });

  it('of complements are those of the blocks', () => {
    const code = codeOfFamily('affine-plane', { q: 3 }, true);
    const parts = partitionByClasses(code, parallelClassesOf(code).classes!);
    expect(parts.map(({ w, M, distance }) => [w, M, distance])).toEqual(Array(4).fill([6, 3, 6]));
  });

  it('are none where the weight does not divide the length, with that reason', () => {
    const { classes, reason, detail } = parallelClassesOf(codeOfFamily('projective-plane', { q: 2 }));
    expect([classes, reason, detail]).toEqual([null, 'none', 'blocks of 3 points cannot partition 7 points']);
  });

  it('may be designs of a large set: the 84 triples on 9 points as seven S(2, 3, 9)', () => {
    const start = firstSystem();
    const sets = Array.from({ length: 7 }, (_, s) => start.map((triple) => shifted(triple, s)));
    const all = deriveConstantWeight(designFromBlocks(9, sets.flat()));
    expect([all.M, all.distance]).toEqual([84, 2]);
    const parts = partitionByClasses(
      all,
      Uint32Array.from({ length: 84 }, (_, i) => Math.floor(i / 12)),
    );
    expect(parts.map(({ M, distance }) => [M, distance])).toEqual(Array(7).fill([12, 4]));
  });

  /** A triple system on Z7 and two fixed points with one triple of each of the twelve orbits under p → p + 1, so that its
   *  seven shifts have no triple in common: an exact cover of pairs and orbits. */
  function firstSystem(): number[][] {
    const triples = plainWords(9, 3);
    const pairs = plainWords(9, 2).map((pair) => pair.join());
    const orbitOf = (triple: number[]) => Array.from({ length: 7 }, (_, s) => shifted(triple, s).join()).sort()[0]!;
    const orbits = [...new Set(triples.map(orbitOf))];
    const rows = triples.map((triple) => [
      ...pairs.flatMap((pair, i) => (pair.split(',').every((p) => triple.includes(Number(p))) ? [i] : [])),
      pairs.length + orbits.indexOf(orbitOf(triple)),
    ]);
    let found: number[][] = [];
    searchExactCover(pairs.length + orbits.length, rows, {
      maxNodes: 100_000,
      onSolution(chosen) {
        found = [...chosen].map((i) => triples[i]!);
        return true;
      },
    });
    return found;
  }

  const shifted = (triple: number[], s: number) => triple.map((p) => (p < 7 ? (p + s) % 7 : p)).sort((a, b) => a - b);

  const words = (code: ConstantWeightCode) => Array.from({ length: code.M }, (_, i) => wordOf(code, i).join());
});

describe('disjunctness', () => {
  it('is that of trying every set of other words', () => {
    const small = anyCode.filter(({ v, b }) => v <= 24 && b <= 8);
    fc.assert(
      fc.property(small, (design) => {
        const code = deriveConstantWeight(design);
        const d = plainDisjunctness(code);
        expect(disjunctness(code).value).toEqual({ lower: d, upper: d });
      }),
      { numRuns: 150 },
    );
  });

  it.each([
    ['steiner-triple', { v: 9, method: 'affine' }, 2],
    ['projective-plane', { q: 4 }, 4],
    ['steiner-quadruple', { v: 16 }, 1],
    ['transversal', { k: 5, g: 7 }, 4],
  ] as const)('of %s %j is what Kautz and Singleton give', (family, params, d) => {
    expect(disjunctness(codeOfFamily(family, params)).value).toEqual({ lower: d, upper: d });
  });

  it('is a bound where the search is cut short', () => {
    const { value, grade } = disjunctness(codeOfFamily('witt', { v: 11 }), 1);
    expect(grade).toBe('bounded');
    expect(value.lower).toBeLessThanOrEqual(1);
    expect(value.upper).toBeGreaterThanOrEqual(1);
  });
});

describe('the nearest-word decoder', () => {
  it('corrects every pattern within the correction radius of a plane’s words', () => {
    const code = codeOfFamily('projective-plane', { q: 3 });
    const decoder = nearestWord(wordMatrix(code));
    for (let i = 0; i < code.M; i++) {
      for (let a = 0; a < code.n; a++) {
        for (let b = a; b < code.n; b++) {
          const received = new Uint8Array(code.n);
          for (const p of wordOf(code, i)) received[p] = 1;
          for (const p of new Set([a, b])) received[p]! ^= 1;
          expect(decoder.decode(received).index).toBe(i);
        }
      }
    }
  });
});
