import type { CodeSheet, SheetRequest, SheetStep } from '@/core/codes/sheet.ts';
import type { StoredRequest, StoredSheet } from '@/core/codes/stored-sheet.ts';
import type { WorkerFailure } from '../failure.ts';

/** What came of a build: the code's sheet and its matrix's fingerprint. */
export type BuiltCode = (CodeSheet | StoredSheet) & { fingerprint: string };

/** A construction and how the code comes from it, or a matrix and the steps from it. */
export type BuildRequest = SheetRequest | StoredRequest;

export type BuildFailure = WorkerFailure;

export type BuildAnswer = { ok: true; built: BuiltCode } | { ok: false; failure: BuildFailure };

export interface BuildApi {
  build(request: BuildRequest, onStep: (step: SheetStep) => void): Promise<BuildAnswer>;
}
