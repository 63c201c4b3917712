import { orbitLength } from '../develop.ts';

/** How often every non-zero difference d arises as x − y within the base blocks modulo v; entry 0 is unused. A block
 *  whose orbit is short counts for the share of its orbit, so a family is right when every entry is λ. */
export function differenceTable(v: number, base: readonly (readonly number[])[]): Float64Array {
  const table = new Float64Array(v);
  for (const block of base) {
    const share = orbitLength(v, block) / v;
    for (const x of block) for (const y of block) if (x !== y) table[(x - y + v) % v]! += share;
  }
  return table;
}

/** Whether the translates of the base blocks form a 2-(v,k,λ) design. */
export function isDifferenceFamily(v: number, lambda: number, base: readonly (readonly number[])[]): boolean {
  return differenceTable(v, base).every((count, d) => d === 0 || Math.abs(count - lambda) < 1e-9);
}
