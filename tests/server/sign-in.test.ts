import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoPassword } from '../../db/seeds/demo/scenario.ts';
import { ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';

let server: RunningServer;
beforeAll(async () => {
  server = await startServer();
}, 300_000);
afterAll(() => server.stop());

const inDatabase = (sql: string, ...values: unknown[]) => {
  const db = new Database(`${server.dataDir}/blockwright.sqlite`);
  try {
    db.prepare(sql).run(...values);
  } finally {
    db.close();
  }
};

describe('signing in', () => {
  it('gives a session by which the interface answers', async () => {
    const client = await demoClient(server.base, 'engineer');
    const { status, body } = await client.get('/projects');
    expect(status).toBe(200);
    expect(body.projects.map((project: { name: string }) => project.name)).toEqual(['Shore archive', 'Buoy uplink']);
  });

  it('keeps the session in a cookie that scripts of a page cannot read and other sites do not send', async () => {
    const client = new ApiClient(server.base);
    const { csrfToken } = await (await client.fetch('/api/auth/csrf')).json();
    const response = await client.fetch('/api/auth/callback/credentials', {
      method: 'POST',
      headers: { origin: server.base },
      body: new URLSearchParams({ csrfToken, email: 'engineer@demo.test', password: demoPassword }),
    });
    const cookie = response.headers.getSetCookie().find((line) => line.includes('session-token'))!;
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
  });

  it('says the same of a wrong password as of an unknown account', async () => {
    const client = new ApiClient(server.base);
    const wrong = await client.signIn('reviewer@demo.test', 'not the password');
    const unknown = await client.signIn('nobody@demo.test', 'not the password');
    expect(wrong.search).toBe(unknown.search);
    expect(wrong.searchParams.get('error')).toBe('CredentialsSignin');
    expect(wrong.pathname).toBe('/sign-in');
    expect((await client.get('/projects')).status).toBe(401);
  });

  it('slows down after five wrong tries, for accounts that do not exist too, and even for the right password', async () => {
    for (const email of ['viewer@demo.test', 'no-such@demo.test']) {
      const client = new ApiClient(server.base);
      for (let i = 0; i < 5; i++) {
        expect((await client.signIn(email, `wrong ${i}`)).searchParams.get('code')).toBe('credentials');
      }
      const sixth = await client.signIn(email, demoPassword);
      expect(sixth.searchParams.get('code')).toMatch(/^slow-down-[1-5]$/);
      expect((await client.get('/projects')).status).toBe(401);
    }
    // The wait over, the right password works and clears the count.
    inDatabase('UPDATE sign_in_attempts SET blocked_until = NULL');
    const client = await demoClient(server.base, 'viewer');
    expect((await client.get('/projects')).status).toBe(200);
  });

  it('counts tries made at the same moment', async () => {
    const codes = await Promise.all(
      Array.from({ length: 8 }, async (_, i) => {
        const to = await new ApiClient(server.base).signIn('owner@demo.test', `wrong ${i}`);
        return to.searchParams.get('code');
      }),
    );
    expect(codes.filter((code) => code === 'credentials')).toHaveLength(5);
    inDatabase('DELETE FROM sign_in_attempts');
  });
});

describe('a session', () => {
  it('ends on signing out, also for whoever kept the cookie', async () => {
    const client = await demoClient(server.base, 'engineer');
    const kept = new Map(client.cookies);
    await client.signOut();
    const thief = new ApiClient(server.base);
    for (const [name, value] of kept) thief.cookies.set(name, value);
    expect((await thief.get('/projects')).status).toBe(401);
  });

  it('takes the role from the database at each request, not from the token', async () => {
    const client = await demoClient(server.base, 'engineer');
    const { body } = await client.get('/projects');
    const { id } = body.projects[0];
    const demote = 'UPDATE memberships SET role = ? WHERE user_id = (SELECT id FROM users WHERE email = ?)';
    inDatabase(demote, 'viewer', 'engineer@demo.test');
    const requirements = { targetFer: 0.001 };
    expect((await client.call('PUT', `/projects/${id}/requirements`, requirements)).status).toBe(403);
    inDatabase(demote, 'engineer', 'engineer@demo.test');
    expect((await client.call('PUT', `/projects/${id}/requirements`, requirements)).status).toBe(200);
  });

  it('ends when its row in the database does', async () => {
    const client = await demoClient(server.base, 'engineer');
    inDatabase("UPDATE sessions SET expires_at = '2000-01-01T00:00:00.000Z'");
    expect((await client.get('/projects')).status).toBe(401);
  });

  it('is not taken from a token signed with another secret', async () => {
    const other = await startServer();
    const client = await demoClient(other.base, 'engineer');
    await other.stop();
    const forger = new ApiClient(server.base);
    for (const [name, value] of client.cookies) forger.cookies.set(name, value);
    expect((await forger.get('/projects')).status).toBe(401);
  });
});

describe('a change from another site', () => {
  it('is refused by its Origin', async () => {
    const client = await demoClient(server.base, 'engineer');
    const foreign: Record<string, string>[] = [
      { origin: 'https://evil.test', 'content-type': 'application/json' },
      { origin: 'https://evil.test', 'content-type': 'text/plain' },
      { 'content-type': 'text/plain' },
    ];
    for (const headers of foreign) {
      const response = await client.fetch('/api/v1/projects', { method: 'POST', headers, body: '{"name":"x"}' });
      expect(response.status).toBe(403);
      expect((await response.json()).error.code).toBe('origin');
    }
  });
});
