/** A file for keeping. Names are made of letters, digits and hyphens (use-cases/codes/file-stem.ts), so that they need
 *  no quoting rules. */
export function fileResponse(file: { bytes: Uint8Array; fileName: string; mediaType: string }): Response {
  return new Response(Buffer.from(file.bytes), {
    headers: {
      'Content-Type': file.mediaType,
      'Content-Length': String(file.bytes.length),
      'Content-Disposition': `attachment; filename="${file.fileName}"`,
      'Cache-Control': 'private, no-cache',
    },
  });
}

/** The same for a file that is still being made, so that its size is not known. */
export function streamResponse(file: {
  stream: ReadableStream<Uint8Array>;
  fileName: string;
  mediaType: string;
}): Response {
  return new Response(file.stream, {
    headers: {
      'Content-Type': file.mediaType,
      'Content-Disposition': `attachment; filename="${file.fileName}"`,
      'Cache-Control': 'private, no-cache',
    },
  });
}
