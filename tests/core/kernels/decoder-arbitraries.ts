import fc from 'fast-check';
import { cap, type DecoderFor } from './arbitrary-runs.ts';

/** The settings each kernel is compared over. */
export const exactDecoders: Record<string, DecoderFor> = {
  'majority-logic': () => fc.constant({ kind: 'majority-logic' }),
  'bit-flipping': (most) =>
    fc.record({
      kind: fc.constant('bit-flipping' as const),
      iterations: cap,
      threshold: fc.option(fc.integer({ min: 1, max: most }), { nil: undefined }),
    }),
  'gallager-a': () => fc.record({ kind: fc.constant('gallager-a' as const), iterations: cap }),
  'gallager-b': (most) =>
    fc.record({
      kind: fc.constant('gallager-b' as const),
      iterations: cap,
      threshold: fc.option(
        fc.oneof(
          fc.integer({ min: 1, max: most }),
          fc.array(fc.integer({ min: 1, max: most }), { minLength: 1, maxLength: 6 }),
        ),
        { nil: undefined },
      ),
    }),
  'gradient-descent with several flips': (most) =>
    fc.record({
      kind: fc.constant('gradient-descent' as const),
      iterations: cap,
      flips: fc.constant('multi' as const),
      threshold: fc.option(fc.double({ min: -most - 3, max: most + 3, noNaN: true }), { nil: undefined }),
    }),
  'bit-flipping-max': () => fc.record({ kind: fc.constant('bit-flipping-max' as const), iterations: cap }),
  'gradient-descent with single flips': () =>
    fc.record({
      kind: fc.constant('gradient-descent' as const),
      iterations: cap,
      flips: fc.constant('single' as const),
    }),
  'min-sum': (most) =>
    fc.integer({ min: 1, max: Math.min(40, 127 - most) }).chain((c) =>
      fc.record({
        kind: fc.constant('min-sum' as const),
        iterations: cap,
        schedule: fc.constantFrom('layered' as const, 'flooding' as const),
        scale: fc.constantFrom('1/8', '1/4', '1/2', '3/4', '1', 'offset-1'),
        c: fc.constant(c),
        rMax: fc.option(fc.integer({ min: 1, max: Math.floor((127 - c) / most) }), { nil: undefined }),
      }),
    ),
};
