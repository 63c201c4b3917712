import {
  addPolynomials,
  degreeOf,
  dividePolynomials,
  type Gf2Polynomial,
  multiplyPolynomials,
  remainderOf,
} from '../algebra/gf2-polynomial.ts';

/** Dimension over GF(2) of the module that the rows span in (GF(2)[x]/modulus)^columns. Column by column Euclid's algorithm
 *  among the rows, and the modulus itself as one more row, leaves one row with a divisor h of the modulus there: it stands
 *  for deg modulus − deg h dimensions. The row in which the modulus was used up goes on with the others, since it holds
 *  what is left of the pivot's multiples (Howell 1986, Spans in the module (Z_m)^s). */
export function moduleRank(rows: readonly (readonly Gf2Polynomial[])[], modulus: Gf2Polynomial): number {
  const columns = rows[0]?.length ?? 0;
  const degree = degreeOf(modulus);
  let left = rows.map((row) => row.slice());
  let rank = 0;
  for (let c = 0; c < columns; c++) {
    const own: Gf2Polynomial[] = Array.from({ length: columns }, (_, j) => (j === c ? modulus : new Uint32Array(1)));
    const working = [...left.filter((row) => degreeOf(row[c]!) >= 0), own];
    const idle = left.filter((row) => degreeOf(row[c]!) < 0);
    const pivot = euclid(working, c, modulus);
    rank += degree - degreeOf(pivot[c]!);
    left = [...idle, ...working.filter((row) => row !== pivot)].filter((row) => row.some((f) => degreeOf(f) >= 0));
  }
  return rank;
}

/** Reduces the rows in place until one alone is other than zero in the column; returns it. */
function euclid(rows: Gf2Polynomial[][], column: number, modulus: Gf2Polynomial): Gf2Polynomial[] {
  for (;;) {
    const active = rows.filter((row) => degreeOf(row[column]!) >= 0);
    const least = active.reduce((best, row) => (degreeOf(row[column]!) < degreeOf(best[column]!) ? row : best));
    if (active.length === 1) return least;
    for (const row of active) {
      if (row === least) continue;
      const { quotient, remainder } = dividePolynomials(row[column]!, least[column]!);
      row[column] = remainder;
      for (let j = column + 1; j < row.length; j++) {
        if (degreeOf(least[j]!) < 0) continue;
        row[j] = addPolynomials(row[j]!, remainderOf(multiplyPolynomials(quotient, least[j]!), modulus));
      }
    }
  }
}
