import { Refusal } from '../refusal.ts';

/** The JSON body of a request, read no further than the limit.
 *  @throws Refusal `media-type`, `too-large` or `invalid`. */
export async function readJson(request: Request, limitBytes: number): Promise<unknown> {
  const mediaType = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase();
  if (mediaType !== 'application/json') {
    throw new Refusal('media-type', 'The body must be JSON, with Content-Type: application/json.');
  }
  const text = new TextDecoder().decode(await readBytes(request, limitBytes));
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new Refusal('invalid', `The body is not JSON: ${(error as Error).message}.`);
  }
}

async function readBytes(request: Request, limitBytes: number): Promise<Uint8Array> {
  const tooLarge = () => new Refusal('too-large', `The body may have at most ${limitBytes} bytes.`);
  if (Number(request.headers.get('content-length') ?? 0) > limitBytes) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let size = 0;
  if (request.body) {
    // Breaking out of the loop cancels the stream, so the rest is never held.
    for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
      size += chunk.length;
      if (size > limitBytes) throw tooLarge();
      chunks.push(chunk);
    }
  }
  return Buffer.concat(chunks);
}
