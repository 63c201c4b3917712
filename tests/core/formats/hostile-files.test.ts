import { unzipSync, zipSync, zlibSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { FormatError, LimitError } from '@/core/errors.ts';
import { exportMatrix, importMatrix } from '@/core/formats/index.ts';
import { encodeNpy } from '@/core/formats/npy.ts';
import { readUpload } from '@/core/formats/read-upload.ts';
import { quasiCyclicPlane as H } from '../../models/quasi-cyclic-plane.ts';

const text = (of: string) => new TextEncoder().encode(of);
const small = { rows: 2, cols: 3, rowStart: Uint32Array.of(0, 2, 3), colIndex: Uint32Array.of(0, 2, 1) };
const written = (format: string) => new TextDecoder().decode(exportMatrix(small, format));

describe('an archive', () => {
  test('whose member claims to unpack beyond the limits is refused before it is unpacked', () => {
    const bytes = zipSync({ 'data.npy': new Uint8Array(1000) }, { level: 9 });
    // The size after unpacking, in the local header and in the central directory: said to be 2 GB.
    const view = new DataView(bytes.buffer);
    for (let at = 0; at + 4 <= bytes.length; at++) {
      const mark = view.getUint32(at, true);
      if (mark === 0x04034b50) view.setUint32(at + 22, 2_000_000_000, true);
      if (mark === 0x02014b50) view.setUint32(at + 24, 2_000_000_000, true);
    }
    expect(() => importMatrix(bytes, 'npz')).toThrow(LimitError);
  });

  test('of zeros packed a thousand to one is refused by what its arrays say, in little time', () => {
    const huge = encodeNpy({
      shape: [20_000_000],
      descr: '|i1',
      fortranOrder: false,
      data: new Uint8Array(20_000_000),
    });
    const bytes = zipSync({ 'data.npy': huge, 'format.npy': huge, 'shape.npy': huge }, { level: 9 });
    expect(bytes.length).toBeLessThan(100_000);
    expect(() => importMatrix(bytes, 'npz')).toThrow(FormatError);
  });

  /** A level-5 file of one compressed element. */
  const packedElement = (content: Uint8Array) => {
    const packed = zlibSync(content, { level: 9 });
    const bytes = new Uint8Array(136 + packed.length);
    bytes.set(exportMatrix(H, 'mat').subarray(0, 128));
    new DataView(bytes.buffer).setUint32(128, 15, true);
    new DataView(bytes.buffer).setUint32(132, packed.length, true);
    bytes.set(packed, 136);
    expect(bytes.length).toBeLessThan(1_000_000);
    return bytes;
  };

  test('of one array that unpacks a thousandfold is refused at the limit', () => {
    // The sound array, but for its row indices, which are sixty million bytes of zeros.
    const sound = exportMatrix(H, 'mat').subarray(128);
    const view = new DataView(sound.buffer, sound.byteOffset, sound.length);
    const rows = 8 + 16 + 16 + 16;
    expect([view.getUint32(rows, true), view.getUint32(rows + 4, true)]).toEqual([5, 4 * H.colIndex.length]);
    const bomb = new Uint8Array(60_000_000);
    bomb.set(sound.subarray(0, rows + 8));
    new DataView(bomb.buffer).setUint32(4, bomb.length - 8, true);
    new DataView(bomb.buffer).setUint32(rows + 4, bomb.length - 1000, true);
    const bytes = packedElement(bomb);
    const before = process.cpuUsage();
    expect(() => importMatrix(bytes, 'mat')).toThrow(LimitError);
    expect(process.cpuUsage(before).user).toBeLessThan(1_000_000);
  });

  test('of one element of zeros has no array, which takes no unpacking to see', () => {
    const bytes = packedElement(new Uint8Array(60_000_000));
    const before = process.cpuUsage();
    expect(() => importMatrix(bytes, 'mat')).toThrow(/a sparse array/);
    expect(process.cpuUsage(before).user).toBeLessThan(100_000);
  });

  test('whose bytes were altered is refused by the checksum in its directory', () => {
    const bytes = exportMatrix(H, 'npz');
    const stored = zipSync(unzipSync(bytes), { level: 0 });
    const view = new DataView(stored.buffer, stored.byteOffset, stored.length);
    // Behind the first member's header of 30 bytes, its name, and an .npy header of 128 bytes: the first column.
    const first = 30 + view.getUint16(26, true) + view.getUint16(28, true) + 128;
    expect(importMatrix(stored, 'npz')).toEqual(H);
    stored[first]! ^= 1;
    expect(() => importMatrix(stored, 'npz')).toThrow(/indices.npy as its CRC-32 says/);
  });

  test('that ends within a member, or says more than it holds, is refused', () => {
    const whole = exportMatrix(H, 'npz');
    expect(() => importMatrix(whole.subarray(0, whole.length - 30), 'npz')).toThrow(FormatError);
    const members = unzipSync(whole);
    const short = { ...members, 'data.npy': members['data.npy']!.subarray(0, -1) };
    expect(() => importMatrix(zipSync(short), 'npz')).toThrow(/data.npy: \d+ numbers/);
    const long = { ...members, 'data.npy': Uint8Array.of(...members['data.npy']!, 1) };
    expect(() => importMatrix(zipSync(long), 'npz')).toThrow(/data.npy: \d+ numbers, found more/);
  });

  test('with a torn array of numbers is refused', () => {
    const bytes = exportMatrix(H, 'mat');
    // The size of the last element, the values, less seven: its last number is torn.
    const values = bytes.length - 8 * H.colIndex.length - 4;
    const view = new DataView(bytes.buffer);
    view.setUint32(values, view.getUint32(values, true) - 7, true);
    expect(() => importMatrix(bytes, 'mat')).toThrow(FormatError);
  });

  test('of a one that stands twice is refused, since over GF(2) two ones cancel', () => {
    const ints = (values: number[]) => new Uint8Array(Int32Array.from(values).buffer);
    const vector = (values: number[]) =>
      encodeNpy({ shape: [values.length], descr: '<i4', fortranOrder: false, data: ints(values) });
    const named = (kind: string) => encodeNpy({ shape: [], descr: '|S3', fortranOrder: false, data: text(kind) });
    const shared = { 'shape.npy': vector([2, 3]), 'data.npy': vector([1, 1, 1]) };
    const archives: Record<string, Uint8Array>[] = [
      { 'format.npy': named('csr'), 'indptr.npy': vector([0, 2, 3]), 'indices.npy': vector([1, 1, 0]) },
      { 'format.npy': named('csc'), 'indptr.npy': vector([0, 2, 3, 3]), 'indices.npy': vector([1, 1, 0]) },
      { 'format.npy': named('coo'), 'row.npy': vector([0, 1, 0]), 'col.npy': vector([1, 0, 1]) },
    ];
    for (const members of archives)
      expect(() => importMatrix(zipSync({ ...shared, ...members }), 'npz')).toThrow(/row \d, column \d twice/);
    const doubled = exportMatrix(small, 'mat');
    const rows = 128 + 8 + 8 + 16 + 16 + 16;
    // Column 2 has row 0 and column 1 row 1: both ones into one column.
    const view = new DataView(doubled.buffer);
    expect([0, 1, 2].map((i) => view.getInt32(rows + 4 * i, true))).toEqual([0, 1, 0]);
    expect([0, 1, 2, 3].map((i) => view.getInt32(rows + 24 + 4 * i, true))).toEqual([0, 1, 2, 3]);
    view.setInt32(rows + 8, 1, true);
    view.setInt32(rows + 24 + 8, 1, true);
    expect(() => importMatrix(doubled, 'mat')).toThrow(/row 2, column 3 twice/);
  });

  test('that is encrypted, packed otherwise, or has a member twice is refused by name', () => {
    const changed = (at: number, value: number) => {
      const bytes = exportMatrix(H, 'npz').slice();
      const view = new DataView(bytes.buffer);
      for (let i = 0; i + 46 <= bytes.length; i++)
        if (view.getUint32(i, true) === 0x02014b50) view.setUint16(i + at, value, true);
      return bytes;
    };
    expect(() => importMatrix(changed(8, 1), 'npz')).toThrow(/indices.npy stored or deflated/);
    expect(() => importMatrix(changed(10, 12), 'npz')).toThrow(/indices.npy stored or deflated/);
    const twice = zipSync({ 'data.npy': text('x'), 'dato.npy': text('x') }, { level: 0 });
    for (let i = 0; i + 8 <= twice.length; i++)
      if (twice[i] === 0x64 && twice[i + 3] === 0x6f && twice[i + 4] === 0x2e) twice[i + 3] = 0x61;
    expect(() => importMatrix(twice, 'npz')).toThrow(/data.npy once/);
  });

  test('with names that lead out of a folder has them passed over', () => {
    const bytes = zipSync({ '../../etc/passwd': text('x'), '/absolute.npy': text('x'), 'C:\\data.npy': text('x') });
    expect(() => importMatrix(bytes, 'npz')).toThrow(/member/);
  });
});

describe('a text file', () => {
  test.each(['alist', 'mtx', 'csv'])(
    '%s is the same with CRLF, CR, a byte order mark and no last newline',
    (format) => {
      const plain = written(format);
      for (const changed of [
        plain.replaceAll('\n', '\r\n'),
        plain.replaceAll('\n', '\r'),
        `\uFEFF${plain}`,
        plain.trimEnd(),
      ])
        expect(importMatrix(text(changed), format)).toEqual(small);
    },
  );

  test.each([
    ['alist', '3 2\n1 2\n1 1 1\n2 1\n1\n2\n1\n1 3\n1\n', /line/],
    ['mtx', '%%MatrixMarket matrix coordinate pattern general\n2 3 1\n0 1\n', /count from 1/],
    ['csv', '# rows=2 columns=3 counted-from=0\nrow,column\n2,0\n', /count from 0/],
    ['csv', 'row,column\n1,1\n2,3\n', /start of counting cannot be told/],
  ])('%s that counts from the other end is told so', (format, wrong, message) => {
    expect(() => importMatrix(text(wrong), format)).toThrow(message);
  });

  test.each([
    ['mtx', '%%MatrixMarket matrix coordinate pattern general\n2 3 2\n1 1\n1 1\n'],
    ['csv', '# rows=2 columns=3 counted-from=0\nrow,column\n0,1\n0,1\n'],
    ['json', '{"rows":1,"columns":3,"onesByRow":[[1,1]]}'],
    ['alist', '2 1\n1 2\n1 1\n2\n1\n1\n1 1\n'],
    ['qc', 'z=3 block-rows=1 block-columns=2\n0 1+1\n'],
  ])('%s with a one twice is refused, since over GF(2) two ones cancel', (format, doubled) => {
    expect(() => importMatrix(text(doubled), format)).toThrow(FormatError);
  });

  test.each(['alist', 'mtx', 'csv', 'json', 'c', 'qc'])('%s with NUL bytes is refused with the place', (format) => {
    const bytes = exportMatrix(H, format);
    bytes.fill(0, Math.floor(bytes.length / 2), Math.floor(bytes.length / 2) + 3);
    expect(() => importMatrix(bytes, format)).toThrow(/line \d+/);
  });

  test.each([
    ['{"columns": 3, "onesByRow": [[0]], "columns": 4}', /line 1.*"columns" once/],
    ['{"columns": 3,\n"onesByRow": [[0, 01]]}', /line 2, column 20.*whole numbers/],
    ['{"columns": 3,\n"onesByRow": [[0, -1]]}', /line 2.*whole numbers/],
    ['{"columns": 3,\n"onesByRow": [[0, 1.5]]}', /line 2.*whole numbers/],
    ['{"columns": 3,\n"onesByRow": [[3]]}', /line 2.*columns up to 2/],
    ['{"columns": 3, "countedFrom": 1,\n"onesByRow": [[0]]}', /line 2.*columns from 1/],
    ['{"columns": 3, "rows": 2, "onesByRow": [[0]]}', /"rows" to be 1/],
    ['{"columns": 3, "onesByRow": [[0]]} x', /the end of the file/],
    ['{"columns": 3, "onesByRow": [[0]]', /"}"/],
    ['{"note": "a\\q", "columns": 3, "onesByRow": [[0]]}', /escape/],
    [`{"note": ${'['.repeat(600)}${']'.repeat(600)}, "columns": 3, "onesByRow": [[0]]}`, /at most 500/],
  ])('of JSON says where it is wrong: %.60s', (wrong, message) => {
    expect(() => importMatrix(text(wrong), 'json')).toThrow(message);
  });

  test('of JSON may have its keys in any order, with others between', () => {
    const file =
      '{"a": {"b": [1e3, true, null, "\\u0041\\"", {}]}, "onesByRow": [[2,1],\n[3]], "countedFrom": 1, "columns": 3}';
    expect(importMatrix(text(file), 'json')).toEqual({
      rows: 2,
      cols: 3,
      rowStart: Uint32Array.of(0, 2, 3),
      colIndex: Uint32Array.of(0, 1, 2),
    });
  });

  test('of C may have comments anywhere, and is refused when its tables were altered', () => {
    const header = written('c').replace('{\n  0, 2, 3', '{ /* starts */\n  0, // first\n 2, 3 /* last */');
    expect(importMatrix(text(header), 'c')).toEqual(small);
    expect(() => importMatrix(text(written('c').replace('0, 2, 1', '0, 1, 1')), 'c')).toThrow(/checksum/);
    expect(() => importMatrix(text(written('c').replace('0, 2, 1', '0, 2')), 'c')).toThrow(/3 entries in H_COL_INDEX/);
    expect(() => importMatrix(text(`${written('c')}/* never closed`), 'c')).toThrow(/end of the comment/);
  });

  test('of one endless line is refused in little memory', () => {
    const size = 150_000_000;
    const source = {
      size,
      read(position: number, into: Uint8Array) {
        const count = Math.max(0, Math.min(into.length, size - position));
        into.fill(65, 0, count);
        return count;
      },
    };
    const from = performance.now();
    expect(() => readUpload(source, 'alist')).toThrow(FormatError);
    expect(() => readUpload(source)).toThrow(/formats/);
    expect(performance.now() - from).toBeLessThan(5000);
  });
});
