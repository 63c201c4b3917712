import type { CodeSheet, SheetRequest, SheetStep } from '@/core/codes/sheet.ts';

/** What came of a build: the code's sheet and its matrix's fingerprint. */
export interface BuiltCode extends CodeSheet {
  fingerprint: string;
}

/** An engine error as data, since classes do not cross a worker's border. */
export interface BuildFailure {
  code: string;
  message: string;
  data: Record<string, unknown>;
}

export type BuildAnswer = { ok: true; built: BuiltCode } | { ok: false; failure: BuildFailure };

export interface BuildApi {
  build(request: SheetRequest, onStep: (step: SheetStep) => void): Promise<BuildAnswer>;
}
