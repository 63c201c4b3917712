import type { Citation } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';

const CHUNG_SALEHI_WEI: Citation = {
  authors: 'F. R. K. Chung, J. A. Salehi, V. K. Wei',
  year: 1989,
  title: 'Optical orthogonal codes: design, analysis, and applications',
  where: 'IEEE Trans. Inf. Theory 35, 595–604',
};

const BRICKELL_WEI: Citation = {
  authors: 'E. F. Brickell, V. K. Wei',
  year: 1987,
  title: 'Optical orthogonal codes and cyclic block designs',
  where: 'Congr. Numer. 58, 175–192',
};

/** Most words of an (n, w, λ) optical orthogonal code: the n shifts of its words are a constant-weight code of distance
 *  2(w − λ), so ⌊1/w ⌊(n−1)/(w−1) ⌊… ⌊(n−λ)/(w−λ)⌋⌋⌋⌋ by Johnson's recursion. For w = 3 and λ = 1 the bound is reached
 *  except at n = 6t + 2 with t ≡ 2 or 3 (mod 4), where one less is (Brickell and Wei 1987). */
export function upperBoundOn(n: number, w: number, lambda: number): Graded<number> {
  if (w <= lambda)
    return { value: Number.POSITIVE_INFINITY, grade: 'proved', method: 'every word meets every other in at most w' };
  let bound = 1;
  for (let i = lambda; i >= 1; i--) bound = Math.floor(((n - i) * bound) / (w - i));
  bound = Math.floor(bound / w);
  const t = (n - 2) / 6;
  if (w === 3 && lambda === 1 && Number.isInteger(t) && (t % 4 === 2 || t % 4 === 3))
    return {
      value: bound - 1,
      grade: 'proved',
      method: 'Brickell and Wei 1987: n = 6t + 2, t ≡ 2, 3 (mod 4)',
      source: BRICKELL_WEI,
    };
  return {
    value: bound,
    grade: 'proved',
    method: 'Johnson’s recursion on the shifts of the words',
    source: CHUNG_SALEHI_WEI,
  };
}
