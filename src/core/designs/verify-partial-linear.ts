import { type BlockDesign, blockOf } from './block-design.ts';
import { type DesignCertificate, verifyDesign } from './verify.ts';

/** Checks from the blocks alone that every point lies on lambda blocks of one size and that no two points share two
 *  blocks, as a geometry that is no 2-design claims. Memory: one mark a point; time: the pairs inside blocks. */
export function verifyPartialLinear(design: BlockDesign, lambda: number): DesignCertificate {
  const onPoints = verifyDesign(design, { t: 1, lambda });
  if (!onPoints.holds) return onPoints;
  const shared = twiceCoveredPair(design);
  const method = `every point counted; every pair of points on a common block counted, ${shared ? 'one' : 'none'} on two`;
  const pairs = design.b * ((onPoints.k * (onPoints.k - 1)) / 2);
  if (!shared) return { ...onPoints, method, subsetsCounted: design.v + pairs };
  return {
    ...onPoints,
    holds: false,
    method,
    reason: 'two points lie on two blocks',
    counterexample: { points: shared, covered: 2 },
  };
}

/** A pair of points on two blocks, found by visiting each point's neighbours once; null when there is none. */
function twiceCoveredPair(design: BlockDesign): [number, number] | null {
  const blocksOn = blocksOnPoints(design);
  const seenFrom = new Uint32Array(design.v);
  for (let point = 0; point < design.v; point++) {
    for (const block of blocksOn(point)) {
      for (const other of blockOf(design, block)) {
        if (other <= point) continue;
        if (seenFrom[other] === point + 1) return [point, other];
        seenFrom[other] = point + 1;
      }
    }
  }
  return null;
}

function blocksOnPoints({ v, b, blockStart, blockPoints }: BlockDesign): (point: number) => Uint32Array {
  const start = new Uint32Array(v + 1);
  for (const point of blockPoints) start[point + 1]!++;
  for (let point = 0; point < v; point++) start[point + 1]! += start[point]!;
  const next = start.slice(0, v);
  const blocks = new Uint32Array(blockPoints.length);
  for (let block = 0; block < b; block++) {
    for (let e = blockStart[block]!; e < blockStart[block + 1]!; e++) blocks[next[blockPoints[e]!]!++] = block;
  }
  return (point) => blocks.subarray(start[point], start[point + 1]);
}
