import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { ParamError } from '../errors.ts';
import { readAlist, writeAlist } from './alist.ts';
import type { FileBytes } from './byte-source.ts';
import { writeCHeader } from './c-header.ts';
import { readCHeader } from './c-header-read.ts';
import { readCsv, writeCsv } from './csv.ts';
import { readJson, writeJson } from './json.ts';
import { writeMat } from './mat.ts';
import { readMat } from './mat-read.ts';
import { readMatrixMarket, writeMatrixMarket } from './matrix-market.ts';
import { maxDenseCells, readNpy, writeNpy } from './npy.ts';
import { readNpz, writeNpz } from './npz.ts';
import { circulantBlockSize, writeQuasiCyclic } from './quasi-cyclic.ts';
import { readQuasiCyclic } from './quasi-cyclic-read.ts';

/** One file format of a parity-check matrix, both ways. */
export interface MatrixFormatCodec {
  id: string;
  title: string;
  extension: string;
  mediaType: string;
  /** Whether this matrix can be written so; left out when every matrix can. */
  writes?(H: SparseMatrix): boolean;
  write(H: SparseMatrix): Uint8Array;
  /** From a file in memory, or from one that is read piece by piece where it lies. */
  read(file: FileBytes): SparseMatrix;
}

/** Every format, in the order shown. A format is added by one file here and one entry below. */
export const matrixFormats: readonly MatrixFormatCodec[] = [
  { id: 'alist', title: 'alist', extension: 'alist', mediaType: 'text/plain', write: writeAlist, read: readAlist },
  {
    id: 'mtx',
    title: 'Matrix Market',
    extension: 'mtx',
    mediaType: 'text/plain',
    write: writeMatrixMarket,
    read: readMatrixMarket,
  },
  {
    id: 'csv',
    title: 'CSV of row and column',
    extension: 'csv',
    mediaType: 'text/csv',
    write: writeCsv,
    read: readCsv,
  },
  {
    id: 'json',
    title: 'JSON',
    extension: 'json',
    mediaType: 'application/json',
    write: (H) => writeJson(H),
    read: readJson,
  },
  {
    id: 'npz',
    title: 'SciPy sparse .npz',
    extension: 'npz',
    mediaType: 'application/zip',
    write: writeNpz,
    read: readNpz,
  },
  {
    id: 'npy',
    title: 'NumPy dense .npy',
    extension: 'npy',
    mediaType: 'application/octet-stream',
    writes: (H) => H.rows * H.cols <= maxDenseCells,
    write: writeNpy,
    read: readNpy,
  },
  {
    id: 'mat',
    title: 'MATLAB level-5 sparse .mat',
    extension: 'mat',
    mediaType: 'application/octet-stream',
    write: writeMat,
    read: readMat,
  },
  { id: 'c', title: 'C header', extension: 'h', mediaType: 'text/x-c', write: writeCHeader, read: readCHeader },
  {
    id: 'qc',
    title: 'quasi-cyclic shift table',
    extension: 'qc.txt',
    mediaType: 'text/plain',
    writes: (H) => circulantBlockSize(H) !== null,
    write: writeQuasiCyclic,
    read: readQuasiCyclic,
  },
];

export function matrixFormat(id: string): MatrixFormatCodec {
  const format = matrixFormats.find((f) => f.id === id);
  if (!format) throw new ParamError('format', id, `one of ${matrixFormats.map((f) => f.id).join(', ')}`);
  return format;
}

/** The matrix as a file. @throws ParamError on an unknown format. */
export const exportMatrix = (H: SparseMatrix, format: string): Uint8Array => matrixFormat(format).write(H);

/** The matrix out of a file. @throws ParamError on an unknown format, FormatError with the place of what is wrong,
 *  LimitError on a size that passes what is read here. */
export const importMatrix = (file: FileBytes, format: string): SparseMatrix => matrixFormat(format).read(file);
