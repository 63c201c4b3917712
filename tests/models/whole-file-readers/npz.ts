import { unzipSync } from 'fflate';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { matrixFromEntries } from '@/core/formats/matrix-from-entries.ts';
import { matrixLimits, refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';
import { decodeNpy, npyElements } from './npy.ts';
import { pairedEntries } from './paired-entries.ts';

/** Bytes that one array inside the archive may unpack to. */
const maxMemberBytes = 8 * matrixLimits.ones + 4096;
/** Reads, with all of it in memory, compressed rows, compressed columns and coordinate lists whose stored values are 0 or 1.
 *  @throws FormatError saying what is missing or wrong; LimitError on a member or a matrix beyond the limits. */
export function wholeNpz(bytes: Uint8Array): SparseMatrix {
  const members = unpack(bytes);
  const member = (name: string) => {
    const data = members[`${name}.npy`];
    if (!data)
      throw new FormatError(
        1,
        1,
        `a member ${name}.npy in the archive`,
        `only ${Object.keys(members).join(', ') || 'none'}`,
      );
    return decodeNpy(data, `${name}.npy`);
  };
  const list = (name: string) => npyElements(member(name), `${name}.npy`);
  const kind = new TextDecoder().decode(member('format').data).replace(/\0/g, '');
  const shape = list('shape');
  const [rows, cols] = [shape.at(0), shape.at(1)];
  if (shape.count !== 2 || !(rows >= 1) || !(cols >= 1))
    throw new FormatError(1, 1, 'a shape of two sizes from 1', 'another');
  const data = list('data');
  refuseBeyondLimits(rows, cols, data.count);
  const pairs =
    kind === 'coo'
      ? { a: list('row'), b: list('col') }
      : { a: expandPointers(kind, list('indptr'), data.count, kind === 'csc' ? cols : rows), b: list('indices') };
  const swap = kind === 'csc';
  const rowOf = new Uint32Array(data.count);
  const colOf = new Uint32Array(data.count);
  let count = 0;
  for (let e = 0; e < data.count; e++) {
    const value = data.at(e);
    if (value !== 0 && value !== 1) throw new FormatError(1, 1, 'stored values 0 or 1', String(value));
    const row = (swap ? pairs.b : pairs.a).at(e);
    const col = (swap ? pairs.a : pairs.b).at(e);
    if (!(row >= 0 && row < rows && col >= 0 && col < cols))
      throw new FormatError(1, 1, `entries inside ${rows} × ${cols}`, `row ${row}, column ${col}`);
    if (value === 0) continue;
    rowOf[count] = row;
    colOf[count++] = col;
  }
  const place = { error: (expected: string, found: string) => new FormatError(1, 1, expected, found) };
  return matrixFromEntries(rows, cols, pairedEntries(rowOf, colOf, count), place);
}

/** The row (or column) of each stored entry, from the pointers of a compressed layout. */
function expandPointers(kind: string, pointers: { count: number; at(i: number): number }, ones: number, lines: number) {
  if (kind !== 'csr' && kind !== 'csc') throw new FormatError(1, 1, 'a format csr, csc or coo', JSON.stringify(kind));
  if (pointers.count !== lines + 1 || pointers.at(0) !== 0 || pointers.at(lines) !== ones)
    throw new FormatError(1, 1, `indptr with ${lines + 1} entries from 0 to ${ones}`, 'others');
  const lineOf = new Uint32Array(ones);
  for (let i = 0; i < lines; i++) {
    if (pointers.at(i + 1) < pointers.at(i))
      throw new FormatError(1, 1, 'indptr that never falls', `a fall at entry ${i + 1}`);
    lineOf.fill(i, pointers.at(i), pointers.at(i + 1));
  }
  return { count: ones, at: (e: number) => lineOf[e]! };
}

/** Members by name. Sizes are looked at before anything is unpacked, and names are only ever compared, never used as
 *  paths. */
function unpack(bytes: Uint8Array): Record<string, Uint8Array> {
  const wanted = new Set(['format', 'shape', 'data', 'indices', 'indptr', 'row', 'col'].map((name) => `${name}.npy`));
  try {
    return unzipSync(bytes, {
      filter: ({ name, originalSize }) => {
        if (!wanted.has(name)) return false;
        if (originalSize > maxMemberBytes)
          throw new LimitError(`member ${name}`, originalSize, maxMemberBytes, 'bytes');
        return true;
      },
    });
  } catch (error) {
    if (error instanceof LimitError) throw error;
    throw new FormatError(
      1,
      1,
      'a zip archive',
      bytes.length === 0 ? 'an empty file' : 'bytes that do not unpack as one',
    );
  }
}
