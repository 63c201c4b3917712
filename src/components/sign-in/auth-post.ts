/** Posts to one of the authentication routes with its anti-forgery token. Answers with the address to go to next;
 *  a refusal is named in that address. */
async function postAuth(route: string, fields: Record<string, string>): Promise<URL> {
  const token = await fetch('/api/auth/csrf');
  if (!token.ok) throw new Error(`auth csrf: ${token.status}`);
  const { csrfToken } = (await token.json()) as { csrfToken: string };
  const answer = await fetch(`/api/auth/${route}`, {
    method: 'POST',
    headers: { 'X-Auth-Return-Redirect': '1' },
    body: new URLSearchParams({ ...fields, csrfToken }),
  });
  const body: unknown = await answer.json().catch(() => null);
  const url = typeof body === 'object' && body !== null && 'url' in body ? body.url : null;
  if (typeof url !== 'string') throw new Error(`auth ${route}: ${answer.status}`);
  return new URL(url, location.origin);
}

export type SignInOutcome =
  | { ok: true; next: string }
  | { ok: false; reason: 'refused' | 'unreachable' }
  | { ok: false; reason: 'slow-down'; waitSeconds: number };

/** Signs in with e-mail and password; why a pair was refused is never told apart. */
export async function signIn(email: string, password: string, next: string): Promise<SignInOutcome> {
  try {
    const url = await postAuth('callback/credentials', { email, password, callbackUrl: next });
    if (!url.searchParams.has('error')) return { ok: true, next: url.pathname + url.search };
    return outcomeFrom(url.searchParams);
  } catch {
    return { ok: false, reason: 'unreachable' };
  }
}

/** Reads a refusal out of an address: ?error=…&code=slow-down-20. */
export function outcomeFrom(search: URLSearchParams): Exclude<SignInOutcome, { ok: true }> {
  const wait = /^slow-down-(\d+)$/.exec(search.get('code') ?? '')?.[1];
  return wait ? { ok: false, reason: 'slow-down', waitSeconds: Number(wait) } : { ok: false, reason: 'refused' };
}

/** A path of this site to go to after signing in; anything else leads home. */
export function safeNext(wanted: string | null, origin: string): string {
  if (!wanted || !URL.canParse(wanted, origin)) return '/';
  const url = new URL(wanted, origin);
  return url.origin === origin && !url.pathname.startsWith('/sign-in') ? url.pathname + url.search : '/';
}

/** Ends the session; answers with the address to go to. */
export async function signOut(): Promise<string> {
  await postAuth('signout', { callbackUrl: '/sign-in' });
  return '/sign-in';
}
