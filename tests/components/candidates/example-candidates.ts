import type { CandidateRow } from '@/api/catalogue.ts';

const proved = { grade: 'proved' as const, method: 'a theorem' };
const exactly = (value: number) => ({ lower: value, upper: value, ...proved });

/** PG(2,16) as the catalogue gives it, with what a test changes. */
export const candidate = (change: Partial<CandidateRow> = {}): CandidateRow => ({
  id: 'projective-plane;q=16;blocks',
  design: { family: 'projective-plane', params: { q: 16 } },
  checks: 'blocks',
  transforms: [],
  n: 273,
  rank: exactly(82),
  girth: exactly(6),
  distance: exactly(18),
  radius: 8,
  radiusGrade: 'proved',
  columnWeight: 17,
  rowWeight: 17,
  structure: 'cyclic',
  resolvable: false,
  verdicts: [],
  ...change,
});

export const manyCandidates = (count: number): CandidateRow[] =>
  Array.from({ length: count }, (_, i) =>
    candidate({
      id: `steiner-triple;v=${i};points`,
      n: 100 + i,
      design: { family: 'transversal', params: { k: 4, g: 5 + i } },
      verdicts: [{ requirement: 'rate', outcome: 'meets', ...proved }],
    }),
  );
