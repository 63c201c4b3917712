import { demoPassword } from '../../db/seeds/demo/scenario.ts';

export interface Answer {
  status: number;
  // Tests read answers of every shape; the schemas are checked by the server itself.
  body: ReturnType<typeof JSON.parse>;
  headers: Headers;
}

/** A script's view of the server: a cookie jar, and the interface under /api/v1. */
export class ApiClient {
  readonly cookies = new Map<string, string>();
  constructor(readonly base: string) {}

  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const headers = new Headers(init.headers);
    if (this.cookies.size > 0) headers.set('cookie', [...this.cookies].map((pair) => pair.join('=')).join('; '));
    const response = await fetch(this.base + path, { redirect: 'manual', ...init, headers });
    for (const line of response.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return response;
  }

  async call(method: string, path: string, body?: unknown): Promise<Answer> {
    const response = await this.fetch(`/api/v1${path}`, {
      method,
      headers: { origin: this.base, ...(body !== undefined && { 'content-type': 'application/json' }) },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    const text = await response.text();
    return { status: response.status, body: text === '' ? undefined : JSON.parse(text), headers: response.headers };
  }

  get = (path: string) => this.call('GET', path);
  post = (path: string, body: unknown) => this.call('POST', path, body);

  /** Posts one of the sign-in forms. @returns the address the browser would go to. */
  async authPost(action: string, fields: Record<string, string>): Promise<URL> {
    const { csrfToken } = await (await this.fetch('/api/auth/csrf')).json();
    const response = await this.fetch(`/api/auth/${action}`, {
      method: 'POST',
      headers: { origin: this.base, 'X-Auth-Return-Redirect': '1' },
      body: new URLSearchParams({ ...fields, csrfToken }),
    });
    return new URL((await response.json()).url);
  }

  signIn = (email: string, password: string) => this.authPost('callback/credentials', { email, password });
  signOut = () => this.authPost('signout', {});
}

/** A client signed in as one of the demo accounts. */
export async function demoClient(base: string, role: 'owner' | 'engineer' | 'reviewer' | 'viewer'): Promise<ApiClient> {
  const client = new ApiClient(base);
  await client.signIn(`${role}@demo.test`, demoPassword);
  return client;
}

/** The id of a demo project by its name. */
export async function demoProject(client: ApiClient, name: 'Shore archive' | 'Buoy uplink'): Promise<string> {
  const { body } = await client.get('/projects');
  return body.projects.find((project: { name: string }) => project.name === name).id;
}
