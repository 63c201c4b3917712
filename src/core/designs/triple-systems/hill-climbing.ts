import type { SeededRandom } from '../../algebra/seeded-random.ts';

/** A random triple system by Stinson's hill climbing: pick a point x and two points y, z not yet met with x; add
 *  {x, y, z}, taking out the triple that already holds y and z, if any. The number of triples never falls. Ends with
 *  every pair outside the leave covered; that it ends is not proved, but no failure is known, and the steps taken
 *  grow about as v² log v. The distribution over all systems is not uniform.
 *  Source: D. R. Stinson, Ars Combin. 19 (1985) 105–116.
 *  @param leave pairs [x, y] that no triple may cover; what remains must be decomposable into triples by degree.
 *  @param maxSteps budget; @returns null when it is spent. */
export function climbTriples(
  v: number,
  random: SeededRandom,
  leave: readonly (readonly [number, number])[] = [],
  maxSteps = 200 * v * v,
): Uint32Array | null {
  const state = startState(v, leave);
  const { third, open, openCount, live } = state;
  let uncovered = 0;
  for (let p = 0; p < v; p++) uncovered += openCount[p]!;
  for (let step = 0; uncovered > 0; step++) {
    if (step >= maxSteps) return null;
    const x = live.points[random.below(live.count)]!;
    const count = openCount[x]!;
    const i = random.below(count);
    let j = random.below(count - 1);
    if (j >= i) j++;
    const y = open[x * v + i]!;
    const z = open[x * v + j]!;
    const w = third[y * v + z]!;
    if (w === LEFT_OUT) continue;
    if (w !== NONE) removeTriple(state, w, y, z);
    else uncovered -= 6;
    insertTriple(state, x, y, z);
  }
  return collectTriples(v, third);
}

const NONE = 0xffff;
const LEFT_OUT = 0xfffe;

interface ClimbState {
  v: number;
  /** third[x·v + y] = the point completing the pair to a triple, NONE or LEFT_OUT. */
  third: Uint16Array;
  /** Row x: the points still to be met, in its first openCount[x] places; place[x·v + y] says where y stands. */
  open: Uint16Array;
  place: Uint16Array;
  openCount: Uint16Array;
  /** Points with something still to be met. */
  live: { points: Uint16Array; place: Int32Array; count: number };
}

function startState(v: number, leave: readonly (readonly [number, number])[]): ClimbState {
  const third = new Uint16Array(v * v).fill(NONE);
  for (const [x, y] of leave) third[x * v + y] = third[y * v + x] = LEFT_OUT;
  const open = new Uint16Array(v * v);
  const place = new Uint16Array(v * v);
  const openCount = new Uint16Array(v);
  const live = { points: new Uint16Array(v), place: new Int32Array(v).fill(-1), count: 0 };
  const state = { v, third, open, place, openCount, live };
  for (let x = 0; x < v; x++) {
    for (let y = 0; y < v; y++) if (y !== x && third[x * v + y] !== LEFT_OUT) reopen(state, x, y);
  }
  return state;
}

function insertTriple(state: ClimbState, x: number, y: number, z: number): void {
  const { v, third } = state;
  third[x * v + y] = third[y * v + x] = z;
  third[x * v + z] = third[z * v + x] = y;
  third[y * v + z] = third[z * v + y] = x;
  close(state, x, y);
  close(state, y, x);
  close(state, x, z);
  close(state, z, x);
  close(state, y, z);
  close(state, z, y);
}

function removeTriple(state: ClimbState, x: number, y: number, z: number): void {
  const { v, third } = state;
  third[x * v + y] = third[y * v + x] = NONE;
  third[x * v + z] = third[z * v + x] = NONE;
  third[y * v + z] = third[z * v + y] = NONE;
  reopen(state, x, y);
  reopen(state, y, x);
  reopen(state, x, z);
  reopen(state, z, x);
  reopen(state, y, z);
  reopen(state, z, y);
}

/** y has been met by x. */
function close({ v, open, place, openCount, live }: ClimbState, x: number, y: number): void {
  const last = --openCount[x]!;
  const at = place[x * v + y]!;
  const moved = open[x * v + last]!;
  open[x * v + at] = moved;
  place[x * v + moved] = at;
  if (last === 0) {
    const end = live.points[--live.count]!;
    live.points[live.place[x]!] = end;
    live.place[end] = live.place[x]!;
    live.place[x] = -1;
  }
}

/** y is to be met by x again. */
function reopen({ v, open, place, openCount, live }: ClimbState, x: number, y: number): void {
  const at = openCount[x]!++;
  open[x * v + at] = y;
  place[x * v + y] = at;
  if (at === 0) {
    live.place[x] = live.count;
    live.points[live.count++] = x;
  }
}

function collectTriples(v: number, third: Uint16Array): Uint32Array {
  const triples: number[] = [];
  for (let x = 0; x < v; x++) {
    for (let y = x + 1; y < v; y++) {
      const z = third[x * v + y]!;
      if (z > y && z < LEFT_OUT) triples.push(x, y, z);
    }
  }
  return Uint32Array.from(triples);
}
