import type { Answer, ApiClient } from './api-client.ts';

/** Makes a token by a signed-in client. */
export async function makeToken(client: ApiClient, scopes: readonly string[], days = 7) {
  const { status, body } = await client.post('/account/tokens', { name: `for ${scopes.join(' ')}`, scopes, days });
  if (status !== 201) throw new Error(JSON.stringify(body));
  return body as { token: { id: string; ending: string; expiresAt: string }; secret: string };
}

/** A script's call: a token, no cookie, no Origin. */
export async function callByToken(
  base: string,
  secret: string,
  method: string,
  path: string,
  body?: unknown,
): Promise<Answer> {
  const response = await fetch(`${base}/api/v1${path}`, {
    method,
    headers: {
      authorization: `Bearer ${secret}`,
      ...(body !== undefined && { 'content-type': 'application/json' }),
    },
    ...(body !== undefined && { body: JSON.stringify(body) }),
  });
  // A stream of events has no end to wait for.
  if (response.headers.get('content-type')?.startsWith('text/event-stream')) {
    await response.body?.cancel();
    return { status: response.status, body: undefined, headers: response.headers };
  }
  const text = await response.text();
  const isJson = response.headers.get('content-type')?.startsWith('application/json');
  return { status: response.status, body: isJson ? JSON.parse(text) : text, headers: response.headers };
}
