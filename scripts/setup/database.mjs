import { run } from './run.mjs';

/**
 * Makes the owner and the application's role with their passwords, the database when it is not there, and brings its
 * tables up to date. The application's role owns nothing and passes no row-level rule by.
 */
export async function prepareDatabase(cluster, database, secrets) {
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: cluster.url('postgres') });
  await client.connect();
  try {
    for (const [name, password] of [
      ['cagewright_owner', secrets.OWNER_PASSWORD],
      ['cagewright_app', secrets.APP_PASSWORD],
    ]) {
      const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [name]);
      const verb = rowCount ? 'alter' : 'create';
      await client.query(
        `${verb} role ${name} login nosuperuser nobypassrls inherit password ${client.escapeLiteral(password)}`,
      );
    }
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [database]);
    if (!rowCount)
      await client.query(`create database ${client.escapeIdentifier(database)} owner cagewright_owner`);
  } finally {
    await client.end();
  }
  migrate(cluster.url(database, 'cagewright_owner', secrets.OWNER_PASSWORD));
}

/** Brings the tables of a database up to date, the job queue's included. */
export function migrate(ownerUrl) {
  run(process.execPath, ['--import', 'tsx', 'scripts/migrate.ts'], {
    env: { ...process.env, DATABASE_OWNER_URL: ownerUrl },
  });
}
