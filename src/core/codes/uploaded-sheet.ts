import type { BlockDesign } from '../designs/block-design.ts';
import type { TimedCertificate } from '../designs/certify.ts';
import { certifyUpload } from '../designs/upload.ts';
import { ParamError } from '../errors.ts';
import type { Upload } from '../formats/read-upload.ts';
import type { UploadFormat } from '../formats/recognise.ts';
import { describeMatrix } from './describe-matrix.ts';
import { deriveLdpc, type LdpcCode } from './ldpc.ts';
import type { CodeSheet, SheetStep } from './sheet.ts';
import { type SparseMatrix, transpose } from './sparse-matrix.ts';

/** How a file is meant, as far as it cannot tell itself. */
export interface UploadRequest {
  /** Of a matrix: whether its rows or its columns are the parity checks. May be left out when it has more columns. */
  checksAre?: 'rows' | 'columns';
  /** Of a list of blocks: what the checks of the code are. */
  checks?: 'blocks' | 'points';
}

/** What can be said of a file at a glance. */
export type UploadSummary =
  | { format: UploadFormat; kind: 'matrix'; rows: number; cols: number; ones: number; tellsChecks: boolean }
  | { format: UploadFormat; kind: 'blocks'; points: number; blocks: number; incidences: number };

/** A sheet of a file's own: nothing predicted, a certificate only where it holds blocks. */
export interface UploadedSheet extends Omit<CodeSheet, 'certificate'> {
  format: UploadFormat;
  derivation: { kind: 'matrix'; checksAre: 'rows' | 'columns' } | { kind: 'ldpc'; checks: 'blocks' | 'points' };
  certificate: TimedCertificate | null;
}

export function summariseUpload(upload: Upload): UploadSummary {
  const { format } = upload;
  if ('design' in upload) {
    const { v, b, blockPoints } = upload.design;
    return { format, kind: 'blocks', points: v, blocks: b, incidences: blockPoints.length };
  }
  const { rows, cols, colIndex } = upload.matrix;
  return { format, kind: 'matrix', rows, cols, ones: colIndex.length, tellsChecks: rows < cols };
}

/** Analyses the code that a file holds.
 *  @throws ParamError naming what has to be said of the file that it does not say itself; LimitError on size. */
export function uploadedSheet(
  upload: Upload,
  request: UploadRequest,
  { clock, onStep }: { clock(): number; onStep?(step: SheetStep): void },
): UploadedSheet {
  const { format } = upload;
  if ('design' in upload) {
    onStep?.('verify');
    const from = clock();
    const { certificate, t, lambda } = certifyUpload(upload.design);
    const checks = request.checks ?? missing('checks', '"blocks" or "points": what one parity check stands for');
    onStep?.('derive');
    const code = deriveLdpc(upload.design, { checks });
    const designTitle = uploadedTitle(upload.design, t, lambda);
    const timed = { ...certificate, elapsedMs: clock() - from };
    onStep?.('analyse');
    return {
      ...describeMatrix(code, clock),
      format,
      designTitle,
      certificate: timed,
      derivation: { kind: 'ldpc', checks },
    };
  }
  const checksAre = request.checksAre ?? toldByShape(upload.matrix);
  const H = checksAre === 'rows' ? upload.matrix : transpose(upload.matrix);
  onStep?.('analyse');
  const designTitle = `Uploaded matrix, ${H.rows} × ${H.cols}`;
  const code: LdpcCode = { H, checks: 'blocks', transforms: [] };
  return {
    ...describeMatrix(code, clock),
    format,
    designTitle,
    certificate: null,
    derivation: { kind: 'matrix', checksAre },
  };
}

/** A parity-check matrix has no more checks than bits unless it repeats some: of two sizes the smaller is told to be the
 *  checks only when it is that of the rows, as every format here states. */
function toldByShape({ rows, cols }: SparseMatrix): 'rows' {
  if (rows < cols) return 'rows';
  const size = rows === cols ? 'is square' : 'has more rows than columns';
  return missing(
    'checksAre',
    `"rows" or "columns": the matrix, ${rows} × ${cols}, ${size}, so its shape does not tell`,
  );
}

function missing(param: string, accepted: string): never {
  throw new ParamError(param, undefined, accepted);
}

function uploadedTitle({ v, b, blockStart }: BlockDesign, t: number, lambda: number): string {
  if (t === 0) return `Uploaded blocks, ${b} on ${v} points`;
  return `Uploaded ${t}-(${v}, ${blockStart[1]}, ${lambda}) design`;
}
