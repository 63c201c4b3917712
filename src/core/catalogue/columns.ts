import type { DesignSpec } from '../designs/block-design.ts';
import type { Entry } from './entry.ts';
import type { SortColumn } from './query.ts';

const numeric = [
  'n',
  'rankLower',
  'rankUpper',
  'girthLower',
  'girthUpper',
  'distanceLower',
  'distanceUpper',
  'radius',
  'columnWeight',
  'rowWeight',
  'structure',
  'resolvable',
  'checks',
  'keptClasses',
  'design',
] as const;
type NumericColumn = (typeof numeric)[number];

const structures: readonly Entry['structure'][] = ['none', 'quasi-cyclic', 'cyclic'];

/** Columns that rows can be put in order by: those of a query, and the larger end of the rank. */
export type OrderColumn = SortColumn | 'rankUpper';

type Remake = (design: DesignSpec, checks: Entry['checks'], keptClasses: number | undefined) => Entry;

/** Every entry of the catalogue, a row each, laid out in columns of numbers for fast scans. Entries come back whole, with
 *  the words of how each figure is known, when a row is asked for. */
export class CatalogueColumns {
  private capacity = 1 << 17;
  private rows = 0;
  private readonly columns = Object.fromEntries(numeric.map((name) => [name, new Int32Array(this.capacity)])) as Record<
    NumericColumn,
    Int32Array
  >;
  private readonly designs: DesignSpec[] = [];
  private readonly orders = new Map<OrderColumn, Uint32Array>();

  constructor(private readonly remake: Remake) {}

  get count(): number {
    return this.rows;
  }

  /** A column's figures, as many as there are rows. */
  column(name: NumericColumn): Int32Array {
    return this.columns[name].subarray(0, this.rows);
  }

  /** Takes an entry in, unless its code is known to hold only the zero word. */
  add(entry: Entry): void {
    if (entry.n <= entry.rank.lower) return;
    if (this.rows === this.capacity) this.grow();
    if (this.designs.at(-1) !== entry.design) this.designs.push(entry.design);
    const c = this.columns;
    const i = this.rows++;
    c.n[i] = entry.n;
    c.rankLower[i] = entry.rank.lower;
    c.rankUpper[i] = Math.min(entry.n, entry.rank.upper);
    c.girthLower[i] = entry.girth.lower;
    c.girthUpper[i] = entry.girth.upper;
    c.distanceLower[i] = entry.distance.lower;
    c.distanceUpper[i] = entry.distance.upper;
    c.radius[i] = entry.radius;
    c.columnWeight[i] = entry.columnWeight;
    c.rowWeight[i] = entry.rowWeight;
    c.structure[i] = structures.indexOf(entry.structure);
    c.resolvable[i] = entry.resolvable ? 1 : 0;
    c.checks[i] = entry.checks === 'blocks' ? 0 : 1;
    c.keptClasses[i] = entry.keptClasses ?? 0;
    c.design[i] = this.designs.length - 1;
  }

  /** For each row whether its design is of one of the families. */
  ofFamilies(ids: ReadonlySet<string>): (row: number) => boolean {
    const wanted = Uint8Array.from(this.designs, ({ family }) => (ids.has(family) ? 1 : 0));
    const design = this.columns.design;
    return (row) => wanted[design[row]!] === 1;
  }

  designOf(row: number): DesignSpec {
    return this.designs[this.columns.design[row]!]!;
  }

  structureOf(row: number): Entry['structure'] {
    return structures[this.columns.structure[row]!]!;
  }

  entry(row: number): Entry {
    const { checks, keptClasses } = this.columns;
    const kept = keptClasses[row]! > 0 ? keptClasses[row]! : undefined;
    return this.remake(this.designOf(row), checks[row] === 0 ? 'blocks' : 'points', kept);
  }

  /** Rows in ascending order of a column, ties by length and then as enumerated; made when first asked for. */
  order(name: OrderColumn): Uint32Array {
    let order = this.orders.get(name);
    if (!order) {
      const values = this.values(name);
      const n = this.columns.n;
      order = Uint32Array.from({ length: this.rows }, (_, i) => i);
      order.sort((a, b) => values[a]! - values[b]! || n[a]! - n[b]! || a - b);
      this.orders.set(name, order);
    }
    return order;
  }

  private values(name: OrderColumn): ArrayLike<number> {
    const { n, rankLower, rankUpper, girthLower, distanceLower, radius, columnWeight, rowWeight } = this.columns;
    if (name === 'k') return Int32Array.from({ length: this.rows }, (_, i) => n[i]! - rankUpper[i]!);
    if (name === 'rate') return Float64Array.from({ length: this.rows }, (_, i) => 1 - rankUpper[i]! / n[i]!);
    const plain = { n, girth: girthLower, distance: distanceLower, radius, columnWeight, rowWeight, rankUpper };
    return name === 'parity' ? rankLower : plain[name];
  }

  private grow(): void {
    this.capacity *= 2;
    for (const name of numeric) {
      const wider = new Int32Array(this.capacity);
      wider.set(this.columns[name]);
      this.columns[name] = wider;
    }
  }
}
