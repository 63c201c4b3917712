import type { Entries } from '@/core/formats/entries.ts';

/** The first `count` pairs of two lists side by side. */
export const pairedEntries = (rowOf: ArrayLike<number>, colOf: ArrayLike<number>, count = rowOf.length): Entries => ({
  each(visit) {
    for (let e = 0; e < count; e++) visit(rowOf[e]!, colOf[e]!);
  },
});
