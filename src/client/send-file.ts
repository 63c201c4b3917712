import type { z } from 'zod';
import { type Endpoint, errorSchema } from '@/api/endpoint.ts';
import { ApiFailure, addressOf, type CallInput } from './api.ts';

/** Sends a file as a request's body and says how far it is, which `fetch` cannot.
 *  @param onSent Called with bytes sent and bytes in all.
 *  @throws ApiFailure when the server refuses or cannot be reached; AbortError when the signal fires. */
export function sendFile<E extends Endpoint>(
  endpoint: E,
  input: Pick<CallInput<E>, 'params' | 'query'> & { signal: AbortSignal },
  file: File,
  onSent: (sent: number, all: number) => void,
): Promise<z.output<E['response']>> {
  return new Promise((resolve, reject) => {
    const { signal } = input;
    const request = new XMLHttpRequest();
    request.open(endpoint.method, addressOf(endpoint, input));
    request.setRequestHeader('content-type', 'application/octet-stream');
    request.responseType = 'json';
    request.upload.onprogress = ({ loaded, total }) => onSent(loaded, total);
    request.onload = () => {
      if (request.status < 300) resolve(endpoint.response.parse(request.response) as z.output<E['response']>);
      else reject(failureOf(request));
    };
    request.onerror = () =>
      reject(new ApiFailure(0, 'unreachable', 'The server does not answer. Nothing was kept; try again in a moment.'));
    request.onabort = () => reject(signal.reason);
    signal.addEventListener('abort', () => request.abort(), { once: true });
    request.send(file);
  });
}

function failureOf({ status, response }: XMLHttpRequest): ApiFailure {
  const parsed = errorSchema.safeParse(response);
  if (!parsed.success) return new ApiFailure(status, 'unexpected', `The server answered ${status}.`);
  const { code, message, fields, reason, existing } = parsed.data.error;
  const more = existing ? ` It is code ${existing}.` : '';
  return new ApiFailure(status, code, `${message}${more}`, fields, reason);
}
