import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign, Symmetry } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { linearRepresentation } from '../geometry/linear-representation.ts';
import { hermitianForm, hermitianSymmetry, symplecticForm, symplecticSymmetry } from '../geometry/polar-forms.ts';
import { forEachPolarLine, type PolarForm, type PolarPoints, polarPoints } from '../geometry/polar-lines.ts';
import { rankFromSpectrum } from '../geometry/spectral-rank.ts';
import { transposeDesign } from '../geometry/transpose-design.ts';
import { between, exactly, predictPartialLinearCodes } from '../partial-linear-prediction.ts';

const KINDS = ['W', 'Q4', 'H3', 'H4', 'T2star'] as const;
type Kind = (typeof KINDS)[number];
interface Params {
  kind: Kind;
  q: number;
}

/** Largest number of points or of lines; H(4,25) has 393,876 lines on 81,276 points. */
const MAX_POINTS = 100_000;

/** The classical generalised quadrangles and the linear representations of a regular hyperoval: a point off a line is
 *  joined to exactly one of its points, so the incidence graph has girth 8. Source: Payne and Thas 2009, chapter 3. */
export const generalisedQuadrangle = defineFamily({
  id: 'generalised-quadrangle',
  title: 'Generalised quadrangle',
  params: [
    {
      name: 'kind',
      label: 'kind',
      kind: 'choice',
      accepted: '"W" for W(q), "Q4" for Q(4,q), "H3" for H(3,q²), "H4" for H(4,q²), "T2star" for a hyperoval’s T₂*',
      choices: KINDS,
      example: 'W',
    },
    { name: 'q', label: 'order q', kind: 'integer', accepted: 'a prime power with at most 100,000 points', example: 4 },
  ],
  source: {
    authors: 'S. E. Payne, J. A. Thas',
    year: 2009,
    title: 'Finite Generalized Quadrangles',
    where: 'EMS, 2nd ed.',
    part: 'Chapter 3',
  },
  schema: z.strictObject({ kind: z.enum(KINDS), q: z.number().int().min(2).max(MAX_POINTS) }),
  require: requireQuadrangle,
  *enumerate({ maxPoints, maxBlocks }) {
    for (const kind of KINDS) {
      for (const q of primePowersUpTo(46)) {
        const { v, b } = quadrangleCounts({ kind, q });
        const exists = kind !== 'T2star' || (q % 2 === 0 && q >= 4);
        if (exists && v <= Math.min(maxPoints, MAX_POINTS) && b <= maxBlocks) yield { kind, q };
      }
    }
  },
  predict: predictQuadrangle,
  build: buildQuadrangle,
});

function requireQuadrangle({ kind, q }: Params): void {
  if (!primePowerOf(q)) throw new ParamError('q', q, 'a prime power');
  if (kind === 'T2star' && (q % 2 !== 0 || q < 4)) throw new ParamError('q', q, 'a power of two from 4 up for T2star');
  const { v } = quadrangleCounts({ kind, q });
  if (v > MAX_POINTS) throw new LimitError('a generalised quadrangle', v, MAX_POINTS, 'points');
}

/** Lines have s + 1 points, points lie on t + 1 lines. */
function orderOf({ kind, q }: Params): { s: number; t: number } {
  if (kind === 'H3') return { s: q * q, t: q };
  if (kind === 'H4') return { s: q * q, t: q ** 3 };
  if (kind === 'T2star') return { s: q - 1, t: q + 1 };
  return { s: q, t: q };
}

function quadrangleCounts(params: Params) {
  const { s, t } = orderOf(params);
  return { v: (s + 1) * (s * t + 1), b: (t + 1) * (s * t + 1), k: s + 1, r: t + 1 };
}

function predictQuadrangle(params: Params): DesignPrediction {
  const counts = quadrangleCounts(params);
  const codes = predictPartialLinearCodes(counts, { girth: 8, rank: rankOfQuadrangle(params) });
  const resolvable = params.kind === 'T2star' ? true : undefined;
  return { t: 1, ...counts, lambda: counts.r, partialLinear: true, resolvable, codes };
}

/** W(q) and its dual Q(4,q): Sastry and Sin for even q, Bagchi, Brouwer and Wilbrink for odd q. Elsewhere the spectrum of
 *  the quadrangle encloses the rank. Lines that meet one line are independent, since without triangles each has points of
 *  its own; so are, dually, the points on the lines of one point. */
function rankOfQuadrangle(params: Params): Graded<Enclosure> {
  const { kind, q } = params;
  if (kind === 'W' || kind === 'Q4') return rankOfSymplectic(q);
  const { s, t } = orderOf(params);
  const spectral = rankFromSpectrum([
    { value: (s + 1) * (t + 1), multiplicity: 1 },
    { value: s + t, multiplicity: (s * t * (s + 1) * (t + 1)) / (s + t) },
  ]);
  const lower = Math.max(spectral.lower, 1 + (s + 1) * t, 1 + (t + 1) * s);
  return between(lower, spectral.upper, 'invariant factors, or lines that meet one line, below; rational rank above');
}

/** Rank over GF(2) of the points against the lines of W(q). */
export function rankOfSymplectic(q: number): Graded<Enclosure> {
  const { p, m } = primePowerOf(q)!;
  if (p !== 2) {
    return exactly(
      (q ** 3 + 2 * q * q + q + 2) / 2,
      'proved',
      '(q³ + 2q² + q + 2)/2 (Bagchi, Brouwer, Wilbrink 1991)',
      {
        authors: 'B. Bagchi, A. E. Brouwer, H. A. Wilbrink',
        year: 1991,
        title: 'Notes on binary codes related to the O(5,q) generalized quadrangle for odd q',
        where: 'Geom. Dedicata 39, 339–355',
      },
    );
  }
  // Powers sums of the roots of x² = x + 4, (1 ± √17)/2: integers by their recurrence.
  let [last, next] = [2, 1];
  for (let i = 0; i < 2 * m; i++) [last, next] = [next, next + 4 * last];
  return exactly(1 + last, 'proved', '1 + ((1+√17)/2)^(2s) + ((1−√17)/2)^(2s) (Sastry and Sin 1998)', {
    authors: 'N. S. N. Sastry, P. Sin',
    year: 1998,
    title: 'The code of a regular generalized quadrangle of even order',
    where: 'Proc. Symp. Pure Math. 63, 485–496',
  });
}

function buildQuadrangle({ kind, q }: Params): BlockDesign {
  if (kind === 'T2star') return linearRepresentation(q);
  const counts = quadrangleCounts({ kind, q });
  if (kind === 'H3') return polarDesign(hermitianForm(q, 4), counts, hermitianSymmetry);
  if (kind === 'H4') return polarDesign(hermitianForm(q, 5), counts, hermitianSymmetry);
  const symplectic = polarDesign(symplecticForm(q), counts, symplecticSymmetry);
  // Q(4,q) is the dual of W(q): Payne and Thas, 3.2.1.
  return kind === 'W' ? symplectic : transposeDesign(symplectic);
}

function polarDesign(
  form: PolarForm,
  { v, b, k }: { v: number; b: number; k: number },
  symmetryOf: (form: PolarForm, points: PolarPoints) => Symmetry[],
): BlockDesign {
  const points = polarPoints(form);
  if (points.vectors.length !== v) throw new Error(`${v} points expected, ${points.vectors.length} found`);
  const blocks = new BlockList(v, b, k);
  forEachPolarLine(form, points, (line) => blocks.add(line));
  return blocks.finish({ symmetry: symmetryOf(form, points).filter(({ order }) => order > 1) });
}
