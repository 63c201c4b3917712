import type { CodeSheet, SheetRequest, SheetStep } from '@/core/codes/sheet.ts';
import type { WorkerFailure } from '../failure.ts';

/** What came of a build: the code's sheet and its matrix's fingerprint. */
export interface BuiltCode extends CodeSheet {
  fingerprint: string;
}

export type BuildFailure = WorkerFailure;

export type BuildAnswer = { ok: true; built: BuiltCode } | { ok: false; failure: BuildFailure };

export interface BuildApi {
  build(request: SheetRequest, onStep: (step: SheetStep) => void): Promise<BuildAnswer>;
}
