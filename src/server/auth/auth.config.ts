import { randomBytes } from 'node:crypto';
import { CredentialsSignin } from '@auth/core/errors';
import Credentials from '@auth/core/providers/credentials';
import { defineConfig } from 'auth-astro';
import { authSecret, isProduction } from '../config.ts';
import { nowText } from '../context.ts';
import { database } from '../db/database.ts';
import { clientAddressOf } from '../http/client-address.ts';
import { deleteExpiredSessions, deleteSession, insertSession } from '../repositories/sessions.ts';
import { userOfSession } from '../repositories/users.ts';
import { sessionSeconds } from './session-lifetime.ts';
import { signIn } from './sign-in.ts';

/** The sign-in page reads it as `?error=CredentialsSignin&code=slow-down-<seconds>`. */
class SlowDown extends CredentialsSignin {
  constructor(waitMs: number) {
    super();
    this.code = `slow-down-${Math.ceil(waitMs / 1000)}`;
  }
}

export default defineConfig({
  // Read at run time: auth-astro would otherwise take a value of build time.
  secret: authSecret(),
  trustHost: true,
  useSecureCookies: isProduction(),
  session: { strategy: 'jwt', maxAge: sessionSeconds },
  pages: { signIn: '/sign-in', error: '/sign-in' },
  providers: [
    Credentials({
      credentials: { email: {}, password: { type: 'password' } },
      async authorize(input, request) {
        const address = clientAddressOf(request);
        const answer = await signIn(database(), input, address);
        if ('user' in answer) return answer.user;
        if (answer.refused === 'slow-down') throw new SlowDown(answer.waitMs);
        return null;
      },
    }),
  ],
  callbacks: {
    /** At sign-in a session is entered in the database, and the token carries only its id. Later the token holds as
     *  long as that row does. */
    async jwt({ token, user }) {
      const db = database();
      if (user?.id) {
        const sessionId = randomBytes(24).toString('base64url');
        await deleteExpiredSessions(db, nowText());
        const times = { createdAt: nowText(), expiresAt: nowText(sessionSeconds * 1000) };
        await insertSession(db, { id: sessionId, userId: user.id, ...times });
        return { sub: user.id, sessionId };
      }
      const standing = await userOfSession(db, String(token.sessionId ?? ''), nowText());
      return standing ? token : null;
    },
    session({ session, token }) {
      session.user.id = String(token.sub);
      return session;
    },
  },
  events: {
    async signOut(message) {
      if ('token' in message && message.token?.sessionId) {
        await deleteSession(database(), String(message.token.sessionId));
      }
    },
  },
});
