import { bytesFrom, type FileBytes } from './byte-source.ts';

/** What a file can hold: a matrix in one of the formats, or the blocks of a design. Named here apart from their readers, so
 *  that a page which only names them does not fetch them all. */
export const uploadFormats = [
  'alist',
  'mtx',
  'csv',
  'json',
  'npz',
  'npy',
  'mat',
  'c',
  'qc',
  'blocks',
  'blocks-json',
] as const;

export type UploadFormat = (typeof uploadFormats)[number];

const LOOKED_AT = 4096;

/** The format that the first bytes of a file speak for; null when they speak for none. Its name does not count. */
export function recogniseFormat(file: FileBytes): UploadFormat | null {
  const head = bytesFrom(file, 0, LOOKED_AT);
  const latin = String.fromCharCode(...head.subarray(0, 160));
  if (latin.startsWith('PK\x03\x04')) return 'npz';
  if (latin.startsWith('\x93NUMPY')) return 'npy';
  // The version field of a level-5 file, after 124 bytes of text.
  if (head.length > 128 && (latin.slice(124, 128) === '\x00\x01IM' || latin.slice(124, 128) === '\x01\x00MI'))
    return 'mat';
  const text = new TextDecoder().decode(head).replace(/^\uFEFF/, '');
  return ofText(text);
}

function ofText(text: string): UploadFormat | null {
  const start = text.trimStart();
  if (/^%%matrixmarket/i.test(start)) return 'mtx';
  if (start.startsWith('{'))
    return /"onesByRow"|"columns"/.test(start) || !/"blocks"|"points"/.test(start) ? 'json' : 'blocks-json';
  if (/^\s*(\/\*|\/\/|#\s*(ifndef|define|include|pragma))/.test(start) || /#define\s+H_ROWS/.test(start)) return 'c';
  const lines = start.split(/\r\n|\n|\r/).map((line) => line.trim());
  const comments = lines.filter((line) => line.startsWith('#')).join(' ');
  const used = lines.filter((line) => line !== '' && !line.startsWith('#'));
  if (/\bpoints=\d/.test(comments)) return 'blocks';
  if (/^z=\d/.test(used[0] ?? '')) return 'qc';
  if (/^"?row"?\s*,\s*"?column/i.test(used[0] ?? '') || /\brows=\d/.test(comments)) return 'csv';
  return ofNumbers(used);
}

/** Lines of numbers alone: an alist begins with two sizes and two largest weights, and a block is no pair. */
function ofNumbers(lines: readonly string[]): UploadFormat | null {
  const numbers = lines.slice(0, 3).map((line) => line.split(/[\s,]+/).filter((word) => word !== ''));
  if (numbers.length === 0 || !numbers.flat().every((word) => /^\d+:?$/.test(word))) return null;
  const [sizes, most, weights] = numbers;
  const isAlist =
    sizes!.length === 2 &&
    most?.length === 2 &&
    (weights?.length ?? 0) > 0 &&
    weights!.every((weight) => Number(weight) <= Math.max(...most.map(Number)));
  return isAlist ? 'alist' : 'blocks';
}
