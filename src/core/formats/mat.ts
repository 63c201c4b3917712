import { type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';
import { miDOUBLE, miINT8, miINT32, miMATRIX, miUINT32, mxSPARSE } from './mat-elements.ts';

/** A level-5 MAT file with one sparse array named H, in compressed columns (ir, jc, pr). Its 116 bytes of text carry no
 *  date, so that the same matrix has the same bytes. */
export function writeMat(H: SparseMatrix): Uint8Array {
  const columns = transpose(H);
  const ones = H.colIndex.length;
  const body = [
    element(miUINT32, words([mxSPARSE, Math.max(1, ones)])),
    element(miINT32, words([H.rows, H.cols])),
    element(miINT8, new TextEncoder().encode('H')),
    element(miINT32, words(ones === 0 ? [0] : columns.colIndex)),
    element(miINT32, words(columns.rowStart)),
    element(miDOUBLE, new Uint8Array(new Float64Array(ones).fill(1).buffer)),
  ];
  const size = body.reduce((sum, part) => sum + part.length, 0);
  const bytes = new Uint8Array(128 + 8 + size);
  bytes.set(new TextEncoder().encode('MATLAB 5.0 MAT-file, a sparse parity-check matrix H'.padEnd(124)));
  const view = new DataView(bytes.buffer);
  view.setUint16(124, 0x0100, true);
  view.setUint16(126, 0x4d49, true);
  view.setUint32(128, miMATRIX, true);
  view.setUint32(132, size, true);
  let at = 136;
  for (const part of body) {
    bytes.set(part, at);
    at += part.length;
  }
  return bytes;
}

const words = (values: ArrayLike<number>) => new Uint8Array(Int32Array.from(values).buffer);

/** Tag and data, padded to eight bytes. */
function element(type: number, data: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(8 + Math.ceil(data.length / 8) * 8);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, type, true);
  view.setUint32(4, data.length, true);
  bytes.set(data, 8);
  return bytes;
}
