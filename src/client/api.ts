import type { z } from 'zod';
import { type ApiError, type Endpoint, errorSchema } from '@/api/endpoint.ts';

/** A request the server refused, or that never reached it (`status` 0). */
export class ApiFailure extends Error {
  override readonly name = 'ApiFailure';
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly fields: Readonly<Record<string, string>> = {},
    readonly reason?: ApiError['reason'],
  ) {
    super(message);
  }

  /** Worth trying again unchanged: nothing answered, or the server could not write just now. */
  get passing(): boolean {
    return this.status === 0 || this.status === 429 || this.status >= 500;
  }
}

export interface CallInput<E extends Endpoint> {
  params?: Readonly<Record<string, string>>;
  query?: z.input<E['query']>;
  body?: z.input<E['body']>;
  signal?: AbortSignal;
}

/** The address of an endpoint with its path parameters and query filled in; also the key of its cached answer. */
export function addressOf<E extends Endpoint>(endpoint: E, input: Pick<CallInput<E>, 'params' | 'query'> = {}): string {
  const path = endpoint.path.replace(/:([a-z]\w*)/gi, (_, name: string) => {
    const value = input.params?.[name];
    if (!value) throw new Error(`${endpoint.path} needs ${name}`);
    return encodeURIComponent(value);
  });
  const query = new URLSearchParams();
  for (const [key, value] of Object.entries((input.query ?? {}) as Record<string, unknown>)) {
    if (value !== undefined) query.set(key, String(value));
  }
  const text = query.toString();
  return `/api/v1${path}${text ? `?${text}` : ''}`;
}

/** Sends a request and checks the answer against the endpoint's schema.
 *  @throws ApiFailure when the server refuses or cannot be reached; AbortError when the signal fires. */
export async function call<E extends Endpoint>(
  endpoint: E,
  input: CallInput<E> = {},
): Promise<z.output<E['response']>> {
  const response = await send(endpoint, input);
  if (!response.ok) throw await failureFrom(response);
  if (response.status === 204) return undefined as z.output<E['response']>;
  return endpoint.response.parse(await response.json()) as z.output<E['response']>;
}

async function send<E extends Endpoint>(endpoint: E, input: CallInput<E>): Promise<Response> {
  try {
    return await fetch(addressOf(endpoint, input), {
      method: endpoint.method,
      headers: input.body === undefined ? {} : { 'content-type': 'application/json' },
      body: input.body === undefined ? undefined : JSON.stringify(input.body),
      signal: input.signal ?? null,
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ApiFailure(0, 'unreachable', 'The server does not answer. Nothing is lost; try again in a moment.');
  }
}

export async function failureFrom(response: Response): Promise<ApiFailure> {
  const parsed = errorSchema.safeParse(await response.json().catch(() => null));
  if (!parsed.success) return new ApiFailure(response.status, 'unexpected', `The server answered ${response.status}.`);
  const { code, message, fields, reason } = parsed.data.error;
  return new ApiFailure(response.status, code, message, fields, reason);
}
