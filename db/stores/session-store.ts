import type { Knex } from 'knex';
import type { Role } from '@/lib/inspection/roles';
import type { Tx } from '@/db/connection';

/** Who is behind a request, with the role held in each project as of now. */
export interface Person {
  id: string;
  sessionId: string;
  name: string;
  email: string;
  licence: string;
  roles: ReadonlyMap<string, Role>;
}

interface EnteredRow {
  person_id: string;
  session_id: string;
  name: string;
  email: string;
  licence: string;
  memberships: Record<string, Role>;
}

/**
 * Looks the session up and opens the person's projects to the rest of this transaction (row-level security).
 * @returns null when the session is unknown, over or revoked, or its person disabled
 */
export async function enterSession(tx: Tx, sessionId: string): Promise<Person | null> {
  const { rows } = await tx.raw<{ rows: EnteredRow[] }>('select * from app_enter(?)', [sessionId]);
  const row = rows[0];
  if (!row) return null;
  return {
    id: row.person_id,
    sessionId: row.session_id,
    name: row.name,
    email: row.email,
    licence: row.licence,
    roles: new Map(Object.entries(row.memberships)),
  };
}

/** Opens one project to the rest of this transaction, for work that no person asked for. */
export async function enterProject(tx: Tx, projectId: string): Promise<void> {
  await tx.raw('select app_enter_project(?)', [projectId]);
}

export interface NewSession {
  id: string;
  personId: string;
  expiresAt: string;
  userAgent: string;
  address: string;
}

export async function insertSession(db: Knex, session: NewSession): Promise<void> {
  await db('sessions').insert({
    id: session.id,
    person_id: session.personId,
    expires_at: session.expiresAt,
    user_agent: session.userAgent.slice(0, 300),
    address: session.address.slice(0, 100),
  });
}

/** Ends one session; the next request that carries it is told to sign in. */
export async function revokeSession(db: Knex, sessionId: string, at: string): Promise<void> {
  await db('sessions').where({ id: sessionId, revoked_at: null }).update({ revoked_at: at });
}

/** Ends every session of a person: sign-out everywhere, a changed password, a disabled person. */
export async function revokeSessionsOf(db: Knex, personId: string, at: string): Promise<number> {
  return db('sessions').where({ person_id: personId, revoked_at: null }).update({ revoked_at: at });
}
