import { subsets } from './subset-coverage.ts';
import type { LineSubsetOrbits } from './subset-orbits.ts';

/** Unions of k-subset orbits that hold every 5-subset exactly once, found by exact cover on the orbit matrix: entry
 *  (T, B) counts the members of B's orbit on the 5-subset T (Kramer and Mesner 1976). Stops after `limit` unions. */
export function steinerUnions(orbits: LineSubsetOrbits, k: number, limit: number): number[][][] {
  const rows = orbits.orbits(5);
  const rowAt = new Map(rows.map((orbit, i) => [orbit.subset.join(), i]));
  const columns: { subset: number[]; covers: number[] }[] = [];
  for (const block of orbits.orbits(k)) {
    const hits = new Map<number, number>();
    for (const five of subsets(block.subset, 5)) {
      const row = rowAt.get(orbits.canonical(five).subset.join())!;
      hits.set(row, (hits.get(row) ?? 0) + rows[row]!.stabiliser);
    }
    if ([...hits.values()].every((count) => count === block.stabiliser))
      columns.push({ subset: block.subset, covers: [...hits.keys()] });
  }
  return exactCovers(rows.length, columns, limit);
}

function exactCovers(rowCount: number, columns: { subset: number[]; covers: number[] }[], limit: number): number[][][] {
  const holding = Array.from({ length: rowCount }, (_, row) =>
    columns.flatMap((column, i) => (column.covers.includes(row) ? [i] : [])),
  );
  const blocked = new Int32Array(columns.length);
  const covered = new Uint8Array(rowCount);
  const open = holding.map((list) => list.length);
  const chosen: number[] = [];
  const found: number[][][] = [];
  const change = (column: number, by: 1 | -1) => {
    for (const row of columns[column]!.covers) {
      covered[row] = by === 1 ? 1 : 0;
      for (const other of holding[row]!) {
        if (by === 1 && blocked[other]!++ === 0) for (const r of columns[other]!.covers) open[r]!--;
        if (by === -1 && --blocked[other]! === 0) for (const r of columns[other]!.covers) open[r]!++;
      }
    }
  };
  const search = () => {
    let best = -1;
    for (let row = 0; row < rowCount; row++) if (!covered[row] && (best < 0 || open[row]! < open[best]!)) best = row;
    if (best < 0) {
      found.push(chosen.map((i) => columns[i]!.subset));
      return;
    }
    for (const column of holding[best]!) {
      if (blocked[column]! > 0) continue;
      chosen.push(column);
      change(column, 1);
      search();
      change(column, -1);
      chosen.pop();
      if (found.length >= limit) return;
    }
  };
  search();
  return found;
}
