import type { SeededRandom } from '../../algebra/seeded-random.ts';

interface Step {
  to: number;
  shift: number;
}

/** The Tanner graph of a lifted matrix, kept as its base graph with a shift on each edge. Node (line, x) is copy x of a base
 *  line; the edge of a one at (r, c) joins (c, x + shift) and (r, x). */
export class LiftedGraph {
  private readonly fromColumn: Step[][];
  private readonly fromRow: Step[][];

  constructor(
    rows: number,
    cols: number,
    private readonly size: number,
  ) {
    this.fromColumn = Array.from({ length: cols }, () => []);
    this.fromRow = Array.from({ length: rows }, () => []);
  }

  add(column: number, row: number, shift: number): void {
    this.fromColumn[column]!.push({ to: row, shift: -shift });
    this.fromRow[row]!.push({ to: column, shift });
  }

  /** A shift for a new one whose edges close no cycle shorter than `girth`, from those whose ends lie farthest apart; −1
   *  when there is none. */
  farthestShift(column: number, row: number, girth: number, random: SeededRandom): number {
    const distance = this.distances(column, girth)[row]!;
    const candidates = random.shuffle(Array.from({ length: this.size }, (_, x) => x));
    candidates.sort((a, b) => distance[b]! - distance[a]!);
    for (const x of candidates) {
      // The root is copy 0 of the column; it meets copy x of the row when x + shift = 0.
      const shift = (this.size - x) % this.size;
      if (distance[x]! + 1 < girth) return -1;
      this.add(column, row, shift);
      // Copies of the new edge may close cycles among themselves.
      const clear = this.shortestThrough(column, girth) >= girth;
      this.fromColumn[column]!.pop();
      this.fromRow[row]!.pop();
      if (clear) return shift;
    }
    return -1;
  }

  /** Distances from copy 0 of a column to all copies of the rows, those of `limit` or more as Infinity. */
  private distances(column: number, limit: number): Float64Array[] {
    const rows = this.fromRow.map(() => new Float64Array(this.size).fill(Number.POSITIVE_INFINITY));
    const seen = new Set([column * this.size]);
    let front: number[] = [column * this.size];
    for (let d = 1; d < limit && front.length > 0; d += 2) {
      const next: number[] = [];
      for (const node of front) {
        for (const { to, x } of this.neighbours(this.fromColumn, node)) {
          if (rows[to]![x]! <= d) continue;
          rows[to]![x] = d;
          for (const { to: c, x: y } of this.neighbours(this.fromRow, to * this.size + x)) {
            if (!seen.has(c * this.size + y)) {
              seen.add(c * this.size + y);
              next.push(c * this.size + y);
            }
          }
        }
      }
      front = next;
    }
    return rows;
  }

  private *neighbours(steps: Step[][], node: number): Generator<{ to: number; x: number }> {
    const { size } = this;
    const x = node % size;
    for (const { to, shift } of steps[Math.floor(node / size)]!) yield { to, x: (x + shift + size) % size };
  }

  /** Length of the shortest cycle met from copy 0 of a column, or `cap`. */
  private shortestThrough(column: number, cap: number): number {
    const depth = new Map<string, number>();
    const key = (side: string, node: number) => side + node;
    const root = column * this.size;
    const queue: { side: 'c' | 'r'; node: number; parent: string }[] = [{ side: 'c', node: root, parent: '' }];
    depth.set(key('c', root), 0);
    for (let i = 0; i < queue.length; i++) {
      const { side, node, parent } = queue[i]!;
      const d = depth.get(key(side, node))!;
      if (2 * d + 2 >= cap) break;
      const other = side === 'c' ? 'r' : 'c';
      for (const { to, x } of this.neighbours(side === 'c' ? this.fromColumn : this.fromRow, node)) {
        const next = to * this.size + x;
        const known = depth.get(key(other, next));
        if (known === undefined) {
          depth.set(key(other, next), d + 1);
          queue.push({ side: other, node: next, parent: key(side, node) });
        } else if (key(other, next) !== parent) return d + known + 1;
      }
    }
    return cap;
  }
}
