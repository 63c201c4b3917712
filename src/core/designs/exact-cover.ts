/** Exact cover by dancing links: choose rows so that every column is covered once.
 *  Source: D. E. Knuth, "Dancing links", Millennial Perspectives in Computer Science (2000) 187–214. */
export interface ExactCoverSearch {
  /** Rows chosen, numbered as given, for every solution visited. Return true to stop. */
  onSolution(rows: readonly number[]): boolean;
  /** Rows tried at most; the search ends with 'limit' when they are spent. */
  maxNodes: number;
}

export interface ExactCoverOutcome {
  /** `stopped`: the visitor asked to stop. `exhausted`: every solution was visited. `limit`: the budget was spent. */
  reason: 'stopped' | 'exhausted' | 'limit';
  nodes: number;
}

/** @param rows columns of each row, 0..columns−1; the order of rows is the order of trials. */
export function searchExactCover(
  columns: number,
  rows: readonly ArrayLike<number>[],
  search: ExactCoverSearch,
): ExactCoverOutcome {
  const links = weave(columns, rows);
  const { left, right, up, down, columnOf, size, rowOf } = links;
  const chosen: number[] = [];
  let nodes = 0;

  const cover = (c: number) => {
    right[left[c]!] = right[c]!;
    left[right[c]!] = left[c]!;
    for (let i = down[c]!; i !== c; i = down[i]!) {
      for (let j = right[i]!; j !== i; j = right[j]!) {
        up[down[j]!] = up[j]!;
        down[up[j]!] = down[j]!;
        size[columnOf[j]!]!--;
      }
    }
  };
  const uncover = (c: number) => {
    for (let i = up[c]!; i !== c; i = up[i]!) {
      for (let j = left[i]!; j !== i; j = left[j]!) {
        size[columnOf[j]!]!++;
        up[down[j]!] = j;
        down[up[j]!] = j;
      }
    }
    right[left[c]!] = c;
    left[right[c]!] = c;
  };
  const smallest = () => {
    let best = right[0]!;
    for (let c = best; c !== 0; c = right[c]!) if (size[c]! < size[best]!) best = c;
    return best;
  };
  const descend = (): ExactCoverOutcome['reason'] => {
    if (right[0] === 0) return search.onSolution(chosen) ? 'stopped' : 'exhausted';
    const c = smallest();
    if (size[c] === 0) return 'exhausted';
    cover(c);
    let reason: ExactCoverOutcome['reason'] = 'exhausted';
    for (let i = down[c]!; i !== c && reason === 'exhausted'; i = down[i]!) {
      if (++nodes > search.maxNodes) {
        reason = 'limit';
        break;
      }
      chosen.push(rowOf[i]!);
      for (let j = right[i]!; j !== i; j = right[j]!) cover(columnOf[j]!);
      reason = descend();
      for (let j = left[i]!; j !== i; j = left[j]!) uncover(columnOf[j]!);
      chosen.pop();
    }
    uncover(c);
    return reason;
  };
  const reason = descend();
  return { reason, nodes: Math.min(nodes, search.maxNodes) };
}

/** Circular lists: node 0 is the root, 1..columns the headers, then one node an entry. */
function weave(columns: number, rows: readonly ArrayLike<number>[]) {
  let entries = 0;
  for (const row of rows) entries += row.length;
  const count = 1 + columns + entries;
  const [left, right, up, down] = [0, 0, 0, 0].map(() => new Int32Array(count)) as [
    Int32Array,
    Int32Array,
    Int32Array,
    Int32Array,
  ];
  const columnOf = new Int32Array(count);
  const rowOf = new Int32Array(count);
  const size = new Int32Array(columns + 1);
  for (let c = 0; c <= columns; c++) {
    up[c] = down[c] = c;
    left[c] = c === 0 ? columns : c - 1;
    right[c] = c === columns ? 0 : c + 1;
  }
  let node = columns + 1;
  rows.forEach((row, r) => {
    const first = node;
    for (let i = 0; i < row.length; i++, node++) {
      const c = row[i]! + 1;
      columnOf[node] = c;
      rowOf[node] = r;
      size[c]!++;
      up[node] = up[c]!;
      down[up[c]!] = node;
      down[node] = c;
      up[c] = node;
      left[node] = i === 0 ? first + row.length - 1 : node - 1;
      right[node] = i === row.length - 1 ? first : node + 1;
    }
  });
  return { left, right, up, down, columnOf, rowOf, size };
}
