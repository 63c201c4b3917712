import type { SeededRandom } from '../../algebra/seeded-random.ts';
import { quadrupleSystem, quadruplesAreBuilt } from '../quadruple-systems/quadruples.ts';
import { climbTriples } from '../triple-systems/hill-climbing.ts';
import { SubsetCounter } from './subset-counter.ts';

const ascending = (a: number, b: number) => a - b;

/** Most triples no two of which share a pair: hill climbing towards a prescribed leave, the pairs that an optimal
 *  packing leaves out. v ≡ 1, 3 (mod 6): none; 0, 2: a one-factor; 4: a one-factor with one star K(1,3); 5: a 4-cycle.
 *  Source: J. Schönheim, Rev. Unione Mat. Argent. 23 (1966); J. Spencer, J. Comb. Theory 5 (1968) 1–8. */
export function optimalTriples(v: number, random: SeededRandom): number[][] | null {
  const leave: [number, number][] = [];
  const pairsFrom = (first: number) => {
    for (let x = first; x + 1 < v; x += 2) leave.push([x, x + 1]);
  };
  if (v % 6 === 0 || v % 6 === 2) pairsFrom(0);
  if (v % 6 === 4) {
    leave.push([0, 1], [0, 2], [0, 3]);
    pairsFrom(4);
  }
  if (v % 6 === 5) leave.push([0, 1], [1, 2], [2, 3], [0, 3]);
  // On few points the climbing can stall in a state it cannot leave, so it starts over.
  for (let attempt = 0; attempt < 50; attempt++) {
    const triples = climbTriples(v, random, leave, 40 * v * v + 2000);
    if (triples) return Array.from({ length: triples.length / 3 }, (_, i) => [...triples.subarray(3 * i, 3 * i + 3)]);
  }
  return null;
}

/** Most quadruples no two of which share a triple, where a quadruple system gives it: v ≡ 2, 4 (mod 6) itself, and
 *  v ≡ 1, 3 (mod 6) the quadruples of the next order that miss its last point. */
export function optimalQuadruples(v: number): number[][] | null {
  if (!quadruplesGive(v)) return null;
  if (v % 2 === 0) return quadrupleSystem(v);
  return quadrupleSystem(v + 1)!.filter((block) => !block.includes(v));
}

export function quadruplesGive(v: number): boolean {
  const order = v % 2 === 0 ? v : v + 1;
  return v >= 7 && order % 6 !== 0 && quadruplesAreBuilt(order);
}

/** All k-subsets in lexicographic order of the shuffled points, each taken when it shares no t-subset with those before. */
export function greedyPacking(t: number, k: number, v: number, random: SeededRandom): number[][] {
  const name = random.shuffle(Uint32Array.from({ length: v }, (_, p) => p));
  const counter = new SubsetCounter(v, t);
  const blocks: number[][] = [];
  const grow = (block: number[], from: number): void => {
    if (block.length === k) {
      if (counter.some(block, (count) => count > 0)) return;
      counter.change(block, 1);
      blocks.push(block);
      return;
    }
    for (let x = from; x <= v - (k - block.length); x++) {
      if (block.length >= t - 1 && counter.meetsWith(block, x)) continue;
      grow([...block, x], x + 1);
      // A block just taken covers this prefix once it has t points, so nothing more can grow from it.
      if (block.length >= t && counter.some(block, (count) => count > 0)) return;
    }
  };
  grow([], 0);
  return blocks.map((block) => block.map((x) => name[x]!).sort(ascending));
}

/** Blocks grown at random from points that keep clear of what is covered, until `patience` tries in a row fail.
 *  In the spirit of V. Rödl, European J. Comb. 6 (1985) 69–78, whose nibble takes many blocks at a time. */
export function randomGreedyPacking(
  t: number,
  k: number,
  v: number,
  random: SeededRandom,
  patience: number,
): number[][] {
  const counter = new SubsetCounter(v, t);
  const blocks: number[][] = [];
  const order = Uint32Array.from({ length: v }, (_, p) => p);
  for (let failures = 0; failures < patience; ) {
    random.shuffle(order);
    const block: number[] = [];
    for (let i = 0; i < v && block.length < k; i++) {
      if (block.length < t - 1 || !counter.meetsWith(block, order[i]!)) block.push(order[i]!);
    }
    if (block.length < k) {
      failures++;
      continue;
    }
    failures = 0;
    block.sort(ascending);
    counter.change(block, 1);
    blocks.push(block);
  }
  return blocks;
}

/** Pairs only: a random block is forced in when at most one block stands in its way, which then goes; the number of
 *  blocks never falls. The idea of Stinson 1985 for any block size; nothing is promised beyond a packing. */
export function climbPairs(k: number, v: number, random: SeededRandom, steps: number): number[][] {
  const owner = new Int32Array(v * v).fill(-1);
  const blocks: (number[] | null)[] = [];
  const set = (block: readonly number[], value: number) => {
    for (const x of block) for (const y of block) if (x !== y) owner[x * v + y] = value;
  };
  const block: number[] = [];
  for (let step = 0; step < steps; step++) {
    block.length = 0;
    let obstacle = -1;
    for (let tries = 0; block.length < k && tries < 12 * k; tries++) {
      const x = random.below(v);
      const met = obstacleFor(block, x, owner, v, obstacle);
      if (met === CLASH) continue;
      block.push(x);
      obstacle = met;
    }
    if (block.length < k) continue;
    if (obstacle >= 0) {
      set(blocks[obstacle]!, -1);
      blocks[obstacle] = null;
    }
    const added = [...block].sort(ascending);
    set(added, blocks.length);
    blocks.push(added);
  }
  return blocks.filter((b) => b !== null);
}

const CLASH = -2;

/** The one block that x and the points would have to push out, −1 for none, CLASH for more than one. */
function obstacleFor(block: readonly number[], x: number, owner: Int32Array, v: number, known: number): number {
  let obstacle = known;
  for (const y of block) {
    const at = y === x ? CLASH : owner[y * v + x]!;
    if (at === CLASH || (at >= 0 && obstacle >= 0 && at !== obstacle)) return CLASH;
    if (at >= 0) obstacle = at;
  }
  return obstacle;
}
