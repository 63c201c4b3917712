import type { SeededRandom } from '@/core/algebra/seeded-random.ts';
import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';

/** Any size from 1 × 1 to `most` × `most`, rows of any weight, empty ones too. */
export function anyMatrix(random: SeededRandom, most: number): SparseMatrix {
  const cols = 1 + random.below(most);
  const columns = Uint32Array.from({ length: cols }, (_, c) => c);
  const rows = Array.from({ length: 1 + random.below(most) }, () => {
    const weight = random.below(1 + random.below(1 + Math.min(cols, 30)));
    return random.shuffle(columns).slice(0, weight);
  });
  return matrixFromRows(cols, rows);
}

/** Made of circulants of one size, zero blocks and blocks of several shifts among them. */
export function anyCirculants(random: SeededRandom): SparseMatrix {
  const z = 2 + random.below(30);
  const [high, wide] = [1 + random.below(4), 1 + random.below(6)];
  const table = Array.from({ length: high }, () =>
    Array.from({ length: wide }, () => [...new Set(Array.from({ length: random.below(4) }, () => random.below(z)))]),
  );
  const rows = table.flatMap((blocks) =>
    Array.from({ length: z }, (_, r) => blocks.flatMap((shifts, b) => shifts.map((s) => b * z + ((r + s) % z)))),
  );
  return matrixFromRows(z * wide, rows);
}
