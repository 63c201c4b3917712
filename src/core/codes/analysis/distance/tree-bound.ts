import type { Citation } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';

const tanner1981: Citation = {
  authors: 'R. M. Tanner',
  year: 1981,
  title: 'A recursive approach to low complexity codes',
  where: 'IEEE Trans. Inf. Theory 27, 533–547',
  part: 'Theorem 2',
};

const massey1963: Citation = {
  authors: 'J. L. Massey',
  year: 1963,
  title: 'Threshold Decoding',
  where: 'MIT Press',
  part: 'Theorem 1: J orthogonal checks on each bit give distance J + 1',
};

/** Lower bound on the distance from girth and least column weight: a non-zero word meets each check in an even number of
 *  places, so from one of its bits the Tanner graph's tree forces further bits up to the girth. */
export function treeBound(girth: number, leastColumnWeight: number): Graded<number> {
  const c = leastColumnWeight;
  if (c === 0) return { value: 1, grade: 'proved', method: 'a bit that no check meets is a codeword of weight 1' };
  if (girth === 4) return { value: 2, grade: 'proved', method: 'every bit is checked, so no word has weight 1' };
  if (girth === 6) {
    return { value: 1 + c, grade: 'proved', method: 'column weight + 1 (orthogonal checks)', source: massey1963 };
  }
  // A forest has cycles of no length; the bound for a large girth holds, and is cut at 2^31.
  const cap = 2 ** 31;
  const levels = Number.isFinite(girth) ? girth : 128;
  let bits = 1;
  let layer = c;
  const odd = (levels / 2) % 2 === 1;
  const full = odd ? (levels - 6) / 4 + 1 : (levels - 8) / 4 + 1;
  for (let i = 0; i < full; i++) {
    bits = Math.min(cap, bits + layer);
    layer = Math.min(cap, layer * (c - 1));
  }
  if (!odd) bits = Math.min(cap, bits + (c - 1) ** full);
  return { value: Math.min(cap, bits), grade: 'proved', method: `tree of girth ${girth}`, source: tanner1981 };
}
