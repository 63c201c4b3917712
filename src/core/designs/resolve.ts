import { type SeededRandom, seededRandom } from '../algebra/seeded-random.ts';
import { type BlockDesign, blockOf } from './block-design.ts';
import { searchExactCover } from './exact-cover.ts';

export interface ResolutionOptions {
  /** Text that fixes the order of trials. */
  seed?: string;
  /** Search nodes, over all parts of the search. */
  limit?: number;
}

export interface ResolutionOutcome {
  /** Class of each block, or null. */
  classes: Uint32Array | null;
  /** `given`: the construction's own classes, checked. `found`: by search. `none`: proved that there is none.
   *  `limit`: the budget was spent, which proves nothing. */
  reason: 'given' | 'found' | 'none' | 'limit';
  nodes: number;
  /** Why there is none, or what was spent. */
  detail: string;
}

export const DEFAULT_RESOLUTION_NODES = 2_000_000;

/** Most parallel classes kept when all of them are listed. */
const MAX_LISTED_CLASSES = 50_000;

/** A partition of the blocks into parallel classes, each a partition of the points; null when none exists or the limit
 *  was reached. searchResolution says which. */
export function findResolution(design: BlockDesign, options: ResolutionOptions = {}): Uint32Array | null {
  return searchResolution(design, options).classes;
}

/** First the classes a construction gave; then, where all parallel classes can be listed in a quarter of the budget,
 *  an exact cover of the blocks by them, which decides; else a search class by class with restarts. */
export function searchResolution(design: BlockDesign, options: ResolutionOptions = {}): ResolutionOutcome {
  const { seed = '1', limit = DEFAULT_RESOLUTION_NODES } = options;
  if (design.classes && isResolution(design, design.classes)) {
    return { classes: design.classes, reason: 'given', nodes: 0, detail: 'the construction gives it; checked' };
  }
  const obstacle = whyNone(design);
  if (obstacle) return { classes: null, reason: 'none', nodes: 0, detail: obstacle };
  const listed = listParallelClasses(design, { maxClasses: MAX_LISTED_CLASSES, maxNodes: Math.ceil(limit / 4) });
  if (listed.complete) return coverByClasses(design, listed.classes, listed.nodes, seed, limit);
  return climbByRestarts(design, seededRandom(seed), listed.nodes, limit);
}

/** Whether classes partition the blocks so that each partitions the points. */
export function isResolution(design: BlockDesign, classes: ArrayLike<number>): boolean {
  const { v, b, blockPoints } = design;
  if (classes.length !== b) return false;
  const placeOf = new Map<number, number>();
  for (let i = 0; i < b; i++) if (!placeOf.has(classes[i]!)) placeOf.set(classes[i]!, placeOf.size);
  if (blockPoints.length !== placeOf.size * v) return false;
  const met = new Uint8Array(blockPoints.length);
  for (let i = 0; i < b; i++) {
    const place = placeOf.get(classes[i]!)! * v;
    for (const p of blockOf(design, i)) if (met[place + p]!++ > 0) return false;
  }
  return true;
}

function whyNone(design: BlockDesign): string | undefined {
  const { v, b } = design;
  const sizes = new Set(Array.from({ length: b }, (_, i) => blockOf(design, i).length));
  if (sizes.size !== 1) return undefined;
  const k = [...sizes][0]!;
  if (v % k !== 0) return `blocks of ${k} points cannot partition ${v} points`;
  const on = new Uint32Array(v);
  for (const p of design.blockPoints) on[p]!++;
  return on.some((r) => r !== on[0]) ? 'points lie on different numbers of blocks' : undefined;
}

export interface ParallelClasses {
  /** Blocks of each parallel class, ascending. */
  classes: number[][];
  /** False when a limit ended the listing. */
  complete: boolean;
  nodes: number;
}

/** All sets of blocks that partition the points: an exact cover of points by blocks. */
export function listParallelClasses(
  design: BlockDesign,
  limits: { maxClasses: number; maxNodes: number },
): ParallelClasses {
  const classes: number[][] = [];
  const rows = Array.from({ length: design.b }, (_, i) => blockOf(design, i));
  const { reason, nodes } = searchExactCover(design.v, rows, {
    maxNodes: limits.maxNodes,
    onSolution(chosen) {
      classes.push([...chosen].sort((a, b) => a - b));
      return classes.length > limits.maxClasses;
    },
  });
  return { classes, complete: reason === 'exhausted', nodes };
}

/** Number of resolutions into the listed classes, or undefined when the limit is reached. */
export function countResolutions(b: number, classes: readonly number[][], maxNodes: number): number | undefined {
  let count = 0;
  const { reason } = searchExactCover(b, classes, {
    maxNodes,
    onSolution() {
      count++;
      return false;
    },
  });
  return reason === 'exhausted' ? count : undefined;
}

function coverByClasses(
  design: BlockDesign,
  classes: readonly number[][],
  spent: number,
  seed: string,
  limit: number,
): ResolutionOutcome {
  const order = seededRandom(seed).shuffle(Uint32Array.from({ length: classes.length }, (_, i) => i));
  const rows = Array.from(order, (i) => classes[i]!);
  let found: Uint32Array | null = null;
  const { reason, nodes } = searchExactCover(design.b, rows, {
    maxNodes: limit - spent,
    onSolution(chosen) {
      const result = new Uint32Array(design.b);
      chosen.forEach((r, c) => {
        for (const i of rows[r]!) result[i] = c;
      });
      found = result;
      return true;
    },
  });
  const total = spent + nodes;
  if (found)
    return { classes: found, reason: 'found', nodes: total, detail: `from ${classes.length} parallel classes` };
  return reason === 'exhausted'
    ? { classes: null, reason: 'none', nodes: total, detail: `no choice among all ${classes.length} parallel classes` }
    : { classes: null, reason: 'limit', nodes: total, detail: `${total} nodes spent of ${limit}` };
}

/** Takes parallel classes one by one, each through the first block left, in random order; a dead end starts over. */
function climbByRestarts(design: BlockDesign, random: SeededRandom, spent: number, limit: number): ResolutionOutcome {
  let nodes = spent;
  while (nodes < limit) {
    const classes = new Uint32Array(design.b);
    let left = random.shuffle(Uint32Array.from({ length: design.b }, (_, i) => i));
    let made = 0;
    while (left.length > 0) {
      let chosenBlocks: number[] | null = null;
      const rows = Array.from(left, (i) => blockOf(design, i));
      const share = Math.min(limit - nodes, 50 * design.v);
      const outcome = searchExactCover(design.v, rows, {
        maxNodes: share,
        onSolution(chosen) {
          chosenBlocks = chosen.map((r) => left[r]!);
          return true;
        },
      });
      nodes += outcome.nodes;
      if (!chosenBlocks) break;
      for (const i of chosenBlocks as number[]) classes[i] = made;
      const taken = new Set<number>(chosenBlocks);
      left = left.filter((i) => !taken.has(i));
      made++;
    }
    nodes++;
    if (left.length === 0) return { classes, reason: 'found', nodes, detail: 'class by class' };
  }
  return { classes: null, reason: 'limit', nodes, detail: `${nodes} nodes spent of ${limit}` };
}
