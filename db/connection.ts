import knex, { type Knex } from 'knex';
import pg from 'pg';
import { environment } from '@/lib/server/environment';

export type Tx = Knex.Transaction;

const INT8 = 20;
const TIMESTAMPTZ = 1184;

/**
 * How values come back: bigint as a number (every bigint here stays below 2^53), instants as ISO 8601 in UTC with
 * milliseconds, the way entries carry them. Set per connection: the job queue shares the driver and wants its own.
 */
const types = {
  getTypeParser(oid: number, format?: 'text' | 'binary') {
    if (oid === INT8) return Number;
    if (oid === TIMESTAMPTZ) return instantOrNull;
    return pg.types.getTypeParser(oid, format ?? 'text');
  },
};

/** The text of a timestamptz as an ISO instant; `infinity`, which sorts what has no time last, as null. */
function instantOrNull(text: string): string | null {
  return text.endsWith('infinity') ? null : new Date(text).toISOString();
}

/** A pool of connections to one database. The caller destroys it. */
export function connect(url: string, most = 10): Knex {
  return knex({
    client: 'pg',
    connection: { connectionString: url, types } as Knex.PgConnectionConfig,
    pool: { min: 0, max: most, acquireTimeoutMillis: 10_000 },
  });
}

const held = globalThis as typeof globalThis & { cagewrightDatabase?: Knex };

/** The application's own pool: one per process, also across the reloads of development. */
export function database(): Knex {
  held.cagewrightDatabase ??= connect(environment().DATABASE_URL);
  return held.cagewrightDatabase;
}

/** Closes the pool, for commands and tests that end. */
export async function closeDatabase(): Promise<void> {
  await held.cagewrightDatabase?.destroy();
  held.cagewrightDatabase = undefined;
}
