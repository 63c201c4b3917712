import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { parentPort } from 'node:worker_threads';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { uploadedSheet } from '@/core/codes/uploaded-sheet.ts';
import { readUpload } from '@/core/formats/read-upload.ts';
import { failureOf } from '../failure.ts';
import type { UploadAnswer, UploadTask } from './api.ts';

// One file a message, read where it lies; the answer goes back with the request's id.
parentPort?.on('message', async ({ id, request }: { id: number; request: UploadTask }) => {
  parentPort?.postMessage({ id, answer: await answerOf(request) });
});

async function answerOf({ path, format, ...meant }: UploadTask): Promise<UploadAnswer> {
  const file = openSync(path, 'r');
  try {
    const source = {
      size: fstatSync(file).size,
      read: (position: number, into: Uint8Array) => readSync(file, into, 0, into.length, position),
    };
    const sheet = uploadedSheet(readUpload(source, format), meant, { clock: () => performance.now() });
    return { ok: true, uploaded: { ...sheet, fingerprint: await fingerprint(sheet.H) } };
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  } finally {
    closeSync(file);
  }
}
