import type { Code } from '@/api/codes.ts';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';

type Sized = Pick<Code, 'n' | 'k' | 'rows' | 'rowWeights'> & { kind: Code['derivation']['kind'] };

/** "(273, 191)" of a parity-check code, "(13, weight 4, 13 words)" of a constant-weight one. */
export function sizeText({ n, k, rows, rowWeights, kind }: Sized): string {
  if (kind !== 'constant-weight') return `(${wholeNumber(n)}, ${wholeNumber(k)})`;
  return `(${wholeNumber(n)}, weight ${wholeNumber(rowWeights[0]?.[0] ?? 0)}, ${counted(rows, 'word')})`;
}
