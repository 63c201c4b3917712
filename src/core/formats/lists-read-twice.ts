import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';

/** What a reader of lists tells as it goes along. */
export interface ListVisitor {
  begin(): void;
  item(value: number): void;
  end(): void;
}

/** Lists of whole numbers, packed: list i is items[start[i] .. start[i + 1]), ascending. */
export interface PackedLists {
  start: Uint32Array;
  items: Uint32Array;
}

/** The first reading: counts, so that the second can be given exactly the memory it needs.
 *  It throws LimitError on more lists or items than a matrix may have rows or ones. */
export class ListCount implements ListVisitor {
  lists = 0;
  items = 0;
  least = Number.POSITIVE_INFINITY;
  largest = -1;
  private readonly starts = [0];

  begin(): void {
    if (++this.lists > matrixLimits.rows) refuseBeyondLimits(this.lists, 0, 0);
  }

  item(value: number): void {
    if (++this.items > matrixLimits.ones) refuseBeyondLimits(0, 0, this.items);
    if (value < this.least) this.least = value;
    if (value > this.largest) this.largest = value;
  }

  end(): void {
    this.starts.push(this.items);
  }

  start(): Uint32Array {
    return Uint32Array.from(this.starts);
  }
}

/** The second reading: keeps. `base` is what items count from; `refuse` makes the error of a list that holds an item
 *  twice, or of a file that is no longer what it was. */
export function keepLists(
  count: ListCount,
  base: number,
  read: (visit: ListVisitor) => void,
  refuse: (expected: string, found: string, list: number) => Error,
): PackedLists {
  const start = count.start();
  const items = new Uint32Array(count.items);
  let list = -1;
  let at = 0;
  read({
    begin() {
      list++;
    },
    item(value) {
      items[at++] = value - base;
    },
    end() {
      if (at !== start[list + 1]) throw refuse('a file that stays as it is', 'one that changed on the way', list);
      const kept = items.subarray(start[list], at);
      if (rises(kept)) return;
      kept.sort();
      for (let j = 1; j < kept.length; j++)
        if (kept[j] === kept[j - 1]) throw refuse('distinct', `${kept[j]! + base} twice`, list);
    },
  });
  if (list !== count.lists - 1) throw refuse('a file that stays as it is', 'one that changed on the way', list);
  return { start, items };
}

function rises(list: Uint32Array): boolean {
  for (let j = 1; j < list.length; j++) if (list[j]! <= list[j - 1]!) return false;
  return true;
}
