import { zipSync } from 'fflate';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError } from '../errors.ts';
import type { FileBytes } from './byte-source.ts';
import { type ByteStream, readFully } from './byte-stream.ts';
import type { Entries } from './entries.ts';
import { matrixFromEntries } from './matrix-from-entries.ts';
import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';
import { encodeNpy, npyCount, npyNumbers, readNpyHead } from './npy.ts';
import type { NumberStream } from './number-stream.ts';
import { type ZipMember, zipMembers } from './zip-archive.ts';

/** Bytes that one array inside the archive may unpack to. */
const maxMemberBytes = 8 * matrixLimits.ones + 4096;
const names: ReadonlySet<string> = new Set(
  ['format', 'shape', 'data', 'indices', 'indptr', 'row', 'col'].map((name) => `${name}.npy`),
);
/** The one time written into archives, so that the same matrix has the same bytes: the first a zip can hold. */
const fixedTime = new Date(1980, 0, 1);

/** SciPy's sparse .npz in compressed rows: a zip of format, shape, data, indices and indptr. */
export function writeNpz(H: SparseMatrix): Uint8Array {
  const ints = (values: ArrayLike<number>) => new Uint8Array(Int32Array.from(values).buffer);
  const vector = (descr: string, count: number, data: Uint8Array) =>
    encodeNpy({ shape: [count], descr, fortranOrder: false, data });
  const shape = new Uint8Array(BigInt64Array.from([BigInt(H.rows), BigInt(H.cols)]).buffer);
  return zipSync(
    {
      'indices.npy': vector('<i4', H.colIndex.length, ints(H.colIndex)),
      'indptr.npy': vector('<i4', H.rowStart.length, ints(H.rowStart)),
      'format.npy': encodeNpy({ shape: [], descr: '|S3', fortranOrder: false, data: new TextEncoder().encode('csr') }),
      'shape.npy': vector('<i8', 2, shape),
      'data.npy': vector('|i1', H.colIndex.length, new Uint8Array(H.colIndex.length).fill(1)),
    },
    { level: 1, mtime: fixedTime },
  );
}

/** Reads compressed rows, compressed columns and coordinate lists whose stored values are 0 or 1, member by member where
 *  they lie.
 *  @throws FormatError saying what is missing or wrong; LimitError on a member or a matrix beyond the limits. */
export function readNpz(file: FileBytes): SparseMatrix {
  const archive = new NpzArchive(file);
  const kind = archive.text('format');
  const shape = archive.list('shape');
  const [rows, cols] = [shape.next(), shape.next()];
  if (shape.count !== 2 || !isSize(rows) || !isSize(cols)) throw wrong('a shape of two sizes from 1', 'another');
  const data = archive.list('data');
  refuseBeyondLimits(rows, cols, data.count);
  const values = checkValues(data);
  const entries =
    kind === 'coo' ? coordinates(archive, values) : compressed(archive, values, kind, kind === 'csc' ? cols : rows);
  const isInside = (row: number, col: number) => isBelow(row, rows) && isBelow(col, cols);
  const each = (visit: (row: number, col: number) => void) =>
    entries.each((row, col) => {
      if (!isInside(row, col)) throw wrong(`entries inside ${rows} × ${cols}`, `row ${row}, column ${col}`);
      visit(row, col);
    });
  return matrixFromEntries(rows, cols, { each }, { error: wrong });
}

const wrong = (expected: string, found: string) => new FormatError(1, 1, expected, found);
const isSize = (value: number) => Number.isInteger(value) && value >= 1;
const isBelow = (value: number, limit: number) => Number.isInteger(value) && value >= 0 && value < limit;

/** Numbers of one member, and how many it says it has. */
class MemberNumbers {
  private passed = 0;

  constructor(
    private readonly name: string,
    private readonly stream: ByteStream,
    private readonly numbers: NumberStream,
    readonly count: number,
  ) {}

  /** @throws FormatError when the member ends before its count, or does not end after it. */
  next(): number {
    const value = this.numbers.next();
    if (this.numbers.given <= this.passed) throw wrong(`${this.name}: ${this.count} numbers`, String(this.passed));
    this.passed++;
    if (this.passed === this.count) this.end();
    return value;
  }

  private end(): void {
    if (this.numbers.given > this.count || this.stream.read(new Uint8Array(1)) > 0)
      throw wrong(`${this.name}: ${this.count} numbers`, 'more');
  }
}

class NpzArchive {
  private readonly members: Map<string, ZipMember>;

  constructor(file: FileBytes) {
    this.members = zipMembers(file, names, maxMemberBytes);
  }

  list(name: string): MemberNumbers {
    const { stream, head } = this.open(name);
    return new MemberNumbers(`${name}.npy`, stream, npyNumbers(stream, head, `${name}.npy`), npyCount(head));
  }

  /** A few letters, such as the format. */
  text(name: string): string {
    return new TextDecoder().decode(readFully(this.open(name).stream, 64)).replace(/\0/g, '');
  }

  private open(name: string) {
    const member = this.members.get(`${name}.npy`);
    if (!member)
      throw wrong(`a member ${name}.npy in the archive`, `only ${[...this.members.keys()].join(', ') || 'none'}`);
    const stream = member.open();
    return { stream, head: readNpyHead(stream, `${name}.npy`) };
  }
}

function coordinates(archive: NpzArchive, { count, hasZeros }: Values): Entries {
  return {
    each(visit) {
      const [row, col] = [archive.list('row'), archive.list('col')];
      const values = hasZeros ? archive.list('data') : undefined;
      sameCount([row, col], count);
      for (let e = 0; e < count; e++) {
        const [r, c] = [row.next(), col.next()];
        if (values?.next() !== 0) visit(r, c);
      }
    },
  };
}

/** Rows (or columns) by their pointers, of which a matrix has few enough to hold. */
function compressed(archive: NpzArchive, { count, hasZeros }: Values, kind: string, lines: number): Entries {
  if (kind !== 'csr' && kind !== 'csc') throw wrong('a format csr, csc or coo', JSON.stringify(kind));
  const pointers = pointersOf(archive.list('indptr'), lines, count);
  return {
    each(visit) {
      const index = archive.list('indices');
      const values = hasZeros ? archive.list('data') : undefined;
      sameCount([index], count);
      for (let line = 0; line < lines; line++) {
        for (let e = pointers[line]!; e < pointers[line + 1]!; e++) {
          const at = index.next();
          if (values?.next() === 0) continue;
          if (kind === 'csr') visit(line, at);
          else visit(at, line);
        }
      }
    },
  };
}

function pointersOf(list: MemberNumbers, lines: number, ones: number): Uint32Array {
  const expected = `indptr with ${lines + 1} entries from 0 to ${ones}`;
  if (list.count !== lines + 1) throw wrong(expected, `${list.count} entries`);
  const pointers = new Uint32Array(lines + 1);
  for (let i = 0; i <= lines; i++) {
    const pointer = list.next();
    if (!isBelow(pointer, ones + 1) || (i === 0 && pointer !== 0)) throw wrong(expected, String(pointer));
    if (i > 0 && pointer < pointers[i - 1]!) throw wrong('indptr that never falls', `a fall at entry ${i}`);
    pointers[i] = pointer;
  }
  if (pointers[lines] !== ones) throw wrong(expected, String(pointers[lines]));
  return pointers;
}

interface Values {
  count: number;
  /** Whether zeros are stored among the ones; where they are, they have to be read along with the places. */
  hasZeros: boolean;
}

function checkValues(data: MemberNumbers): Values {
  let hasZeros = false;
  for (let e = 0; e < data.count; e++) {
    const value = data.next();
    if (value !== 0 && value !== 1) throw wrong('stored values 0 or 1', String(value));
    if (value === 0) hasZeros = true;
  }
  return { count: data.count, hasZeros };
}

function sameCount(lists: readonly MemberNumbers[], count: number): void {
  for (const list of lists)
    if (list.count !== count) throw wrong(`as many indices as the ${count} stored values`, String(list.count));
}
