import { expose } from 'comlink';
import { summariseUpload } from '@/core/codes/uploaded-sheet.ts';
import { readUpload } from '@/core/formats/read-upload.ts';
import { failureOf } from '../failure.ts';
import type { UploadApi } from './api.ts';

/** Of workers alone, whose types this project does not mix with the page's. */
declare class FileReaderSync {
  readAsArrayBuffer(blob: Blob): ArrayBuffer;
}

const api: UploadApi = {
  look(file, format) {
    const reader = new FileReaderSync();
    const source = {
      size: file.size,
      read(position: number, into: Uint8Array) {
        const part = new Uint8Array(reader.readAsArrayBuffer(file.slice(position, position + into.length)));
        into.set(part);
        return part.length;
      },
    };
    try {
      return { ok: true, summary: summariseUpload(readUpload(source, format)) };
    } catch (error) {
      return { ok: false, failure: failureOf(error) };
    }
  },
};
expose(api);
