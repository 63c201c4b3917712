import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { BlockDesign } from '../designs/block-design.ts';
import { FormatError, LimitError } from '../errors.ts';
import { readBlockListText } from './block-list.ts';
import { readBlockListJson } from './block-list-json.ts';
import { type FileBytes, sizeOf } from './byte-source.ts';
import { importMatrix } from './index.ts';
import { recogniseFormat, type UploadFormat, uploadFormats } from './recognise.ts';

/** A file may have so many bytes, in every format. */
export const uploadLimits = { bytes: 200_000_000 } as const;

export type Upload = { format: UploadFormat; matrix: SparseMatrix } | { format: UploadFormat; design: BlockDesign };

/** What a file holds: a matrix, or the blocks of a design. Without a format the first bytes tell. It is read where it lies:
 *  beside what it holds, a few megabytes are in memory.
 *  @throws FormatError with line and column, or when no format is recognised; LimitError on size. */
export function readUpload(file: FileBytes, stated?: UploadFormat): Upload {
  const size = sizeOf(file);
  if (size > uploadLimits.bytes) throw new LimitError('file', size, uploadLimits.bytes, 'bytes');
  const format = stated ?? recogniseFormat(file);
  if (!format) throw new FormatError(1, 1, `a file in one of the formats ${uploadFormats.join(', ')}`, 'none of them');
  if (format === 'blocks') return { format, design: readBlockListText(file) };
  if (format === 'blocks-json') return { format, design: readBlockListJson(file) };
  return { format, matrix: importMatrix(file, format) };
}
