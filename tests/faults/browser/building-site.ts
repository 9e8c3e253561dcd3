import { encode } from 'next-auth/jwt';
import pg from 'pg';
import { v7 as uuid } from 'uuid';
import { hashPassword } from '@/lib/server/password';
import type { PullResponse } from '@/lib/inspection/wire';
import type { Role } from '@/lib/inspection/roles';
import { deckPour } from '@/tests/stories/deck-pour';
import { testSecrets } from '../../../scripts/setup/test-cluster.mjs';
import { httpLine } from '../world/http-line';
import { recordIn } from '../world/real-routes';

export const SITE_PASSWORD = 'a long enough password';
const SESSION = 'cagewright.session';

export interface SitePerson {
  id: string;
  name: string;
  email: string;
  /** The value of the session's cookie. */
  session: string;
}

/** A project of a test's own on a running server: people, a gauge on record, and a deck of eight points to be read. */
export interface BuildingSite {
  app: string;
  projectId: string;
  pourId: string;
  pourNumber: string;
  points: string[];
  gaugeId: string;
  people: Record<'first' | 'second' | 'engineer' | 'coordinator', SitePerson>;
  cookieOf(person: SitePerson): string;
  sql(text: string, values?: unknown[]): Promise<pg.QueryResult<Record<string, unknown>>>;
  /** The pour's record as PostgreSQL holds it. */
  record(): ReturnType<typeof recordIn>;
  plan(number: string): Promise<string>;
  close(): Promise<void>;
}

/**
 * @param app where the server answers
 * @param database the address of its database, as superuser
 */
export async function openBuildingSite(app: string, database: string): Promise<BuildingSite> {
  const client = new pg.Pool({ connectionString: database, max: 2 });
  // A database that is killed on purpose cuts idle connections too.
  client.on('error', () => undefined);
  const projectId = uuid();
  const gaugeId = uuid();
  const short = projectId.slice(-5);
  const passwordHash = await hashPassword(SITE_PASSWORD);
  await client.query('insert into projects (id, name, time_zone) values ($1, $2, $3)', [
    projectId,
    `Slipway ${short}`,
    'Europe/Lisbon',
  ]);
  await client.query('insert into project_counters (project_id) values ($1)', [projectId]);

  const person = async (role: Role, name: string): Promise<SitePerson> => {
    const id = uuid();
    const email = `${name.toLowerCase().replace(' ', '.')}@example.test`;
    await client.query(
      'insert into users (id, email, name, password_hash, licence) values ($1, $2, $3, $4, $5)',
      [id, email, name, passwordHash, role === 'engineer' ? 'PE 10001' : ''],
    );
    await client.query('insert into memberships (project_id, person_id, role) values ($1, $2, $3)', [
      projectId,
      id,
      role,
    ]);
    return { id, name, email, session: await newSession(client, id) };
  };
  const people = {
    first: await person('inspector', `Ada ${short}`),
    second: await person('inspector', `Cem ${short}`),
    engineer: await person('engineer', `Eva ${short}`),
    coordinator: await person('coordinator', `Kim ${short}`),
  };
  const cookieOf = (one: SitePerson) => `${SESSION}=${one.session}`;
  const ask = async (as: SitePerson, path: string, body: unknown): Promise<Record<string, unknown>> => {
    const answer = await httpLine(app, cookieOf(as))(path, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
    if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
    return (await answer.json()) as Record<string, unknown>;
  };

  const { coordinator, engineer, first, second } = people;
  const deviceId = uuid();
  await ask(coordinator, '/api/sync/push', {
    protocol: 1,
    projectId,
    deviceId,
    sentAt: new Date().toISOString(),
    entries: [
      {
        ...{ id: uuid(), projectId, pourId: null, type: 'instrument-status', v: 1, planRevision: 0 },
        ...{ authorId: coordinator.id, deviceId, deviceSeq: 1, recordedAt: new Date().toISOString() },
        ...{ clockOffsetMs: 0, seenSeq: 0 },
        body: {
          ...{ instrumentId: gaugeId, name: 'DG-1', kind: 'depth-gauge', serial: 'T-1' },
          ...{ calibrationDue: '2099-01-01T00:00:00.000Z', uncertaintyMm: 1, inService: true },
        },
      },
    ],
  });
  const plan = async (number: string): Promise<string> => {
    const id = String((await ask(engineer, '/api/pours', deckPour(projectId, number))).pourId);
    for (const one of [first, second])
      await client.query(
        'insert into assignments (project_id, pour_id, person_id) values ($1, $2, $3) on conflict do nothing',
        [projectId, id, one.id],
      );
    return id;
  };
  const pourNumber = `F-${short}`;
  const pourId = await plan(pourNumber);
  const pulled = (await ask(first, '/api/sync/pull', {
    protocol: 1,
    projectId,
    project: { after: 0, headHash: null },
    pours: [{ pourId, after: 0, headHash: null, planRevision: 0 }],
  })) as unknown as PullResponse;
  const elements = pulled.pours[0]?.plan?.elements ?? [];
  const points = elements.flatMap((element) =>
    element.faces.flatMap((face) => face.points.map((point) => point.id)),
  );
  return {
    ...{ app, projectId, pourId, pourNumber, points, gaugeId, people, cookieOf, plan },
    sql: (text, values = []) => client.query(text, values),
    record: () => recordIn(database, pourId),
    close: () => client.end(),
  };
}

/** A session as sign-in opens it. */
async function newSession(client: pg.Pool, personId: string): Promise<string> {
  const sessionId = uuid();
  await client.query('insert into sessions (id, person_id, expires_at) values ($1, $2, $3)', [
    sessionId,
    personId,
    new Date(Date.now() + 86_400_000).toISOString(),
  ]);
  return encode({
    token: { sub: personId, sessionId },
    secret: testSecrets.NEXTAUTH_SECRET,
    maxAge: 86_400,
  });
}

/** The session's cookie as a browser is given it. */
export const sessionCookie = (site: BuildingSite, person: SitePerson) => ({
  name: SESSION,
  value: person.session,
  url: site.app,
  httpOnly: true,
  sameSite: 'Lax' as const,
  expires: Math.round(Date.now() / 1000) + 86_400,
});
