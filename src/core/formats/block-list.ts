import { type BlockDesign, blockOf } from '../designs/block-design.ts';
import type { FileBytes } from './byte-source.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

/** A list of blocks out of a file, points counted from 0. */
export interface BlockList {
  v: number;
  blocks: Uint32Array[];
  /** Resolution class of each block, where the file gives one. */
  classes?: Uint32Array;
}

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

/** Reads files with or without the size line; points stand apart by blanks or commas. Without it the number of points
 *  is told by the largest, and the start of counting by a point 0; a file that shows none is refused.
 *  @throws FormatError with line and column; LimitError on a size that passes matrixLimits. */
export function readBlockListText(file: FileBytes): BlockList {
  const scan = new TextScanner(file);
  if (scan.atEnd()) throw scan.error('a block, or the line "# points=… blocks=…"', 'the end of the file');
  const stated = readHead(scan);
  const blocks: Uint32Array[] = [];
  const classes: number[] = [];
  let incidences = 0;
  // An empty block is an empty line, which only a file that states its number of blocks can mean.
  while (stated.blocks === undefined ? !scan.atEnd() : blocks.length < stated.blocks) {
    if (stated.blocks !== undefined && scan.peek() === -1) break;
    const block = readBlock(scan, stated, classes, blocks.length);
    incidences += block.length;
    refuseBeyondLimits(blocks.length, 0, incidences);
    blocks.push(block);
    scan.nextLineIfAtEnd();
  }
  if (!scan.atEnd()) throw scan.error(`the end of the file after ${stated.blocks} blocks`, scan.tokenAt());
  if (blocks.length !== (stated.blocks ?? blocks.length))
    throw scan.error(`${stated.blocks} blocks`, String(blocks.length));
  return finish(scan, stated, blocks, classes);
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

function readBlock(scan: TextScanner, { points, base = 0 }: Stated, classes: number[], at: number): Uint32Array {
  const block: number[] = [];
  while (!scan.atLineEnd()) {
    const point = scan.number('a point', false, 58);
    if (scan.skipChar(':')) {
      if (block.length > 0 || classes.length !== at)
        throw scan.error('one class before the points of every block, or of none', ':');
      classes.push(point);
      continue;
    }
    if (points !== undefined && (point < base || point >= points + base))
      throw scan.error(`a point from ${base} to ${points - 1 + base}; points count from ${base}`, String(point));
    block.push(point);
    scan.skipChar(',');
  }
  const sorted = Uint32Array.from(block).sort();
  for (let j = 1; j < sorted.length; j++)
    if (sorted[j] === sorted[j - 1]) throw scan.error('distinct points in a block', `${sorted[j]} twice`);
  return sorted;
}

function finish(scan: TextScanner, stated: Stated, blocks: Uint32Array[], classes: number[]): BlockList {
  if (classes.length > 0 && classes.length !== blocks.length)
    throw scan.error('one class before the points of every block, or of none', `${classes.length} classes`);
  const base = stated.base ?? 0;
  if (stated.base === undefined && !blocks.some((block) => block[0] === 0))
    throw scan.errorAtLine(
      1,
      'a line "# points=… counted-from=0" (or 1): no point is 0, so the start of counting cannot be told',
      'none',
    );
  if (base === 1) for (const block of blocks) for (let j = 0; j < block.length; j++) block[j]! -= 1;
  const largest = blocks.reduce((most, block) => Math.max(most, block.at(-1) ?? -1), -1);
  const v = stated.points ?? largest + 1;
  refuseBeyondLimits(0, v, 0);
  return { v, blocks, ...(classes.length > 0 && { classes: Uint32Array.from(classes) }) };
}
