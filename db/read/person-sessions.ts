import type { Tx } from '@/db/connection';

export interface SessionRow {
  id: string;
  createdAt: string;
  lastSeenAt: string;
  userAgent: string;
  address: string;
}

export interface DeviceRow {
  id: string;
  name: string;
  firstSentAt: string;
  lastSentAt: string;
}

/** The person's sessions that are still open, and the devices that have sent work; latest first. */
export async function readPersonSessions(
  tx: Tx,
  personId: string,
  now: string,
): Promise<{ sessions: SessionRow[]; devices: DeviceRow[] }> {
  const sessions = await tx('sessions')
    .where({ person_id: personId, revoked_at: null })
    .where('expires_at', '>', now)
    .orderBy('last_seen_at', 'desc')
    .select<SessionRow[]>(
      'id',
      'created_at as createdAt',
      'last_seen_at as lastSeenAt',
      'user_agent as userAgent',
      'address',
    );
  const devices = await tx('devices')
    .where({ person_id: personId })
    .orderBy('last_sent_at', 'desc')
    .select<DeviceRow[]>('id', 'name', 'first_sent_at as firstSentAt', 'last_sent_at as lastSentAt');
  return { sessions, devices };
}

/** When a session was begun; undefined when there is no such session. */
export async function readSessionStart(tx: Tx, sessionId: string): Promise<string | undefined> {
  const row = await tx('sessions')
    .where({ id: sessionId })
    .first<{ createdAt: string } | undefined>('created_at as createdAt');
  return row?.createdAt;
}
