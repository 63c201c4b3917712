import { extend, type Front, frontsFrom, type TannerSides } from './walks.ts';

/** For each column, the number of closed walks of length 2h through it that nowhere turn back, counted once for both
 *  directions, for h up to half: pairs of walks that meet after h steps with different first and different last edges.
 *  Costs one sweep of the graph for each edge at the column. */
export function closedWalkCounter(sides: TannerSides, half: number): (column: number) => Float64Array {
  const { columns, rows, edgeCount } = sides;
  const current = frontsFrom(columns, rows, edgeCount, half);
  const earlier = frontsFrom(columns, rows, edgeCount, half);
  return (column) => {
    const pairs = new Float64Array(half + 1);
    for (let e = columns.start[column]!; e < columns.start[column + 1]!; e++) {
      current[1]!.add(columns.neighbour[e]!, columns.edge[e]!, 1);
      for (let h = 2; h <= half; h++) extend(current[h - 1]!, current[h]!);
      for (let h = 2; h <= half; h++) pairs[h]! += meet(current[h]!, earlier[h]!);
      for (const front of current) front.clear();
    }
    for (const front of earlier) front.clear();
    return pairs;
  };
}

/** Pairs of a walk of `front` and one of `earlier` that meet by different last edges; then adds the former to the latter. */
function meet(front: Front, earlier: Front): number {
  const { start, edge } = front.side;
  let pairs = 0;
  for (const node of front.nodes) {
    pairs += front.perNode[node]! * earlier.perNode[node]!;
    for (let e = start[node]!; e < start[node + 1]!; e++) {
      const walks = front.perEdge[edge[e]!]!;
      if (walks === 0) continue;
      pairs -= walks * earlier.perEdge[edge[e]!]!;
      earlier.add(node, edge[e]!, walks);
    }
  }
  return pairs;
}
