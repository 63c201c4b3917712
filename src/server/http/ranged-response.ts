import type { ByteRange } from '../files/file-storage.ts';
import { notFound } from '../refusal.ts';

export interface RangedFile {
  sizeBytes: number;
  /** Names the bytes for good, and so is the entity tag. */
  sha256: string;
  fileName: string;
  mediaType: string;
  open(range?: ByteRange): Promise<ReadableStream<Uint8Array> | undefined>;
}

/** A file that never changes, whole or in part, by RFC 9110: If-None-Match gives 304, Range gives 206 or 416, If-Range
 *  makes the range depend on the tag. Several ranges at once are answered with the whole, as §14.2 allows.
 *  @throws Refusal `not-found` when the store has lost the bytes. */
export async function rangedResponse(request: Request, file: RangedFile): Promise<Response> {
  const tag = `"${file.sha256}"`;
  const headers = new Headers({
    ETag: tag,
    'Accept-Ranges': 'bytes',
    'Content-Type': file.mediaType,
    'Content-Disposition': `attachment; filename="${file.fileName}"`,
    // Not transformed, or a compressed answer would no longer be the bytes that the tag and the ranges speak of.
    'Cache-Control': 'private, no-cache, no-transform',
  });
  if (namesTag(request.headers.get('if-none-match'), tag)) return new Response(null, { status: 304, headers });
  const range = wantedRange(request, tag, file.sizeBytes);
  if (range === 'unsatisfiable') {
    headers.set('Content-Range', `bytes */${file.sizeBytes}`);
    for (const name of ['Content-Type', 'Content-Disposition']) headers.delete(name);
    return new Response(null, { status: 416, headers });
  }
  if (range) headers.set('Content-Range', `bytes ${range.from}-${range.to}/${file.sizeBytes}`);
  headers.set('Content-Length', String(range ? range.to - range.from + 1 : file.sizeBytes));
  const status = range ? 206 : 200;
  if (request.method === 'HEAD') return new Response(null, { status, headers });
  const stream = await file.open(range);
  if (!stream) throw notFound('file');
  return new Response(stream, { status, headers });
}

/** Weak comparison, as If-None-Match wants it (RFC 9110 §13.1.2). */
function namesTag(field: string | null, tag: string): boolean {
  if (field === null) return false;
  return field.trim() === '*' || field.split(',').some((one) => one.trim().replace(/^W\//, '') === tag);
}

/** The one range asked for; undefined for the whole file, which also answers a field that cannot be read. */
function wantedRange(request: Request, tag: string, size: number): ByteRange | 'unsatisfiable' | undefined {
  const condition = request.headers.get('if-range');
  // Strong comparison; a date never matches, since the files are named by digest and carry no time.
  if (condition !== null && condition.trim() !== tag) return undefined;
  const [, first, last] = /^bytes\s*=\s*(\d*)\s*-\s*(\d*)\s*$/i.exec(request.headers.get('range') ?? '') ?? [];
  if (first === undefined || last === undefined || (first === '' && last === '')) return undefined;
  if (first === '') {
    const length = Math.min(Number(last), size);
    return length === 0 ? 'unsatisfiable' : { from: size - length, to: size - 1 };
  }
  const from = Number(first);
  if (last !== '' && Number(last) < from) return undefined;
  if (from >= size) return 'unsatisfiable';
  return { from, to: last === '' ? size - 1 : Math.min(Number(last), size - 1) };
}
