import { type BlockDesign, designFromBlocks } from '@/core/designs/block-design.ts';
import { FormatError } from '@/core/errors.ts';
import { decodeText } from '@/core/formats/decode-text.ts';
import { refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';
import { parseJson } from './json.ts';

/** Reads the JSON of a list of blocks by JSON.parse; other keys are passed over. `points` may be left out when counting starts at 0.
 *  @throws FormatError with the place of a syntax error or the name of a wrong key; LimitError on size. */
export function wholeBlockListJson(bytes: Uint8Array): BlockDesign {
  const text = decodeText(bytes);
  const value = (parseJson(text) ?? {}) as Record<'points' | 'blocks' | 'classes' | 'countedFrom', unknown>;
  const { points, blocks, classes, countedFrom = 0 } = value;
  const wrong = (key: string, expected: string, found: unknown) => {
    const line = text.slice(0, Math.max(0, text.indexOf(`"${key}"`))).split('\n').length;
    return new FormatError(line, 1, `"${key}" to be ${expected}`, (JSON.stringify(found) ?? 'nothing').slice(0, 40));
  };
  if (countedFrom !== 0 && countedFrom !== 1) throw wrong('countedFrom', '0 or 1', countedFrom);
  if (!Array.isArray(blocks) || blocks.length === 0) throw wrong('blocks', 'a list of lists of points', blocks);
  if (points !== undefined && !isIndex(points)) throw wrong('points', 'a whole number', points);
  refuseBeyondLimits(blocks.length, (points as number | undefined) ?? 0, 0);
  let incidences = 0;
  let largest = -1;
  const lists = blocks.map((block: unknown, i) => {
    if (!Array.isArray(block) || !block.every((p) => isIndex(p) && p >= countedFrom))
      throw wrong('blocks', `lists of points from ${countedFrom} (block ${i})`, block);
    const list = Uint32Array.from(block as number[], (p) => p - countedFrom).sort();
    if (list.some((p, j) => j > 0 && p === list[j - 1])) throw wrong('blocks', `distinct points (block ${i})`, block);
    incidences += list.length;
    largest = Math.max(largest, list.at(-1) ?? -1);
    refuseBeyondLimits(0, largest + 1, incidences);
    return list;
  });
  if (points !== undefined && largest >= (points as number))
    throw wrong('blocks', `lists of points below ${points}`, largest + countedFrom);
  if (classes !== undefined && (!Array.isArray(classes) || classes.length !== lists.length || !classes.every(isIndex)))
    throw wrong('classes', `${lists.length} class numbers, one a block`, classes);
  const v = (points as number | undefined) ?? largest + 1;
  return designFromBlocks(v, lists, classes === undefined ? {} : { classes: Uint32Array.from(classes as number[]) });
}

const isIndex = (x: unknown): x is number => Number.isInteger(x) && (x as number) >= 0 && (x as number) < 2 ** 32;
