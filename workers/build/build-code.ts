import { fingerprint, wordsFingerprint } from '@/core/codes/fingerprint.ts';
import { codeSheet, type SheetStep } from '@/core/codes/sheet.ts';
import { storedSheet } from '@/core/codes/stored-sheet.ts';
import { failureOf } from '../failure.ts';
import type { BuildAnswer, BuildRequest } from './api.ts';

/** Builds, verifies and analyses; an engine error comes back as data. */
export async function buildCode(request: BuildRequest, onStep: (step: SheetStep) => void): Promise<BuildAnswer> {
  try {
    const options = { clock: () => performance.now(), onStep };
    if ('matrix' in request) {
      const sheet = storedSheet(request, options);
      return { ok: true, built: { ...sheet, fingerprint: await fingerprint(sheet.H) } };
    }
    const sheet = codeSheet(request, options);
    const digest = request.derivation.kind === 'constant-weight' ? wordsFingerprint : fingerprint;
    return { ok: true, built: { ...sheet, fingerprint: await digest(sheet.H) } };
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  }
}
