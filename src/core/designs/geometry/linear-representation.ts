import { galoisField } from '../../algebra/galois-field.ts';
import type { BlockDesign } from '../block-design.ts';
import { BlockList } from './block-list.ts';

/** T₂*(O): the points of AG(3,q), q even, and the lines whose direction lies in the regular hyperoval
 *  {(1,t,t²)} ∪ {(0,1,0), (0,0,1)} at infinity; lines of one direction are a parallel class.
 *  Point (x, y, z) is x·q² + y·q + z. Source: Ahrens and Szekeres 1969; Hall 1971; Payne and Thas, 3.1.3. */
export function linearRepresentation(q: number): BlockDesign {
  const field = galoisField(q);
  const directions = [
    ...Array.from({ length: q }, (_, t) => [1, t, field.mul(t, t)] as const),
    [0, 1, 0] as const,
    [0, 0, 1] as const,
  ];
  const blocks = new BlockList(q ** 3, q * q * (q + 2), q);
  const classes = Uint32Array.from({ length: q * q * (q + 2) }, (_, i) => Math.floor(i / (q * q)));
  const line = new Uint32Array(q);
  for (const [dx, dy, dz] of directions) {
    // A line is met at its point whose coordinate vanishes where the direction leads with one.
    for (let i = 0; i < q * q; i++) {
      const [high, low] = [Math.floor(i / q), i % q];
      const [x, y, z] = dx === 1 ? [0, high, low] : dy === 1 ? [high, 0, low] : [high, low, 0];
      for (let s = 0; s < q; s++) {
        line[s] = (x ^ field.mul(s, dx)) * q * q + (y ^ field.mul(s, dy)) * q + (z ^ field.mul(s, dz));
      }
      blocks.add(line);
    }
  }
  const translation = (step: number) => Uint32Array.from({ length: q ** 3 }, (_, x) => x ^ step);
  return blocks.finish({
    classes,
    symmetry: [1, q, q * q].map((step) => ({ order: 2, pointPerm: translation(step) })),
  });
}
