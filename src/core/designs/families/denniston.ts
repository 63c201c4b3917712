import { z } from 'zod';
import { type GaloisField, galoisField, traceOf } from '../../algebra/galois-field.ts';
import { primePowerOf } from '../../algebra/integers.ts';
import { InfeasibleError, LimitError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { between, exactly, rankLowerBound } from '../partial-linear-prediction.ts';

const MAX_ORDER = 64;

/** Designs of maximal arcs: the qn − q + n points (x, y) of AG(2,q) at which an irreducible quadratic form takes values in
 *  an additive subgroup of order n; every line has 0 or n of them. The lines with n are the blocks of a resolvable
 *  S(2, n, qn − q + n), parallel lines being a class: the line at infinity misses the arc.
 *  Source: Denniston 1969. */
export const denniston = defineFamily({
  id: 'denniston',
  title: 'Maximal-arc design',
  params: [
    { name: 'q', label: 'plane order q', kind: 'integer', accepted: 'a power of two from 4 to 64', example: 16 },
    { name: 'n', label: 'degree n', kind: 'integer', accepted: 'a power of two from 2 to q/2', example: 4 },
  ],
  source: {
    authors: 'R. H. F. Denniston',
    year: 1969,
    title: 'Some maximal arcs in finite projective planes',
    where: 'J. Combin. Theory 6, 317–319',
  },
  schema: z.strictObject({ q: z.number().int().min(2).max(100_000), n: z.number().int().min(2) }),
  require: ({ q, n }) => requireArc(q, n),
  *enumerate({ maxPoints, maxBlocks }) {
    for (let q = 4; q <= MAX_ORDER; q *= 2) {
      for (let n = 2; n < q; n *= 2) {
        const { v, b } = arcCounts(q, n);
        if (v <= maxPoints && b <= maxBlocks) yield { q, n };
      }
    }
  },
  predict: ({ q, n }) => predictArc(q, n),
  build: ({ q, n }) => buildArc(q, n),
});

function requireArc(q: number, n: number): void {
  if (primePowerOf(q) && q % 2 === 1 && n < q) {
    throw new InfeasibleError(
      'no-maximal-arc-of-odd-order',
      `PG(2,${q}) has no maximal arc of degree ${n}: in Desarguesian planes of odd order there are none but the trivial ones.`,
      {
        authors: 'S. Ball, A. Blokhuis, F. Mazzocca',
        year: 1997,
        title: 'Maximal arcs in Desarguesian planes of odd order do not exist',
        where: 'Combinatorica 17, 31–41',
      },
      'q',
    );
  }
  if (primePowerOf(q)?.p !== 2 || q < 4) throw new ParamError('q', q, `a power of two from 4 to ${MAX_ORDER}`);
  if (q > MAX_ORDER) throw new LimitError('the order of a plane with a maximal arc', q, MAX_ORDER, 'as its order');
  if (primePowerOf(n)?.p !== 2 || n >= q) throw new ParamError('n', n, `a power of two from 2 to ${q / 2}`);
}

function arcCounts(q: number, n: number) {
  const v = q * n - q + n;
  return { v, b: (v * (q + 1)) / n, k: n, r: q + 1, lambda: 1 };
}

function predictArc(q: number, n: number): DesignPrediction {
  const counts = arcCounts(q, n);
  const codes = predictFlatCodes(counts, { rank: rankOfArc(q, n), structure: { blocks: 'none', points: 'none' } });
  return { t: 2, ...counts, resolvable: true, codes };
}

/** n = 2: the complete graph, rank v − 1. n = q/2: an oval design, since a regular hyperoval's dual is an arc of this
 *  kind; rank 3^s − 2^s. Between them the rank of the plane's own lines, 3^s + 1, bounds it. */
function rankOfArc(q: number, n: number): Graded<Enclosure> {
  const { v, b, k, r } = arcCounts(q, n);
  const s = primePowerOf(q)!.m;
  if (n === 2) return exactly(v - 1, 'proved', 'a connected graph');
  if (n === q / 2) {
    return exactly(3 ** s - 2 ** s, 'proved', 'oval design, 3^s − 2^s (Carpenter 1996)', {
      authors: 'L. L. Carpenter',
      year: 1996,
      title: 'Oval designs in Desarguesian projective planes',
      where: 'Des. Codes Cryptogr. 9, 51–59',
    });
  }
  const lower = Math.max(r, rankLowerBound(v, b, k, r, 6));
  return between(lower, Math.min(v - 1, 3 ** s + 1), 'sphere packing below; rank of PG(2,q) above');
}

function buildArc(q: number, n: number): BlockDesign {
  const field = galoisField(q);
  const { v, b, k } = arcCounts(q, n);
  const pointAt = arcPoints(field, n);
  const blocks = new BlockList(v, b, k);
  const classes = new Uint32Array(b);
  for (let slope = 0; slope <= q; slope++) {
    for (let c = 0; c < q; c++) {
      const points: number[] = [];
      for (let t = 0; t < q; t++) {
        const at = slope === q ? c * q + t : t * q + field.add(field.mul(slope, t), c);
        if (pointAt[at]! >= 0) points.push(pointAt[at]!);
      }
      if (points.length === 0) continue;
      classes[blocks.size] = slope;
      blocks.add(points);
    }
  }
  return blocks.finish({ classes, symmetry: [{ order: q + 1, pointPerm: normRotation(field, pointAt, v) }] });
}

/** Number of each arc point by x·q + y; −1 off the arc. The subgroup is that of the elements below n. */
function arcPoints(field: GaloisField, n: number): Int32Array {
  const { q } = field;
  const beta = irreducibleMiddle(field);
  const pointAt = new Int32Array(q * q).fill(-1);
  let point = 0;
  for (let x = 0; x < q; x++) {
    for (let y = 0; y < q; y++) if (form(field, beta, x, y) < n) pointAt[x * q + y] = point++;
  }
  return pointAt;
}

/** x² + βxy + y² */
function form(field: GaloisField, beta: number, x: number, y: number): number {
  return field.add(field.add(field.mul(x, x), field.mul(beta, field.mul(x, y))), field.mul(y, y));
}

/** The least β with t² + βt + 1 irreducible over GF(q): the trace of β⁻² is one. */
function irreducibleMiddle(field: GaloisField): number {
  let beta = 1;
  while (traceOf(field, field.pow(field.inv(beta), 2)) !== 1) beta++;
  return beta;
}

/** Multiplication by a root ω of t² + βt + 1 on the pairs x + yω: it has norm one, so it keeps the form, and its order
 *  divides q + 1. The least power of the field's norm-one group that generates it is found by trying pairs. */
function normRotation(field: GaloisField, pointAt: Int32Array, v: number): Uint32Array {
  const { q } = field;
  const beta = irreducibleMiddle(field);
  const times = (a: readonly [number, number], c: readonly [number, number]): [number, number] => {
    const high = field.mul(a[1], c[1]); // ω² = βω + 1
    return [
      field.add(field.mul(a[0], c[0]), high),
      field.add(field.add(field.mul(a[0], c[1]), field.mul(a[1], c[0])), field.mul(beta, high)),
    ];
  };
  const orderOf = (unit: readonly [number, number]) => {
    let order = 1;
    for (let power = times(unit, unit); !(power[0] === unit[0] && power[1] === unit[1]); order++)
      power = times(power, unit);
    return order;
  };
  const units = Array.from({ length: q * q }, (_, i) => [Math.floor(i / q), i % q] as const);
  const generator = units.find(([x, y]) => form(field, beta, x, y) === 1 && orderOf([x, y]) === q + 1)!;
  const pointPerm = new Uint32Array(v);
  units.forEach(([x, y], i) => {
    if (pointAt[i]! < 0) return;
    const [u, w] = times(generator, [x, y]);
    pointPerm[pointAt[i]!] = pointAt[u * q + w]!;
  });
  return pointPerm;
}
