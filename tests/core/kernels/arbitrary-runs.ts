import fc from 'fast-check';
import { matrixFromRows, type SparseMatrix, transpose } from '../../../src/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '../../../src/core/decoders/decoder-spec.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';

/** Random matrices and specs for the comparison of kernels with the reference decoders. */

const sorted = (values: Iterable<number>) => [...new Set(values)].sort((a, b) => a - b);

/** A circulant, its rows moved to the right or to the left. */
export const circulants: fc.Arbitrary<SparseMatrix> = fc
  .record({
    n: fc.integer({ min: 2, max: 90 }),
    offsets: fc.array(fc.nat(1000), { minLength: 1, maxLength: 12 }),
    backwards: fc.boolean(),
  })
  .map(({ n, offsets, backwards }) => {
    const first = sorted(offsets.map((d) => d % n));
    const rows = Array.from({ length: n }, (_, j) =>
      sorted(first.map((d) => (backwards ? (d - j + n) % n : (d + j) % n))),
    );
    return matrixFromRows(n, rows);
  });

/** Any rows, some empty, with no column left empty; up to some twenty different weights on either side. */
export const irregulars: fc.Arbitrary<SparseMatrix> = fc
  .record({ rows: fc.integer({ min: 1, max: 40 }), cols: fc.integer({ min: 1, max: 80 }) })
  .chain(({ rows, cols }) =>
    fc
      .array(fc.array(fc.nat(rows - 1), { minLength: 1, maxLength: Math.min(20, rows) }), {
        minLength: cols,
        maxLength: cols,
      })
      .map((columns) => transpose(matrixFromRows(rows, columns.map(sorted)))),
  );

/** Every column of weight d: d checks drawn for each. */
export const regularColumns = (d: number): fc.Arbitrary<SparseMatrix> =>
  fc
    .record({ rows: fc.integer({ min: d, max: 40 }), cols: fc.integer({ min: 2, max: 100 }) })
    .chain(({ rows, cols }) =>
      fc
        .array(fc.uniqueArray(fc.nat(rows - 1), { minLength: d, maxLength: d }), { minLength: cols, maxLength: cols })
        .map((columns) => transpose(matrixFromRows(rows, columns.map(sorted)))),
    );

export const matrices: fc.Arbitrary<SparseMatrix> = fc.oneof(circulants, irregulars, regularColumns(3));

/** A decoder made for the matrix it will meet: thresholds may depend on the largest column weight. */
export type DecoderFor = (mostChecks: number) => fc.Arbitrary<DecoderSpec>;

export const cap = fc.oneof(fc.integer({ min: 1, max: 8 }), fc.integer({ min: 9, max: 60 }));

export const runs = (
  decoders: DecoderFor,
  options: { from?: fc.Arbitrary<SparseMatrix>; erasures?: boolean; maxFrames?: number } = {},
): fc.Arbitrary<{ spec: RunSpec; index: number }> =>
  (options.from ?? matrices).chain((H) =>
    fc
      .record({
        decoder: decoders(largestColumn(H)),
        probability: fc.oneof(
          fc.double({ min: 1e-4, max: 0.1, noNaN: true }),
          fc.double({ min: 0.1, max: 0.5, noNaN: true }),
        ),
        weight: fc.option(fc.nat(H.cols), { freq: 3 }),
        seed: fc.string({ maxLength: 8 }),
        index: fc.nat(1000),
        framesPerShard: fc.integer({ min: 1, max: options.maxFrames ?? 400 }),
        sent: fc.constantFrom('zero' as const, undefined),
      })
      .map(({ decoder, probability, weight, seed, index, framesPerShard, sent }) => ({
        spec: {
          H,
          decoder,
          channel:
            weight !== null
              ? { kind: 'stratum' as const, weight }
              : options.erasures
                ? { kind: 'bec' as const, e: probability }
                : { kind: 'bsc' as const, p: probability },
          seed,
          framesPerShard,
          sent,
        },
        index,
      })),
  );

export function largestColumn(H: SparseMatrix): number {
  const degrees = new Uint32Array(H.cols);
  for (const j of H.colIndex) degrees[j]!++;
  return Math.max(...degrees);
}
