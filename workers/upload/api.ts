import type { UploadedSheet, UploadRequest, UploadSummary } from '@/core/codes/uploaded-sheet.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';
import type { WorkerFailure } from '../failure.ts';

/** A file on the server's disk, to be read as a code. */
export interface UploadTask extends UploadRequest {
  path: string;
  format?: UploadFormat;
}

export type UploadAnswer =
  | { ok: true; uploaded: UploadedSheet & { fingerprint: string } }
  | { ok: false; failure: WorkerFailure };

export type LookAnswer = { ok: true; summary: UploadSummary } | { ok: false; failure: WorkerFailure };

/** In the browser a file is only looked at: what it holds, or where it is wrong. */
export interface UploadApi {
  look(file: File, format: UploadFormat | undefined): LookAnswer;
}
