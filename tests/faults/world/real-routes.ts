import pg from 'pg';
import type { SealedEntry } from '@/db/stores/entry-store';
import type { TestPerson, World } from '@/tests/integration/world';
import type { Line } from './phone';

type Handler = (
  request: Request,
  context: { params: Promise<Record<string, string | string[]>> },
) => Promise<Response>;

async function handlerOf(path: string): Promise<Handler | null> {
  switch (path) {
    case '/api/sync/index':
      return (await import('@/app/api/sync/index/route')).GET;
    case '/api/sync/push':
      return (await import('@/app/api/sync/push/route')).POST;
    case '/api/sync/pull':
      return (await import('@/app/api/sync/pull/route')).POST;
    default:
      return null;
  }
}

/** A straight line to the real route handlers, in the session of one person. */
export const lineOf =
  (person: Pick<TestPerson, 'cookie'>): Line =>
  async (address, init) => {
    const handler = await handlerOf(address);
    if (!handler) return new Response('{}', { status: 404, headers: { 'content-type': 'application/json' } });
    const headers = new Headers(init.headers);
    headers.set('cookie', person.cookie);
    headers.set('origin', 'http://localhost:3000');
    const { method, body } = init;
    const request = new Request(`http://localhost:3000${address}`, { method, headers, body });
    return handler(request, { params: Promise.resolve({}) });
  };

/** Runs statements as the database's superuser, on its own or on the cluster's first database. */
export async function asAdmin(
  world: World,
  where: 'own database' | 'postgres',
  ...statements: string[]
): Promise<void> {
  const own = world.database.adminUrl;
  const client = new pg.Client({
    connectionString: where === 'postgres' ? own.replace(/\/[^/]*$/, '/postgres') : own,
  });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}

/** Ends every connection that the application holds, as a database that goes down does. */
export const cutConnections = (world: World): Promise<void> =>
  asAdmin(
    world,
    'postgres',
    `select pg_terminate_backend(pid) from pg_stat_activity
       where datname = '${world.database.name}' and usename = 'cagewright_app'`,
  );

/** The pour's record as PostgreSQL holds it. */
export const recordOf = (world: World, pourId: string): Promise<SealedEntry[]> =>
  recordIn(world.database.ownerUrl, pourId);

/** The same, of any database. */
export async function recordIn(ownerUrl: string, pourId: string): Promise<SealedEntry[]> {
  const [{ sealedEntry }, { connect }] = await Promise.all([
    import('@/db/stores/entry-store'),
    import('@/db/connection'),
  ]);
  // A connection as the application has them: others give instants and large numbers back as other types.
  const owner = connect(ownerUrl, 1);
  try {
    const rows = await owner('entries').where({ pour_id: pourId }).orderBy('seq');
    return rows.map((row: unknown) => sealedEntry(row as Parameters<typeof sealedEntry>[0]));
  } finally {
    await owner.destroy();
  }
}

/** A reading at a point of the deck that `planPour` plans. */
export const deckReading = (pointId: string, mm: number, instrumentId: string) => ({
  faceId: 'deck-top',
  requirementId: 'top-bars',
  steel: 'outermost bar T1',
  pointId,
  spot: null,
  value: { text: String(mm), unit: 'mm' as const, mm },
  goNoGo: null,
  instrumentId,
  phase: 'before' as const,
  measuredAt: '2026-12-01T07:00:00.000Z',
  asFoundBar: null,
  measurer: null,
});
