import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { type BlockDesign, designFromBlocks } from '../designs/block-design.ts';
import { FormatError, LimitError } from '../errors.ts';
import { readAlist } from './alist.ts';
import { type BlockList, readBlockListText } from './block-list.ts';
import { readBlockListJson } from './block-list-json.ts';
import { allBytes, type FileBytes, sizeOf } from './byte-source.ts';
import { readCsv } from './csv.ts';
import { importMatrix } from './index.ts';
import { readMatrixMarket } from './matrix-market.ts';
import { recogniseFormat, type UploadFormat, uploadFormats } from './recognise.ts';

/** A file may have so many bytes; those of a format that is read as a whole, so many. */
export const uploadLimits = { bytes: 200_000_000, wholeBytes: 64_000_000 } as const;

/** Formats that are read where they lie, in little memory. */
const readInPlace: Partial<Record<UploadFormat, (file: FileBytes) => SparseMatrix>> = {
  alist: readAlist,
  mtx: readMatrixMarket,
  csv: readCsv,
};
/** Text whose reader holds it as a string several times over. */
const heldAsText: ReadonlySet<UploadFormat> = new Set(['json', 'blocks-json', 'c', 'qc']);

export type Upload = { format: UploadFormat; matrix: SparseMatrix } | { format: UploadFormat; design: BlockDesign };

/** What a file holds: a matrix, or the blocks of a design. Without a format the first bytes tell.
 *  @throws FormatError with line and column, or when no format is recognised; LimitError on size. */
export function readUpload(file: FileBytes, stated?: UploadFormat): Upload {
  refuseSize('file', sizeOf(file), uploadLimits.bytes);
  const format = stated ?? recogniseFormat(file);
  if (!format) throw new FormatError(1, 1, `a file in one of the formats ${uploadFormats.join(', ')}`, 'none of them');
  if (heldAsText.has(format)) refuseSize(`${format} file`, sizeOf(file), uploadLimits.wholeBytes);
  if (format === 'blocks') return { format, design: designOf(readBlockListText(file)) };
  if (format === 'blocks-json') return { format, design: designOf(readBlockListJson(allBytes(file))) };
  const matrix = readInPlace[format]?.(file) ?? importMatrix(allBytes(file), format);
  return { format, matrix };
}

const designOf = ({ v, blocks, classes }: BlockList): BlockDesign => designFromBlocks(v, blocks, { classes });

function refuseSize(what: string, size: number, limit: number): void {
  if (size > limit) throw new LimitError(what, size, limit, 'bytes');
}
