import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError } from '@/core/errors.ts';
import { decodeText } from '@/core/formats/decode-text.ts';
import { refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';

/** Reads a table of shifts line by line out of its whole text.
 *  @throws FormatError with line and column of what is wrong; LimitError on size. */
export function wholeQuasiCyclic(bytes: Uint8Array): SparseMatrix {
  const text = decodeText(bytes);
  const lines = text.split(/\r\n|\n|\r/).map((line, i) => ({ text: line, number: i + 1 }));
  const used = lines.filter((line) => line.text.trim() !== '' && !line.text.trimStart().startsWith('#'));
  const head = /^\s*z=(\d{1,7}) block-rows=(\d{1,7}) block-columns=(\d{1,7})\s*$/.exec(used[0]?.text ?? '');
  if (!head)
    throw new FormatError(
      used[0]?.number ?? 1,
      1,
      '"z=… block-rows=… block-columns=…"',
      JSON.stringify(used[0]?.text.slice(0, 40) ?? ''),
    );
  const [z, blockRows, blockCols] = head.slice(1).map(Number) as [number, number, number];
  if (z < 1 || blockRows < 1 || blockCols < 1) throw new FormatError(used[0]!.number, 1, 'sizes from 1', '0');
  refuseBeyondLimits(z * blockRows, z * blockCols, 0);
  if (used.length !== blockRows + 1)
    throw new FormatError(used.at(-1)!.number, 1, `${blockRows} lines of shifts`, String(used.length - 1));
  const table = used.slice(1).map((line) => readShifts(line, z, blockCols));
  refuseBeyondLimits(z * blockRows, z * blockCols, z * table.flat(2).length);
  const rows: number[][] = [];
  for (const shifts of table) {
    for (let r = 0; r < z; r++) rows.push(shifts.flatMap((list, block) => list.map((s) => block * z + ((r + s) % z))));
  }
  return matrixFromRows(z * blockCols, rows);
}

function readShifts(line: { text: string; number: number }, z: number, blockCols: number): number[][] {
  const cells = [...line.text.matchAll(/\S+/g)];
  if (cells.length !== blockCols)
    throw new FormatError(line.number, 1, `${blockCols} blocks on the line`, String(cells.length));
  return cells.map((cell) => {
    if (cell[0] === '-1') return [];
    const shifts = cell[0].split('+').map((part) => (/^\d{1,7}$/.test(part) ? Number(part) : z));
    if (shifts.some((s) => s >= z) || new Set(shifts).size !== shifts.length)
      throw new FormatError(
        line.number,
        cell.index + 1,
        `-1, or distinct shifts from 0 to ${z - 1} joined by +`,
        JSON.stringify(cell[0].slice(0, 20)),
      );
    return shifts;
  });
}
