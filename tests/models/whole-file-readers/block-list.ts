import { type BlockDesign, designFromBlocks } from '@/core/designs/block-design.ts';

/** Reads a list of blocks that states its size, line by line out of its whole text; undefined when it
 *  is none, or one that this plain reader does not take. */
export function wholeBlockListText(bytes: Uint8Array): BlockDesign | undefined {
  const lines = new TextDecoder().decode(bytes).split(/\r\n|\n|\r/);
  const head = lines.findIndex((line) => !line.startsWith('#'));
  const size = /points=(\d+) blocks=(\d+) counted-from=(0|1)/.exec(lines.slice(0, head).join('\n'));
  if (!size) return undefined;
  const [v, b, base] = size.slice(1).map(Number) as [number, number, number];
  const rows = lines.slice(head, head + b).map((line) => /^(?:\s*(\d+)\s*:)?([\d\s,]*)$/.exec(line));
  if (rows.length < b || rows.some((row) => !row) || lines.slice(head + b).some((line) => line.trim() !== ''))
    return undefined;
  const blocks = rows.map((row) => (row![2]!.match(/\d+/g) ?? []).map((point) => Number(point) - base));
  const classes = rows.map((row) => row![1]).filter((name) => name !== undefined);
  return designFromBlocks(v, blocks, classes.length > 0 ? { classes: Uint32Array.from(classes, Number) } : {});
}
