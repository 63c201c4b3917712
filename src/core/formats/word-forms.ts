import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { writeWordListCsv, writeWordListText } from './word-list.ts';

/** One way to list the words of a constant-weight code, which come as the rows of a matrix. */
export interface WordForm {
  id: 'text' | 'csv';
  title: string;
  extension: string;
  mediaType: string;
  write(words: SparseMatrix): Uint8Array;
}

const listOf = ({ rows: M, cols: n, colIndex: ones }: SparseMatrix) => ({
  n,
  w: M === 0 ? 0 : ones.length / M,
  M,
  ones,
});

export const wordForms: readonly WordForm[] = [
  {
    id: 'text',
    title: 'word list',
    extension: 'txt',
    mediaType: 'text/plain',
    write: (words) => writeWordListText(listOf(words)),
  },
  {
    id: 'csv',
    title: 'word list, CSV',
    extension: 'csv',
    mediaType: 'text/csv',
    write: (words) => writeWordListCsv(listOf(words)),
  },
];
