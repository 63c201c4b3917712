import { expect, it } from 'vitest';
import { CheckSearch } from '../../src/core/codes/analysis/sets/check-search.ts';
import { tannerOrbits } from '../../src/core/codes/analysis/tanner-orbits.ts';
import { quasiCyclicMatrix } from '../models/gf2-models.ts';
import published from '../reference/quasi-cyclic-codes.json' with { type: 'json' };

const H = quasiCyclicMatrix(
  31,
  published['G-tanner155'].value.shifts.map((row) => row.map((x) => [x])),
);
const { columns } = tannerOrbits(H);

// Spectrum and stopping sets of this code: Rosnes and Ytrehus 2009, from memory; the distance is in the reference file.
it('Tanner’s [155, 64] code has distance 20, with 1023 words of that weight', { timeout: 3_600_000 }, () => {
  const search = new CheckSearch(H, columns, 'codeword');
  for (let size = 8; size < published['G-tanner155'].value.dmin_published; size += 2)
    expect(search.ofSize({ size, nodes: 1e9 })).toMatchObject({ count: 0, finished: true });
  expect(search.ofSize({ size: 20, nodes: 2e9 })).toMatchObject({ count: 1023, finished: true });
});

it('Tanner’s [155, 64] code has stopping distance 18, with 465 smallest stopping sets', { timeout: 3_600_000 }, () => {
  const search = new CheckSearch(H, columns, 'stopping');
  for (let size = 6; size < 18; size++)
    expect(search.ofSize({ size, nodes: 1e9 })).toMatchObject({ count: 0, finished: true });
  expect(search.ofSize({ size: 18, nodes: 2e9 })).toMatchObject({ count: 465, finished: true });
});
