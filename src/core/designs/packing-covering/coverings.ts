import type { SeededRandom } from '../../algebra/seeded-random.ts';
import { subsetOfRank } from '../subset-rank.ts';
import { SubsetCounter } from './subset-counter.ts';

const ascending = (a: number, b: number) => a - b;

/** Blocks that cover every t-subset: each starts at a t-subset not yet covered and grows by the point that opens most
 *  new t-subsets, ties by the seed; the best of `candidates` such blocks is taken. At the end blocks whose t-subsets
 *  are all covered again elsewhere are dropped. No bound is promised. */
export function greedyCovering(t: number, k: number, v: number, random: SeededRandom, candidates: number): number[][] {
  const counter = new SubsetCounter(v, t);
  const order = random.shuffle(Uint32Array.from({ length: counter.ranking.count }, (_, i) => i));
  const blocks: number[][] = [];
  for (const rank of order) {
    if (counter.counts[rank] !== 0) continue;
    const start = subsetOfRank(counter.ranking, rank);
    let best = { block: [] as number[], opened: -1 };
    for (let c = 0; c < candidates; c++) {
      const grown = growBlock(start, k, v, counter, random);
      if (grown.opened > best.opened) best = grown;
    }
    counter.change(best.block, 1);
    blocks.push(best.block);
  }
  return blocks.filter((block) => {
    if (counter.some(block, (count) => count === 1)) return true;
    counter.change(block, -1);
    return false;
  });
}

function growBlock(start: readonly number[], k: number, v: number, counter: SubsetCounter, random: SeededRandom) {
  const block = [...start];
  let opened = 1;
  while (block.length < k) {
    let best: number[] = [];
    let most = -1;
    for (let x = 0; x < v; x++) {
      if (block.includes(x)) continue;
      const gain = counter.countWith(block, x, (count) => count === 0);
      if (gain > most) [best, most] = [[x], gain];
      else if (gain === most) best.push(x);
    }
    block.push(best[random.below(best.length)]!);
    opened += most;
  }
  return { block: block.sort(ascending), opened };
}
