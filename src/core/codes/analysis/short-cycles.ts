import { extend, type Front, frontsFrom, type Side, type TannerSides } from './walks.ts';

/** For nodes of one side: pairs of non-backtracking walks of length h that start there and meet by different last edges,
 *  for h up to half. Pairs may share their first edges; those of length girth/2 cannot. */
function meetings(side: Side, other: Side, edgeCount: number, half: number): (node: number) => Float64Array {
  const fronts = frontsFrom(side, other, edgeCount, half);
  return (node) => {
    const pairs = new Float64Array(half + 1);
    for (let e = side.start[node]!; e < side.start[node + 1]!; e++) {
      fronts[1]!.add(side.neighbour[e]!, side.edge[e]!, 1);
    }
    for (let h = 2; h <= half; h++) {
      extend(fronts[h - 1]!, fronts[h]!);
      pairs[h] = pairsMeeting(fronts[h]!);
    }
    for (const front of fronts) front.clear();
    return pairs;
  };
}

function pairsMeeting({ side, nodes, perNode, perEdge }: Front): number {
  let ordered = 0;
  for (const node of nodes) {
    ordered += perNode[node]! ** 2;
    for (let e = side.start[node]!; e < side.start[node + 1]!; e++) ordered -= perEdge[side.edge[e]!]! ** 2;
  }
  return ordered / 2;
}

/** Numbers of cycles of lengths g and g + 2 through a column, g the girth, each from one sweep of the graph.
 *  A cycle of length 2h through the column is a pair of walks of length h. For h = g/2 + 1 some pairs share their first
 *  edge; each such is a g-cycle through the row at its far end that avoids the edge. */
export function shortCycles(
  sides: TannerSides,
  girth: number,
  rowRepresentative: (row: number) => number,
): (column: number) => { girth: number; girthPlusTwo: number } {
  const half = girth / 2;
  const { columns, rows, edgeCount } = sides;
  const aroundColumn = meetings(columns, rows, edgeCount, half + 1);
  const aroundRow = meetings(rows, columns, edgeCount, half);
  const rowCycles = new Map<number, number>();
  const cyclesThroughRow = (row: number) => {
    const representative = rowRepresentative(row);
    let cycles = rowCycles.get(representative);
    if (cycles === undefined) {
      cycles = aroundRow(representative)[half]!;
      rowCycles.set(representative, cycles);
    }
    return cycles;
  };
  return (column) => {
    const pairs = aroundColumn(column);
    let sharing = -2 * pairs[half]!;
    for (let e = columns.start[column]!; e < columns.start[column + 1]!; e++) {
      sharing += cyclesThroughRow(columns.neighbour[e]!);
    }
    return { girth: pairs[half]!, girthPlusTwo: pairs[half + 1]! - sharing };
  };
}
