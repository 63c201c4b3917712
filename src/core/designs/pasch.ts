import { ParamError } from '../errors.ts';
import type { BlockDesign } from './block-design.ts';

/** third[x·v + y]: the point that completes x and y to a triple; v where the pair lies in none.
 *  @throws ParamError unless blocks are triples and no two share a pair. */
export function completionTable(design: BlockDesign): Uint16Array {
  const { v, b, blockStart, blockPoints } = design;
  if (v > 0xfffe) throw new ParamError('design', v, 'at most 65534 points');
  const third = new Uint16Array(v * v).fill(v);
  for (let i = 0; i < b; i++) {
    const e = blockStart[i]!;
    if (blockStart[i + 1]! - e !== 3) throw new ParamError('design', blockStart[i + 1]! - e, 'blocks of three points');
    const [x, y, z] = [blockPoints[e]!, blockPoints[e + 1]!, blockPoints[e + 2]!];
    for (const [p, q, s] of [
      [x, y, z],
      [x, z, y],
      [y, z, x],
    ] as const) {
      if (third[p * v + q] !== v)
        throw new ParamError('design', `pair ${p}, ${q} twice`, 'triples of which no two share a pair');
      third[p * v + q] = third[q * v + p] = s;
    }
  }
  return third;
}

/** Number of Pasch configurations: four triples {a,b,c}, {a,y,z}, {x,b,z}, {x,y,c} on six points. They are the
 *  words of weight 4 of the code whose bits are the triples. Works on partial systems too.
 *  For every pair of triples {a,b,c}, {a,y,z} on a point a, the Pasches holding both are those with the third points
 *  of b,y and c,z, or of b,z and c,y, equal; each Pasch has six such pairs. `onProgress` is told the share done, a
 *  hundred times at most. */
export function countPasches(design: BlockDesign, onProgress?: (share: number) => void): number {
  const { v } = design;
  const third = completionTable(design);
  let found = 0;
  const stride = Math.ceil(v / 100);
  for (let a = 0; a < v; a++) {
    if (a % stride === 0) onProgress?.(a / v);
    const row = a * v;
    for (let b = 0; b < v; b++) {
      const c = third[row + b]!;
      if (b === a || c === v || c < b) continue;
      for (let y = b + 1; y < v; y++) {
        const z = third[row + y]!;
        if (y === c || z === v || z < y) continue;
        const by = third[b * v + y]!;
        if (by !== v && by === third[c * v + z]) found++;
        const bz = third[b * v + z]!;
        if (bz !== v && bz === third[c * v + y]) found++;
      }
    }
  }
  return found / 6;
}
