import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/core/algebra/seeded-random.ts';
import { automorphismGroup } from '../../../src/core/designs/automorphisms.ts';
import { designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { searchExactCover } from '../../../src/core/designs/exact-cover.ts';
import { completionTable, countPasches } from '../../../src/core/designs/pasch.ts';
import { climbTriples } from '../../../src/core/designs/triple-systems/hill-climbing.ts';
import { removePasches } from '../../../src/core/designs/triple-systems/pasch-removal.ts';
import { ParamError } from '../../../src/core/errors.ts';
import { plainAutomorphisms, plainExactCovers, plainPasches } from '../../models/plain-searches.ts';

const numbersBelow = (n: number) => Array.from({ length: n }, (_, i) => i);

describe('searches against their plain twins', () => {
  it('counts the Pasches of partial triple systems', () => {
    fc.assert(
      fc.property(fc.constantFrom(7, 9, 13), fc.string(), fc.integer({ min: 0, max: 8 }), (v, seed, dropped) => {
        const triples = climbTriples(v, seededRandom(seed))!;
        const blocks = numbersBelow(triples.length / 3).map((i) => [...triples.subarray(3 * i, 3 * i + 3)]);
        const design = designFromBlocks(v, blocks.slice(dropped));
        expect(countPasches(design)).toBe(plainPasches(design));
      }),
      { numRuns: 30 },
    );
  });

  it('keeps count of Pasches while it switches cycles', () => {
    for (const seed of ['a', 'b', 'c']) {
      const random = seededRandom(seed);
      const { triples, pasches } = removePasches(19, climbTriples(19, random)!, random, 500);
      const blocks = numbersBelow(triples.length / 3).map((i) => triples.subarray(3 * i, 3 * i + 3));
      expect(countPasches(designFromBlocks(19, blocks))).toBe(pasches);
    }
  });

  it('refuses to count Pasches where two triples share a pair or a block is no triple', () => {
    expect(() =>
      completionTable(
        designFromBlocks(4, [
          [0, 1, 2],
          [0, 1, 3],
        ]),
      ),
    ).toThrow(ParamError);
    expect(() => countPasches(designFromBlocks(4, [[0, 1]]))).toThrow(ParamError);
  });

  it('finds the order of the group of any blocks on up to six points', () => {
    const lists = fc
      .integer({ min: 1, max: 6 })
      .chain((v) =>
        fc.tuple(
          fc.constant(v),
          fc.uniqueArray(fc.subarray(numbersBelow(v), { minLength: 1 }), { maxLength: 8, selector: (s) => s.join() }),
        ),
      );
    fc.assert(
      fc.property(lists, ([v, blocks]) => {
        const design = designFromBlocks(v, blocks);
        expect(automorphismGroup(design).order).toBe(BigInt(plainAutomorphisms(design)));
      }),
      { numRuns: 150 },
    );
  });

  it('visits every exact cover', () => {
    const instances = fc
      .integer({ min: 1, max: 6 })
      .chain((n) =>
        fc.tuple(fc.constant(n), fc.array(fc.subarray(numbersBelow(n), { minLength: 1 }), { maxLength: 10 })),
      );
    fc.assert(
      fc.property(instances, ([columns, rows]) => {
        let count = 0;
        const { reason } = searchExactCover(columns, rows, { maxNodes: 1e5, onSolution: () => ++count < 0 });
        expect([count, reason]).toEqual([plainExactCovers(columns, rows), 'exhausted']);
      }),
      { numRuns: 200 },
    );
  });
});
