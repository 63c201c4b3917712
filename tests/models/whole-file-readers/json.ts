import { matrixFromRows, type SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError, ParamError } from '@/core/errors.ts';
import { decodeText } from '@/core/formats/decode-text.ts';
import { refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';

/** Reads the JSON of a matrix by the engine's own JSON.parse; other keys are passed over.
 *  @throws FormatError with the place of a syntax error or the name of a wrong key; LimitError on size. */
export function wholeJson(bytes: Uint8Array): SparseMatrix {
  const text = decodeText(bytes);
  const value = parseJson(text) as { columns?: unknown; rows?: unknown; countedFrom?: unknown; onesByRow?: unknown };
  const { columns, rows, onesByRow, countedFrom = 0 } = value ?? {};
  const lineOf = (key: string) => text.slice(0, Math.max(0, text.indexOf(`"${key}"`))).split('\n').length;
  const wrong = (key: string, expected: string, found: unknown) =>
    new FormatError(lineOf(key), 1, `"${key}" to be ${expected}`, (JSON.stringify(found) ?? 'nothing').slice(0, 40));
  if (!isCount(columns)) throw wrong('columns', 'a whole number from 1', columns);
  if (!Array.isArray(onesByRow)) throw wrong('onesByRow', 'a list of lists of columns', onesByRow);
  if (rows !== undefined && rows !== onesByRow.length)
    throw wrong('rows', `${onesByRow.length}, the lists given`, rows);
  if (countedFrom !== 0 && countedFrom !== 1) throw wrong('countedFrom', '0 or 1', countedFrom);
  if (onesByRow.length === 0) throw wrong('onesByRow', 'at least one row', onesByRow);
  const isList = (row: unknown): row is number[] =>
    Array.isArray(row) && row.every((c) => Number.isInteger(c) && c >= countedFrom);
  const bad = onesByRow.findIndex((row) => !isList(row));
  if (bad >= 0) throw wrong('onesByRow', `lists of columns from ${countedFrom} (row ${bad})`, onesByRow[bad]);
  const lists = onesByRow as number[][];
  refuseBeyondLimits(
    lists.length,
    columns,
    lists.reduce((sum, row) => sum + row.length, 0),
  );
  try {
    return matrixFromRows(columns, countedFrom === 0 ? lists : lists.map((row) => row.map((c) => c - 1)));
  } catch (error) {
    if (error instanceof ParamError) throw wrong('onesByRow', `${error.accepted} in ${error.param}`, error.given);
    throw error;
  }
}

const isCount = (x: unknown): x is number => Number.isInteger(x) && (x as number) >= 1;

/** @throws FormatError with the place of a syntax error. */
export function parseJson(text: string): unknown {
  try {
    return JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (error) {
    const message = (error as Error).message;
    const at = Number(/position (\d+)/.exec(message)?.[1] ?? text.length);
    const before = text.slice(0, at).split('\n');
    throw new FormatError(
      before.length,
      before.at(-1)!.length + 1,
      'JSON',
      JSON.stringify(text.slice(at, at + 12)) || 'the end',
    );
  }
}
