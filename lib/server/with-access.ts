import { cookies, headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { AppError } from '@/lib/inspection/app-error';
import type { Role } from '@/lib/inspection/roles';
import { enterSession, type Person } from '@/db/stores/session-store';
import { database, type Tx } from '@/db/connection';
import { allowed, type Action } from './access';
import { claimOf, sessionCookies } from './session';

/** The header in which proxy.ts hands a page its own path. */
export const PATH_HEADER = 'x-cagewright-path';

export interface PageAccess {
  /** Sees only what belongs to the person's projects. */
  tx: Tx;
  person: Person;
  /** The server's clock when the page was asked for, ISO 8601. */
  now: string;
  /**
   * The person's role in the project, once it is allowed to do this.
   * @throws AppError not-found, of another project as of a role that may not: the page then is not there
   */
  require(action: Action, projectId: string): Role;
}

/**
 * What a page reads, in one transaction opened to the person's projects. Without a session: to the sign-in page, and
 * back afterwards. What is not found, or not for this role, is a page that is not there.
 */
export async function withAccess<T>(read: (page: PageAccess) => Promise<T>): Promise<T> {
  const claim = await claimOf((await cookies()).get(sessionCookies().sessionToken.name)?.value);
  const result = claim ? await readAs(claim.sessionId, read) : ({ kind: 'sign-in' } as const);
  if (result.kind === 'sign-in') {
    const path = (await headers()).get(PATH_HEADER) ?? '/';
    redirect(`/sign-in?next=${encodeURIComponent(path)}`);
  }
  if (result.kind === 'absent') notFound();
  return result.value;
}

type Read<T> = { kind: 'read'; value: T } | { kind: 'sign-in' } | { kind: 'absent' };

async function readAs<T>(sessionId: string, read: (page: PageAccess) => Promise<T>): Promise<Read<T>> {
  try {
    return await database().transaction(async (tx): Promise<Read<T>> => {
      const person = await enterSession(tx, sessionId);
      if (!person) return { kind: 'sign-in' };
      const value = await read({
        tx,
        person,
        now: new Date().toISOString(),
        require: (action, projectId) => roleFor(person, action, projectId),
      });
      return { kind: 'read', value };
    });
  } catch (error) {
    if (error instanceof AppError && (error.code === 'not-found' || error.code === 'not-allowed'))
      return { kind: 'absent' };
    throw error;
  }
}

function roleFor(person: Person, action: Action, projectId: string): Role {
  const role = person.roles.get(projectId);
  if (!role || !allowed(action, role)) throw new AppError('not-found');
  return role;
}
