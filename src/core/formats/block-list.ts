import { type BlockDesign, blockOf } from '../designs/block-design.ts';
import type { FileBytes } from './byte-source.ts';
import { keepLists, ListCount, type ListVisitor } from './lists-read-twice.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

/** One block a line, its points counted from 0 and ascending, under a line that states the size. Where the design is
 *  resolved, a block's line begins with its parallel class and a colon. */
export function writeBlockListText(design: BlockDesign): Uint8Array {
  const out = new TextWriter();
  out.text('# blocks of a design, one a line');
  if (design.classes) out.text('; before the colon its parallel class');
  out.text('\n# points=').number(design.v).text(' blocks=').number(design.b).text(' counted-from=0\n');
  for (let i = 0; i < design.b; i++) {
    if (design.classes) out.number(design.classes[i]!).text(':');
    const block = blockOf(design, i);
    for (let j = 0; j < block.length; j++) {
      if (j > 0 || design.classes) out.text(' ');
      out.number(block[j]!);
    }
    out.text('\n');
  }
  return out.finish();
}

/** Reads files with or without the size line, where they lie; points stand apart by blanks or commas. Without the line the
 *  number of points is told by the largest, and the start of counting by a point 0; a file that shows none is refused.
 *  @throws FormatError with line and column; LimitError on a size that passes matrixLimits. */
export function readBlockListText(file: FileBytes): BlockDesign {
  const scan = new TextScanner(file);
  if (scan.atEnd()) throw scan.error('a block, or the line "# points=… blocks=…"', 'the end of the file');
  const stated = readHead(scan);
  const place = scan.mark();
  const count = new ListCount();
  const classes: number[] = [];
  readBlocks(scan, stated, count, classes);
  if (!scan.atEnd()) throw scan.error(`the end of the file after ${stated.blocks} blocks`, scan.tokenAt());
  if (count.lists !== (stated.blocks ?? count.lists)) throw scan.error(`${stated.blocks} blocks`, String(count.lists));
  const base = baseOf(scan, stated, count);
  const v = stated.points ?? count.largest + 1 - base;
  if (classes.length > 0 && classes.length !== count.lists)
    throw scan.error('one class before the points of every block, or of none', `${classes.length} classes`);
  refuseBeyondLimits(count.lists, v, count.items);
  scan.reset(place);
  const { start, items } = keepLists(
    count,
    base,
    (visit) => readBlocks(scan, stated, visit, []),
    (expected, found) => scan.error(`${expected} points in a block`, found),
  );
  const design = { v, b: count.lists, blockStart: start, blockPoints: items };
  return classes.length > 0 ? { ...design, classes: Uint32Array.from(classes) } : design;
}

interface Stated {
  points?: number;
  blocks?: number;
  base?: 0 | 1;
}

function readHead(scan: TextScanner): Stated {
  const stated: Stated = {};
  while (scan.peek() === 35) {
    const line = scan.line;
    for (const [, key, digits] of scan.restOfLine().matchAll(/\b(points|blocks|counted-from)=(\d{1,10})\b/g)) {
      const value = Number(digits);
      if (key === 'points') stated.points = value;
      else if (key === 'blocks') stated.blocks = value;
      else if (value === 0 || value === 1) stated.base = value;
      else throw scan.errorAtLine(line, 'counted-from=0 or counted-from=1', digits!);
    }
  }
  if (stated.points !== undefined) stated.base ??= 0;
  refuseBeyondLimits(stated.blocks ?? 0, stated.points ?? 0, 0);
  return stated;
}

function readBlocks(scan: TextScanner, stated: Stated, visit: ListVisitor, classes: number[]): void {
  // An empty block is an empty line, which only a file that states its number of blocks can mean.
  for (let i = 0; stated.blocks === undefined ? !scan.atEnd() : i < stated.blocks; i++) {
    if (stated.blocks !== undefined && scan.peek() === -1) return;
    visit.begin();
    readBlock(scan, stated, visit, classes, i);
    visit.end();
    scan.nextLineIfAtEnd();
  }
}

function readBlock(
  scan: TextScanner,
  { points, base = 0 }: Stated,
  visit: ListVisitor,
  classes: number[],
  at: number,
): void {
  let hasPoint = false;
  while (!scan.atLineEnd()) {
    const point = scan.number('a point', false, 58);
    if (scan.skipChar(':')) {
      if (hasPoint || classes.length !== at)
        throw scan.error('one class before the points of every block, or of none', ':');
      classes.push(point);
      continue;
    }
    if (points !== undefined && (point < base || point >= points + base))
      throw scan.error(`a point from ${base} to ${points - 1 + base}; points count from ${base}`, String(point));
    visit.item(point);
    hasPoint = true;
    scan.skipChar(',');
  }
}

/** What points count from. */
function baseOf(scan: TextScanner, stated: Stated, { least }: ListCount): 0 | 1 {
  if (stated.base !== undefined) return stated.base;
  if (least === 0) return 0;
  throw scan.errorAtLine(
    1,
    'a line "# points=… counted-from=0" (or 1): no point is 0, so the start of counting cannot be told',
    'none',
  );
}
