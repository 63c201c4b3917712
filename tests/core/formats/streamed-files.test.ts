import { zipSync, zlibSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { type SeededRandom, seededRandom } from '@/core/algebra/seeded-random.ts';
import { type SparseMatrix, transpose } from '@/core/codes/sparse-matrix.ts';
import type { BlockDesign } from '@/core/designs/block-design.ts';
import { FormatError, LimitError, ParamError } from '@/core/errors.ts';
import { readBlockListText, writeBlockListText } from '@/core/formats/block-list.ts';
import { readBlockListJson, writeBlockListJson } from '@/core/formats/block-list-json.ts';
import type { ByteSource, FileBytes } from '@/core/formats/byte-source.ts';
import { exportMatrix, importMatrix } from '@/core/formats/index.ts';
import { encodeNpy } from '@/core/formats/npy.ts';
import { mutate } from '../../models/mutated-uploads.ts';
import { anyCirculants, anyMatrix } from '../../models/seeded-matrices.ts';
import { wholeBlockListText } from '../../models/whole-file-readers/block-list.ts';
import { wholeBlockListJson } from '../../models/whole-file-readers/block-list-json.ts';
import { wholeCHeader } from '../../models/whole-file-readers/c-header.ts';
import { wholeJson } from '../../models/whole-file-readers/json.ts';
import { wholeMat } from '../../models/whole-file-readers/mat.ts';
import { wholeNpy } from '../../models/whole-file-readers/npy.ts';
import { wholeNpz } from '../../models/whole-file-readers/npz.ts';
import { wholeQuasiCyclic } from '../../models/whole-file-readers/quasi-cyclic.ts';

type Held = SparseMatrix | BlockDesign;

/** A source that gives a few bytes at a time, as a slow disk may. */
const source = (bytes: Uint8Array, most: number): ByteSource => ({
  size: bytes.length,
  read(position, into) {
    const part = bytes.subarray(position, position + Math.min(most, into.length));
    into.set(part);
    return part.length;
  },
});

/** What a reader makes of a file; null for a typed error. */
function outcome(read: (file: Uint8Array) => Held | undefined, file: Uint8Array): Held | null | undefined {
  try {
    return read(file);
  } catch (error) {
    if ([FormatError, LimitError, ParamError].some((kind) => error instanceof kind)) return null;
    throw error;
  }
}

const ints = (values: ArrayLike<number>) => new Uint8Array(Int32Array.from(values).buffer);
const longs = (values: ArrayLike<number>) => new Uint8Array(BigInt64Array.from(Array.from(values, BigInt)).buffer);
const vector = (descr: string, count: number, data: Uint8Array) =>
  encodeNpy({ shape: [count], descr, fortranOrder: false, data });
const rowsOf = (H: SparseMatrix) =>
  Array.from({ length: H.rows }, (_, i) => Array<number>(H.rowStart[i + 1]! - H.rowStart[i]!).fill(i)).flat();

/** An archive of damaged members, whose checksums are right again. */
function anyNpz(H: SparseMatrix, random: SeededRandom, damaged: boolean): Uint8Array {
  const kind = ['csr', 'csc', 'coo'][random.below(3)]!;
  const M = kind === 'csc' ? transpose(H) : H;
  const index =
    random.below(2) === 0
      ? (values: ArrayLike<number>) => vector('<i4', values.length, ints(values))
      : (values: ArrayLike<number>) => vector('<i8', values.length, longs(values));
  const members: Record<string, Uint8Array> = {
    'format.npy': encodeNpy({ shape: [], descr: '|S3', fortranOrder: false, data: new TextEncoder().encode(kind) }),
    'shape.npy': vector('<i8', 2, longs([H.rows, H.cols])),
    'data.npy': vector('|b1', M.colIndex.length, new Uint8Array(M.colIndex.length).fill(1)),
    ...(kind === 'coo'
      ? { 'row.npy': index(rowsOf(M)), 'col.npy': index(M.colIndex) }
      : { 'indptr.npy': index(M.rowStart), 'indices.npy': index(M.colIndex) }),
  };
  if (damaged) {
    const names = Object.keys(members);
    const name = names[random.below(names.length)]!;
    members[name] = mutate(members[name]!, random);
  }
  return zipSync(members, { level: random.below(2) === 0 ? 0 : 6 });
}

/** The one array packed, as MATLAB saves it. */
function packedMat(plain: Uint8Array): Uint8Array {
  const packed = zlibSync(plain.subarray(128), { level: 6 });
  const bytes = new Uint8Array(136 + packed.length);
  bytes.set(plain.subarray(0, 128));
  bytes.set(ints([15, packed.length]), 128);
  bytes.set(packed, 136);
  return bytes;
}

interface Case {
  name: string;
  streamed(file: FileBytes): Held;
  /** Undefined when it does not know this kind of file. */
  whole(file: Uint8Array): Held | undefined;
  file(random: SeededRandom, damaged: boolean): Uint8Array;
}

const written = (format: string) => (random: SeededRandom, damaged: boolean) => {
  const bytes = exportMatrix(format === 'qc' ? anyCirculants(random) : anyMatrix(random, 20), format);
  return damaged ? mutate(bytes, random) : bytes;
};

function blocks(random: SeededRandom): BlockDesign {
  const H = anyMatrix(random, 20);
  const design = { v: H.cols, b: H.rows, blockStart: H.rowStart, blockPoints: H.colIndex };
  return random.below(2) === 0 ? design : { ...design, classes: Uint32Array.from({ length: H.rows }, (_, i) => i % 5) };
}

const cases: Case[] = [
  { name: 'json', streamed: (f) => importMatrix(f, 'json'), whole: wholeJson, file: written('json') },
  { name: 'c', streamed: (f) => importMatrix(f, 'c'), whole: wholeCHeader, file: written('c') },
  { name: 'qc', streamed: (f) => importMatrix(f, 'qc'), whole: wholeQuasiCyclic, file: written('qc') },
  { name: 'npy', streamed: (f) => importMatrix(f, 'npy'), whole: wholeNpy, file: written('npy') },
  { name: 'mat', streamed: (f) => importMatrix(f, 'mat'), whole: wholeMat, file: written('mat') },
  {
    name: 'mat, packed',
    streamed: (f) => importMatrix(f, 'mat'),
    whole: wholeMat,
    file: (random, damaged) => {
      const plain = exportMatrix(anyMatrix(random, 20), 'mat');
      return packedMat(damaged ? mutate(plain, random) : plain);
    },
  },
  {
    name: 'npz',
    streamed: (f) => importMatrix(f, 'npz'),
    whole: wholeNpz,
    file: (random, damaged) => anyNpz(anyMatrix(random, 20), random, damaged),
  },
  {
    name: 'blocks',
    streamed: readBlockListText,
    whole: wholeBlockListText,
    file: (random, damaged) => {
      const bytes = writeBlockListText(blocks(random));
      return damaged ? mutate(bytes, random) : bytes;
    },
  },
  {
    name: 'blocks-json',
    streamed: readBlockListJson,
    whole: wholeBlockListJson,
    file: (random, damaged) => {
      const bytes = writeBlockListJson(blocks(random));
      return damaged ? mutate(bytes, random) : bytes;
    },
  },
];

describe.each(cases.map((each) => [each.name, each] as const))(
  '%s read as a stream',
  (name, { streamed, whole, file }) => {
    const random = seededRandom(`streamed ${name}`);

    test('is what it is read as a whole', () => {
      for (let i = 0; i < 100; i++) {
        const bytes = file(random, false);
        const held = streamed(bytes);
        expect(held).toEqual(whole(bytes));
        expect(streamed(source(bytes, 20 + random.below(200)))).toEqual(held);
      }
    });

    // What the streaming reader refuses beyond that is said in its own tests: a key twice, a changed checksum.
    test('damaged, is either refused or what it is read as a whole; from memory as from a disk', () => {
      let read = 0;
      for (let i = 0; i < 1000; i++) {
        const bytes = file(random, true);
        const held = outcome(streamed, bytes);
        expect(outcome((f) => streamed(source(f, 20 + random.below(200))), bytes)).toEqual(held);
        if (held === null) continue;
        read++;
        const twin = outcome(whole, bytes);
        if (twin !== undefined) expect(held, new TextDecoder('latin1').decode(bytes)).toEqual(twin);
      }
      expect(read).toBeGreaterThan(0);
    });
  },
);
