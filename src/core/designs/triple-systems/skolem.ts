/** Skolem's triple system on v = 6n + 1 points: Z_2n × Z_3 and one more point ∞ (numbered v − 1), the point (x, j)
 *  numbered x + j·2n, built on the half-idempotent commutative quasigroup of even order 2n that sends x + y to its
 *  half when even and to n + its half, rounded down, when odd.
 *  Source: Th. Skolem, Math. Scand. 6 (1958) 273–280. Returns the triples one after the other. */
export function skolemTriples(v: number): Uint32Array {
  const n = (v - 1) / 6;
  const m = 2 * n;
  const triples = new Uint32Array((v * (v - 1)) / 2);
  let e = 0;
  const add = (a: number, b: number, c: number) => {
    triples[e++] = a;
    triples[e++] = b;
    triples[e++] = c;
  };
  for (let x = 0; x < n; x++) add(x, x + m, x + 2 * m);
  for (let j = 0; j < 3; j++) {
    const next = ((j + 1) % 3) * m;
    for (let x = 0; x < n; x++) add(v - 1, n + x + j * m, x + next);
    for (let x = 0; x < m; x++) {
      for (let y = x + 1; y < m; y++) {
        const sum = (x + y) % m;
        add(x + j * m, y + j * m, (sum % 2 === 0 ? sum / 2 : n + (sum - 1) / 2) + next);
      }
    }
  }
  return triples;
}
