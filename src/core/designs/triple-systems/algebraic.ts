import { galoisField } from '../../algebra/galois-field.ts';

/** Lines of AG(m,3) on v = 3^m points: {x, y, −x − y} over GF(3)^m, the digits of a point's number in base 3.
 *  `classes` are the directions: lines parallel to one vector partition the points.
 *  Three points of one hyperplane section never form a Pasch: the system is 4-sparse. */
export function affineTriples(v: number): { triples: Uint32Array; classes: Uint32Array } {
  const directions: number[] = [];
  for (let d = 1; d < v; d++) if (d < negate3(d)) directions.push(d);
  const triples = new Uint32Array((v * (v - 1)) / 2);
  const classes = new Uint32Array((v * (v - 1)) / 6);
  let e = 0;
  directions.forEach((d, i) => {
    for (let x = 0; x < v; x++) {
      const y = add3(x, d);
      const z = add3(y, d);
      if (x > y || x > z) continue;
      classes[e / 3] = i;
      triples.set([x, y, z], e);
      e += 3;
    }
  });
  return { triples, classes };
}

/** Sum in GF(3)^m of two numbers read in base 3. */
function add3(x: number, y: number): number {
  let sum = 0;
  for (let place = 1, a = x, b = y; a > 0 || b > 0; place *= 3) {
    sum += (((a % 3) + (b % 3)) % 3) * place;
    a = Math.floor(a / 3);
    b = Math.floor(b / 3);
  }
  return sum;
}

function negate3(x: number): number {
  return add3(x, x);
}

/** Lines of PG(m,2) on v = 2^(m+1) − 1 points, the point i being the power i of a primitive element, so that
 *  x ↦ x + 1 (mod v) is a symmetry (Singer 1938). Base blocks {0, i, log(1 + α^i)} and their translates, orbit by
 *  orbit; the last orbit is short when 3 divides v. */
export function projectiveTriples(v: number): Uint32Array {
  const { exp, log } = galoisField(v + 1);
  const seen = new Uint8Array(v);
  const triples = new Uint32Array((v * (v - 1)) / 2);
  let e = 0;
  const orbits: [number, number][] = [];
  for (let i = 1; i < v; i++) {
    if (seen[i]) continue;
    const j = log[exp[i]! ^ 1]!;
    for (const d of [i, j, j - i]) seen[(d + v) % v] = seen[(v - d) % v] = 1;
    orbits.push([i, j]);
  }
  const isShort = ([i, j]: [number, number]) => v % 3 === 0 && i % (v / 3) === 0 && j % (v / 3) === 0;
  orbits.sort((x, y) => Number(isShort(x)) - Number(isShort(y)));
  for (const [i, j] of orbits) {
    const length = isShort([i, j]) ? v / 3 : v;
    for (let s = 0; s < length; s++) {
      triples[e++] = s;
      triples[e++] = (i + s) % v;
      triples[e++] = (j + s) % v;
    }
  }
  return triples;
}

/** Netto's system over GF(q), q ≡ 7 (mod 12): with ε a primitive sixth root of unity, the pair (a, b) whose
 *  difference b − a is a square (exactly one order of each pair, as −1 is no square) has the third point a + (b − a)ε.
 *  Base blocks {0, s, sε}, s a square up to the cube roots of unity, and their translates by the field, in the order
 *  of the numbers of its elements: cyclic when q is prime.
 *  Source: E. Netto, Math. Ann. 42 (1893) 143–152. */
export function nettoTriples(q: number): Uint32Array {
  const { exp, add } = galoisField(q);
  const triples = new Uint32Array((q * (q - 1)) / 2);
  let e = 0;
  for (let i = 0; i < (q - 1) / 6; i++) {
    // Squares are the even powers; multiplying by ε² = α^((q−1)/3) gives the same block again.
    const s = exp[2 * i]!;
    const third = exp[2 * i + (q - 1) / 6]!;
    for (let x = 0; x < q; x++) {
      triples[e++] = x;
      triples[e++] = add(x, s);
      triples[e++] = add(x, third);
    }
  }
  return triples;
}
