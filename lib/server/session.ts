import { decode, encode } from 'next-auth/jwt';
import { environment } from './environment';

/** A session ends at the latest after so long; work entered offline meanwhile is kept and asks for sign-in. */
export const SESSION_SECONDS = 30 * 24 * 3600;

export const usesHttps = (): boolean => environment().APP_URL.startsWith('https:');

/** `__Host-` binds a cookie to this very host, its root path and HTTPS; browsers refuse it without HTTPS. */
const cookieName = (name: string) => `${usesHttps() ? '__Host-' : ''}cagewright.${name}`;

/** Names and options of the cookies that next-auth sets. */
export function sessionCookies() {
  const options = { httpOnly: true, sameSite: 'lax' as const, path: '/', secure: usesHttps() };
  return {
    sessionToken: { name: cookieName('session'), options },
    callbackUrl: { name: cookieName('callback'), options },
    csrfToken: { name: cookieName('csrf'), options },
  };
}

/** What a session's token carries: who claims to be signed in, and the session that has to confirm it. */
export interface SessionClaim {
  personId: string;
  sessionId: string;
}

/** The claim in a session token; null when it is missing, tampered with, or over. */
export async function claimOf(token: string | undefined): Promise<SessionClaim | null> {
  if (!token) return null;
  try {
    const payload = await decode({ token, secret: environment().NEXTAUTH_SECRET });
    if (typeof payload?.sub !== 'string' || typeof payload.sessionId !== 'string') return null;
    return { personId: payload.sub, sessionId: payload.sessionId };
  } catch {
    return null;
  }
}

/** The claim carried by a request's cookies. */
export function claimOfRequest(request: Request): Promise<SessionClaim | null> {
  const name = sessionCookies().sessionToken.name;
  const cookie = (request.headers.get('cookie') ?? '')
    .split(/;\s*/)
    .find((one) => one.startsWith(`${name}=`));
  return claimOf(cookie?.slice(name.length + 1));
}

/** A session token as next-auth makes it, for sessions that are opened without a browser. */
export function sessionToken(claim: SessionClaim): Promise<string> {
  return encode({
    token: { sub: claim.personId, sessionId: claim.sessionId },
    secret: environment().NEXTAUTH_SECRET,
    maxAge: SESSION_SECONDS,
  });
}

/** The address a request came from, as the nearest proxy tells it. */
export function addressOf(headers: { get(name: string): string | null }): string {
  return headers.get('x-forwarded-for')?.split(',').at(-1)?.trim() || 'unknown';
}
