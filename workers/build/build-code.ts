import { fingerprint, wordsFingerprint } from '@/core/codes/fingerprint.ts';
import { codeSheet, type SheetRequest, type SheetStep } from '@/core/codes/sheet.ts';
import { failureOf } from '../failure.ts';
import type { BuildAnswer } from './api.ts';

/** Builds, verifies and analyses; an engine error comes back as data. */
export async function buildCode(request: SheetRequest, onStep: (step: SheetStep) => void): Promise<BuildAnswer> {
  try {
    const sheet = codeSheet(request, { clock: () => performance.now(), onStep });
    const digest = request.derivation.kind === 'constant-weight' ? wordsFingerprint : fingerprint;
    return { ok: true, built: { ...sheet, fingerprint: await digest(sheet.H) } };
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  }
}
