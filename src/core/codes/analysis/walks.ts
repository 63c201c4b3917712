import { type SparseMatrix, transpose } from '../sparse-matrix.ts';

/** Neighbours of the nodes of one side of the Tanner graph, with the edge (a position in H.colIndex) that leads there. */
export interface Side {
  start: Uint32Array;
  neighbour: Uint32Array;
  edge: Uint32Array;
}

export interface TannerSides {
  columns: Side;
  rows: Side;
  edgeCount: number;
}

export function tannerSides(H: SparseMatrix): TannerSides {
  const T = transpose(H);
  const next = T.rowStart.slice(0, H.cols);
  const edge = new Uint32Array(H.colIndex.length);
  for (let e = 0; e < H.colIndex.length; e++) edge[next[H.colIndex[e]!]!++] = e;
  return {
    columns: { start: T.rowStart, neighbour: T.colIndex, edge },
    rows: { start: H.rowStart, neighbour: H.colIndex, edge: Uint32Array.from(edge, (_, e) => e) },
    edgeCount: H.colIndex.length,
  };
}

/** Walks of one length that end at nodes of one side: per node, and per last edge. */
export class Front {
  readonly perNode: Float64Array;
  readonly perEdge: Float64Array;
  readonly nodes: number[] = [];

  constructor(
    readonly side: Side,
    edgeCount: number,
  ) {
    this.perNode = new Float64Array(side.start.length - 1);
    this.perEdge = new Float64Array(edgeCount);
  }

  add(node: number, edge: number, walks: number): void {
    if (this.perNode[node] === 0) this.nodes.push(node);
    this.perNode[node]! += walks;
    this.perEdge[edge]! += walks;
  }

  clear(): void {
    const { start, edge } = this.side;
    for (const node of this.nodes) {
      this.perNode[node] = 0;
      for (let e = start[node]!; e < start[node + 1]!; e++) this.perEdge[edge[e]!] = 0;
    }
    this.nodes.length = 0;
  }
}

/** Fronts of walks of lengths 0 to half from a node of the given side; entry 0 is never filled. */
export function frontsFrom(side: Side, other: Side, edgeCount: number, half: number): Front[] {
  return Array.from({ length: half + 1 }, (_, h) => new Front(h % 2 === 1 ? other : side, edgeCount));
}

/** One more step along every edge but the one just used. */
export function extend(from: Front, to: Front): void {
  const { start, neighbour, edge } = from.side;
  for (const node of from.nodes) {
    const here = from.perNode[node]!;
    for (let e = start[node]!; e < start[node + 1]!; e++) {
      const onward = here - from.perEdge[edge[e]!]!;
      if (onward > 0) to.add(neighbour[e]!, edge[e]!, onward);
    }
  }
}
