import { describe, expect, it } from 'vitest';
import { createDecoder } from '../../src/core/decoders/create-decoder.ts';
import type { DecoderSpec } from '../../src/core/decoders/decoder-spec.ts';
import facts from '../reference/decoder-facts.json' with { type: 'json' };
import { developed, planarDifferenceSets } from '../reference/difference-sets.ts';

const n = 21;
const H = developed(n, planarDifferenceSets[4].set);

describe('all 2^21 patterns on PG(2,4), one by one', () => {
  it.each<[keyof typeof facts.entries, DecoderSpec]>([
    ['E-exact-21-OSMLD', { kind: 'majority-logic' }],
    ['E-exact-21-GB', { kind: 'gallager-b' }],
    ['E-exact-21-SPA-0.05', { kind: 'sum-product', designP: 0.05 }],
  ])('%s', (id, spec) => {
    const { F_w, B_w, undetected_w } = facts.entries[id].value as unknown as Record<string, number[]>;
    const decoder = createDecoder(H, spec, { kind: 'bsc', p: 0.05 });
    const failed = new Array(n + 1).fill(0);
    const wrong = new Array(n + 1).fill(0);
    const unseen = new Array(n + 1).fill(0);
    const received = new Uint8Array(n);
    for (let pattern = 0; pattern < 2 ** n; pattern++) {
      let weight = 0;
      for (let j = 0; j < n; j++) weight += received[j] = (pattern >> j) & 1;
      const { word, converged } = decoder.decode(received);
      const errors = word.reduce((sum, bit) => sum + bit, 0);
      if (errors > 0) failed[weight] += 1;
      if (errors > 0 && converged) unseen[weight] += 1;
      wrong[weight] += errors;
    }
    expect(failed).toEqual(F_w);
    expect(wrong).toEqual(B_w);
    expect(unseen).toEqual(undetected_w);
  });
});
