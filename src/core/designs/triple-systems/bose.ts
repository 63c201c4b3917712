/** Bose's triple system on v = 6n + 3 points: Z_m × Z_3 with m = 2n + 1, the point (x, j) numbered x + j·m, built on
 *  the idempotent commutative quasigroup x∘y = (x + y)/2 of odd order m.
 *  Source: R. C. Bose, Ann. Eugenics 9 (1939) 353–399. Returns the triples one after the other. */
export function boseTriples(v: number): Uint32Array {
  const m = v / 3;
  const half = (m + 1) / 2;
  const triples = new Uint32Array((v * (v - 1)) / 2);
  let e = 0;
  for (let x = 0; x < m; x++) {
    triples[e++] = x;
    triples[e++] = x + m;
    triples[e++] = x + 2 * m;
  }
  for (let j = 0; j < 3; j++) {
    const next = ((j + 1) % 3) * m;
    for (let x = 0; x < m; x++) {
      for (let y = x + 1; y < m; y++) {
        triples[e++] = x + j * m;
        triples[e++] = y + j * m;
        triples[e++] = (((x + y) * half) % m) + next;
      }
    }
  }
  return triples;
}
