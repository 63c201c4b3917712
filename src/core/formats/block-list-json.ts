import { type BlockDesign, blockOf } from '../designs/block-design.ts';
import type { FileBytes } from './byte-source.ts';
import { readLists } from './json.ts';
import { JsonScanner } from './json-scanner.ts';
import { keepLists, ListCount, type ListVisitor } from './lists-read-twice.ts';
import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';
import type { ScanMark } from './text-scanner.ts';

/** The design as `{points, countedFrom: 0, blockCount, blocks: [[…], …], classes?}`, one block a line, after anything
 *  that says where it comes from. */
export function writeBlockListJson(
  design: BlockDesign,
  provenance: Readonly<Record<string, unknown>> = {},
): Uint8Array {
  const head = {
    ...provenance,
    ...(design.spec && { design: design.spec }),
    points: design.v,
    blockCount: design.b,
    countedFrom: 0,
    ...(design.classes && { classes: [...design.classes] }),
  };
  const blocks = Array.from({ length: design.b }, (_, i) => `    [${blockOf(design, i).join(', ')}]`);
  const text = JSON.stringify(head, null, 2).replace(/\n}$/, `,\n  "blocks": [\n${blocks.join(',\n')}\n  ]\n}\n`);
  return new TextEncoder().encode(text);
}

/** Reads such a file where it lies; other keys are passed over. `points` may be left out when counting starts at 0.
 *  @throws FormatError with the place of what is wrong; LimitError on size. */
export function readBlockListJson(file: FileBytes): BlockDesign {
  const scan = new JsonScanner(file);
  const stated: Record<string, { value: number; line: number }> = {};
  const count = new ListCount();
  const classes: number[] = [];
  let place: ScanMark | undefined;
  let classLine = 0;
  scan.object((key) => {
    const { line } = scan.text;
    if (key === 'points' || key === 'countedFrom')
      stated[key] = { value: scan.wholeNumber(`"${key}" to be a whole number`), line };
    else if (key === 'blocks') {
      place = scan.text.mark();
      readBlocks(scan, count);
    } else if (key === 'classes') {
      classLine = line;
      readClasses(scan, classes);
    } else scan.skipValue();
  });
  const wrong = (key: string, expected: string, found: unknown) =>
    scan.text.errorAtLine(stated[key]?.line ?? place?.line ?? 1, `"${key}" to be ${expected}`, String(found));
  const points = stated.points?.value;
  const base = stated.countedFrom?.value ?? 0;
  if (base > 1) throw wrong('countedFrom', '0 or 1', base);
  if (!place || count.lists === 0) throw wrong('blocks', 'a list of lists of points', place ? '[]' : 'nothing');
  if (count.least < base) throw wrong('blocks', `lists of points from ${base}`, count.least);
  const v = points ?? count.largest - base + 1;
  refuseBeyondLimits(count.lists, v, count.items);
  if (count.largest - base >= v) throw wrong('blocks', `lists of points below ${v + base}`, count.largest);
  if (classLine > 0 && classes.length !== count.lists)
    throw scan.text.errorAtLine(
      classLine,
      `"classes" to be ${count.lists} class numbers, one a block`,
      String(classes.length),
    );
  scan.text.reset(place);
  const { start, items } = keepLists(
    count,
    base,
    (visit) => readBlocks(scan, visit),
    (expected, found, block) => scan.text.error(`"blocks" to be ${expected} points (block ${block})`, found),
  );
  const design = { v, b: count.lists, blockStart: start, blockPoints: items };
  return classLine > 0 ? { ...design, classes: Uint32Array.from(classes) } : design;
}

const readBlocks = (scan: JsonScanner, visit: ListVisitor) => readLists(scan, visit, 'blocks', 'points');

function readClasses(scan: JsonScanner, classes: number[]): void {
  scan.list('"classes" to be a list of class numbers', () => {
    if (classes.length === matrixLimits.rows) refuseBeyondLimits(classes.length + 1, 0, 0);
    classes.push(scan.wholeNumber('"classes" to be whole numbers from 0'));
  });
}
