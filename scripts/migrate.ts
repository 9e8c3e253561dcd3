import { runMigrations } from 'graphile-worker';
import knex from 'knex';
import config from '../knexfile';

/** Brings the tables up to date, as their owner: first the job queue's own, then ours. */
const connectionString = process.env.DATABASE_OWNER_URL;
if (!connectionString) {
  console.error(
    'DATABASE_OWNER_URL is not set. "npm start" sets it; by hand: DATABASE_OWNER_URL=postgres://… npm run db:migrate',
  );
  process.exit(1);
}
await runMigrations({ connectionString, logger: undefined });
const database = knex({ ...config, connection: connectionString });
try {
  const [, names] = (await database.migrate.latest()) as [number, string[]];
  if (names.length > 0) console.log(`Migrated: ${names.join(', ')}`);
} finally {
  await database.destroy();
}
