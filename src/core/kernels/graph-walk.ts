/** Emits the loops that take a kernel over the rows or the columns of a matrix. The body is written once, against a
 *  `Site`; whether its neighbours come from constant offsets, a table, or a loop is settled here. */

import { rowOf, type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';
import {
  base,
  countLoop,
  type Expr,
  type FunctionBuilder,
  i32,
  type Local,
  type Statement,
  sequence,
  whileLoop,
} from './assembler/index.ts';
import type { GraphPlan, WeightClass } from './graph-plan.ts';
import { type MemoryLayout, vectorBytes } from './memory-layout.ts';

/** A vector within an array of vectors: add the array's place to `offset`. */
export interface Place {
  address: Expr<'i32'>;
  offset: number;
}

export interface Site {
  /** The row's or column's own vector in an array of one vector each. */
  own: Place;
  /** Its weight; null when known at run time only. */
  weight: number | null;
  degree: Expr<'i32'>;
  /** The kernel's constants for the column: numbers, or read from the table in the mixed rest. */
  setting(k: number): number | Expr<'i32'>;
  /** Runs the body for each neighbour, as repeated code or as a loop. `edge` is the place in an array of one vector an
   *  edge, in the order of this side; `slot` the same within the site, from 0. */
  eachNeighbour(body: (neighbour: Place, edge: Place, slot: Place) => Statement[]): Statement;
  /** The same from the last to the first. */
  eachNeighbourBackwards(body: (neighbour: Place, edge: Place, slot: Place) => Statement[]): Statement;
  /** Neighbours one by one, where the weight is known. */
  neighbours: readonly { neighbour: Place; edge: Place }[];
}

/** Tables of one side of the graph, placed in the kernel's memory. */
export interface SideTables {
  circulant: readonly number[] | null;
  /** Vectors of the array that neighbours are read from; such an array is kept twice over for a circulant. */
  count: number;
  /** +1 for rows (bit j + d), −1 for columns (check i − d). */
  direction: 1 | -1;
  classes: readonly WeightClass[];
  /** Where each class's table and edges start. */
  tables: readonly number[];
  edges: readonly number[];
  /** Constants a record of the mixed class holds after its weight. */
  settingCount: number;
  /** Writes the tables. */
  write(memory: ArrayBuffer): void;
}

const wordBytes = 4;

export const rowTables = (plan: GraphPlan, layout: MemoryLayout): SideTables =>
  sideTables(plan, layout, {
    direction: 1,
    count: plan.H.cols,
    classes: plan.rowClasses,
    order: plan.rowOrder,
    side: () => plan.H,
    placeOf: inverse(plan.columnOrder),
    settings: [],
  });

export const columnTables = (plan: GraphPlan, layout: MemoryLayout): SideTables =>
  sideTables(plan, layout, {
    direction: -1,
    count: plan.H.rows,
    classes: plan.columnClasses,
    order: plan.columnOrder,
    // Transposed only where tables are written: a circulant of 65,793 columns has none.
    side: () => transpose(plan.H),
    placeOf: inverse(plan.rowOrder),
    settings: plan.settings,
  });

/** Rows whose neighbours are not their bits but their edges, as the columns number them: for messages that both sides
 *  read. Made for one class of columns. */
export const rowEdgeTables = (plan: GraphPlan, layout: MemoryLayout): SideTables =>
  sideTables(plan, layout, {
    direction: 1,
    count: plan.H.colIndex.length,
    classes: plan.rowClasses,
    order: plan.rowOrder,
    side: () => ({ ...plan.H, cols: plan.H.colIndex.length, colIndex: edgesByColumns(plan.H) }),
    placeOf: Uint32Array.from({ length: plan.H.colIndex.length }, (_, e) => e),
    settings: [],
  });

/** The number of each edge, listed by rows, in the order by columns. */
function edgesByColumns(H: SparseMatrix): Uint32Array {
  const next = new Uint32Array(H.cols + 1);
  for (const j of H.colIndex) next[j + 1]!++;
  for (let j = 0; j < H.cols; j++) next[j + 1]! += next[j]!;
  return H.colIndex.map((j) => next[j]!++);
}

export function inverse(order: Uint32Array): Uint32Array {
  const places = new Uint32Array(order.length);
  order.forEach((i, place) => {
    places[i] = place;
  });
  return places;
}

interface Side extends Pick<SideTables, 'direction' | 'count' | 'classes'> {
  order: Uint32Array;
  side: () => GraphPlan['H'];
  placeOf: Uint32Array;
  settings: readonly Uint32Array[];
}

function sideTables(plan: GraphPlan, layout: MemoryLayout, s: Side): SideTables {
  const common = { direction: s.direction, count: s.count, classes: s.classes, settingCount: s.settings.length };
  if (plan.circulant) return { ...common, circulant: plan.circulant, tables: [], edges: [0], write: () => {} };
  const side = s.side();
  const edgesOf = (c: WeightClass) => {
    let sum = 0;
    for (let place = c.from; place < c.to; place++) sum += membersAt(side, s.order, place).length;
    return sum;
  };
  let total = 0;
  const edges = s.classes.map((c) => {
    const first = total;
    total += edgesOf(c);
    return first * vectorBytes;
  });
  const header = (c: WeightClass) => (c.weight === null ? 1 + s.settings.length : 0);
  const tables = s.classes.map((c) => layout.reserve(wordBytes * (edgesOf(c) + header(c) * (c.to - c.from))));
  const write = (memory: ArrayBuffer) => {
    const words = new Uint32Array(memory);
    s.classes.forEach((c, k) => {
      let at = tables[k]! / wordBytes;
      for (let place = c.from; place < c.to; place++) {
        const i = s.order[place]!;
        const members = membersAt(side, s.order, place);
        if (c.weight === null) {
          words[at++] = members.length;
          for (const list of s.settings) words[at++] = list[i]!;
        }
        for (const member of members) words[at++] = s.placeOf[member]! * vectorBytes;
      }
    });
  };
  return { ...common, circulant: null, tables, edges, write };
}

const membersAt = (side: SparseMatrix, order: Uint32Array, place: number) => rowOf(side, order[place]!);

/** The loops over all classes of one side. */
export function walk(f: FunctionBuilder, side: SideTables, body: (site: Site) => Statement[]): Statement {
  const at = f.local('i32');
  return sequence(
    ...side.classes.map((c, k) => {
      if (side.circulant) return circulantLoop(f, at, side, side.circulant, c, body);
      return c.weight === null ? mixedLoop(f, at, side, c, k, body) : tableLoop(f, at, side, c, k, c.weight, body);
    }),
  );
}

type Body = (site: Site) => Statement[];

function loopOver(at: Local<'i32'>, c: WeightClass, parts: Statement[]): Statement {
  return countLoop(at, { from: c.from * vectorBytes, to: c.to * vectorBytes, step: vectorBytes }, parts);
}

const slot = (t: number): Place => ({ address: base, offset: vectorBytes * t });

function unrolledSite(own: Local<'i32'>, weight: number, c: WeightClass, neighbours: Site['neighbours']): Site {
  return {
    own: { address: own, offset: 0 },
    weight,
    degree: i32.of(weight),
    setting: (k) => c.settings[k]!,
    neighbours,
    eachNeighbour: (body) =>
      sequence(...neighbours.flatMap(({ neighbour, edge }, t) => body(neighbour, edge, slot(t)))),
    eachNeighbourBackwards: (body) =>
      sequence(
        ...neighbours.flatMap((_, back) => {
          const t = neighbours.length - 1 - back;
          const { neighbour, edge } = neighbours[t]!;
          return body(neighbour, edge, slot(t));
        }),
      ),
  };
}

/** Neighbour t of i is i ± d_t; the array is there twice over, so that i + d and i + n − d need no wrap. */
function circulantLoop(
  f: FunctionBuilder,
  at: Local<'i32'>,
  side: SideTables,
  offsets: readonly number[],
  c: WeightClass,
  body: Body,
): Statement {
  const edge = f.local('i32');
  const step = vectorBytes * offsets.length;
  const neighbours = offsets.map((d, t) => ({
    neighbour: { address: at, offset: vectorBytes * (side.direction === 1 ? d : side.count - d) },
    edge: { address: edge, offset: vectorBytes * t },
  }));
  return sequence(
    edge.set(side.edges[0]!),
    loopOver(at, c, [...body(unrolledSite(at, offsets.length, c, neighbours)), edge.set(i32.add(edge, step))]),
  );
}

function tableLoop(
  f: FunctionBuilder,
  at: Local<'i32'>,
  side: SideTables,
  c: WeightClass,
  k: number,
  weight: number,
  body: Body,
): Statement {
  const entry = f.local('i32');
  const edge = f.local('i32');
  const neighbours = Array.from({ length: weight }, (_, t) => ({
    neighbour: { address: i32.load(entry, wordBytes * t), offset: 0 },
    edge: { address: edge, offset: vectorBytes * t },
  }));
  return sequence(
    entry.set(side.tables[k]!),
    edge.set(side.edges[k]!),
    loopOver(at, c, [
      ...body(unrolledSite(at, weight, c, neighbours)),
      entry.set(i32.add(entry, wordBytes * weight)),
      edge.set(i32.add(edge, vectorBytes * weight)),
    ]),
  );
}

/** Records of any weight: weight, constants, places. */
function mixedLoop(
  f: FunctionBuilder,
  at: Local<'i32'>,
  side: SideTables,
  c: WeightClass,
  k: number,
  body: Body,
): Statement {
  const entry = f.local('i32');
  const edge = f.local('i32');
  const weight = f.local('i32');
  const header = wordBytes * (1 + side.settingCount);
  const site: Site = {
    own: { address: at, offset: 0 },
    weight: null,
    degree: weight,
    setting: (s) => i32.load(entry, wordBytes * (1 + s)),
    neighbours: [],
    eachNeighbour: (inner) => {
      const [walker, last, vector] = [f.borrow('i32'), f.borrow('i32'), f.borrow('i32')];
      const code = sequence(
        walker.set(i32.add(entry, header)),
        last.set(i32.add(walker, i32.shl(weight, 2))),
        vector.set(edge),
        whileLoop(i32.ltU(walker, last), [
          ...inner(...placesAt(walker, vector)),
          walker.set(i32.add(walker, wordBytes)),
          vector.set(i32.add(vector, vectorBytes)),
        ]),
      );
      f.giveBack(walker, last, vector);
      return code;
    },
    eachNeighbourBackwards: (inner) => {
      const [walker, first, vector] = [f.borrow('i32'), f.borrow('i32'), f.borrow('i32')];
      const code = sequence(
        first.set(i32.add(entry, header)),
        walker.set(i32.add(first, i32.shl(weight, 2))),
        vector.set(i32.add(edge, i32.shl(weight, 4))),
        whileLoop(i32.gtU(walker, first), [
          walker.set(i32.sub(walker, wordBytes)),
          vector.set(i32.sub(vector, vectorBytes)),
          ...inner(...placesAt(walker, vector)),
        ]),
      );
      f.giveBack(walker, first, vector);
      return code;
    },
  };
  const placesAt = (walker: Local<'i32'>, vector: Local<'i32'>): [Place, Place, Place] => [
    { address: i32.load(walker), offset: 0 },
    { address: vector, offset: 0 },
    { address: i32.sub(vector, edge), offset: 0 },
  ];
  return sequence(
    entry.set(side.tables[k]!),
    edge.set(side.edges[k]!),
    loopOver(at, c, [
      weight.set(i32.load(entry)),
      ...body(site),
      entry.set(i32.add(entry, i32.add(header, i32.shl(weight, 2)))),
      edge.set(i32.add(edge, i32.shl(weight, 4))),
    ]),
  );
}
