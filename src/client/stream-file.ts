import type { Endpoint } from '@/api/endpoint.ts';
import { ApiFailure, addressOf, type CallInput, failureFrom } from './api.ts';

/** Fetches a file as it is made, telling of every part as it comes.
 *  @throws ApiFailure when the server refuses, cannot be reached, or breaks off; AbortError when the signal fires. */
export async function streamFile<E extends Endpoint>(
  endpoint: E,
  input: CallInput<E>,
  onPart: (part: Uint8Array) => void,
): Promise<{ blob: Blob; fileName: string }> {
  try {
    const response = await fetch(addressOf(endpoint, input), { signal: input.signal ?? null });
    if (!response.ok) throw await failureFrom(response);
    const parts: Uint8Array<ArrayBuffer>[] = [];
    const reader = response.body!.getReader();
    for (let read = await reader.read(); !read.done; read = await reader.read()) {
      parts.push(read.value);
      onPart(read.value);
    }
    const [, fileName = 'file'] = /filename="([^"]+)"/.exec(response.headers.get('content-disposition') ?? '') ?? [];
    return { blob: new Blob(parts, { type: response.headers.get('content-type') ?? '' }), fileName };
  } catch (error) {
    if (error instanceof ApiFailure || (error instanceof DOMException && error.name === 'AbortError')) throw error;
    throw new ApiFailure(0, 'unreachable', 'The file broke off on the way; try again.');
  }
}
