import { type BlockDesign, blockOf } from '../../src/core/designs/block-design.ts';
import { subsets } from './subset-coverage.ts';

/** Four triples on six points, every point on two of them: by trying every four triples. */
export function plainPasches(design: BlockDesign): number {
  const triples = Array.from({ length: design.b }, (_, i) => [...blockOf(design, i)]);
  return subsets(triples, 4).filter((four) => new Set(four.flat()).size === 6).length;
}

/** Permutations of the points that keep the set of blocks, all v! tried. */
export function plainAutomorphisms(design: BlockDesign): number {
  const blocks = Array.from({ length: design.b }, (_, i) => [...blockOf(design, i)]);
  const names = new Set(blocks.map((block) => block.join()));
  const keeps = (perm: number[]) =>
    blocks.every((block) =>
      names.has(
        block
          .map((p) => perm[p]!)
          .sort((a, b) => a - b)
          .join(),
      ),
    );
  return permutations(Array.from({ length: design.v }, (_, p) => p)).filter(keeps).length;
}

/** Exact covers by trying every set of rows. */
export function plainExactCovers(columns: number, rows: readonly number[][]): number {
  let count = 0;
  for (let mask = 0; mask < 2 ** rows.length; mask++) {
    const covered = rows.filter((_, i) => (mask >> i) & 1).flat();
    if (covered.length === columns && new Set(covered).size === columns) count++;
  }
  return count;
}

function permutations(list: number[]): number[][] {
  if (list.length <= 1) return [list];
  return list.flatMap((x, i) => permutations([...list.slice(0, i), ...list.slice(i + 1)]).map((rest) => [x, ...rest]));
}
