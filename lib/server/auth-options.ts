import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { v7 as uuid } from 'uuid';
import { AppError } from '@/lib/inspection/app-error';
import { insertSession, revokeSession } from '@/db/stores/session-store';
import { database } from '@/db/connection';
import { checkPassword } from './check-password';
import { environment } from './environment';
import { logger } from './logger';
import { addressOf, SESSION_SECONDS, sessionCookies, usesHttps } from './session';

/** Signs in with e-mail address and password, and opens a row in `sessions` that can be revoked at once. */
async function authorize(
  credentials: Record<'email' | 'password', string> | undefined,
  headers: { get(name: string): string | null },
) {
  const email = String(credentials?.email ?? '').slice(0, 320);
  const password = String(credentials?.password ?? '').slice(0, 400);
  if (!email || !password) return null;
  const address = addressOf(headers);
  const person = await checkPassword({ email }, password, address);
  if (!person) return null;
  const sessionId = uuid();
  await insertSession(database(), {
    id: sessionId,
    personId: person.id,
    expiresAt: new Date(Date.now() + SESSION_SECONDS * 1000).toISOString(),
    userAgent: headers.get('user-agent') ?? '',
    address,
  });
  logger.info({ event: 'signed-in', personId: person.id, sessionId });
  return { id: person.id, name: person.name, email: person.email, sessionId };
}

/** Headers as next-auth hands them on: a plain object. */
const reader = (headers: Record<string, unknown> | undefined) => ({
  get: (name: string) => {
    const value = headers?.[name];
    return typeof value === 'string' ? value : null;
  },
});

export function authOptions(): NextAuthOptions {
  return {
    secret: environment().NEXTAUTH_SECRET,
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
    jwt: { maxAge: SESSION_SECONDS },
    cookies: sessionCookies(),
    useSecureCookies: usesHttps(),
    pages: { signIn: '/sign-in', error: '/sign-in' },
    providers: [
      CredentialsProvider({
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        authorize: async (credentials, request) => {
          try {
            return await authorize(credentials, reader(request.headers));
          } catch (error) {
            // The code is what the sign-in page is told; anything unknown stays unknown.
            if (error instanceof AppError) throw new Error(error.code);
            logger.error({ event: 'sign-in-failed', err: error });
            throw new Error('internal');
          }
        },
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => (user ? { ...token, sub: user.id, sessionId: user.sessionId } : token),
      session: ({ session }) => session,
    },
    events: {
      signOut: async ({ token }) => {
        if (token?.sessionId) await revokeSession(database(), token.sessionId, new Date().toISOString());
      },
    },
    logger: {
      error: (code) => logger.warn({ event: 'auth-error', code }),
      warn: () => undefined,
      debug: () => undefined,
    },
  };
}
