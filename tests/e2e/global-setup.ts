import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { prepareDatabase } from '../../scripts/setup/database.mjs';
import { freePort } from '../../scripts/setup/ports.mjs';
import { answers, Companions } from '../../scripts/setup/run.mjs';
import { environmentFor } from '../../scripts/setup/secrets.mjs';
import { startTestCluster, testSecrets } from '../../scripts/setup/test-cluster.mjs';

/** The whole product, as `npm start` runs it, on free ports, with a database, a store and a mail sink of its own. */
export default async function globalSetup(): Promise<() => Promise<void>> {
  const cluster = await startTestCluster();
  const client = new pg.Client({ connectionString: cluster.url('postgres') });
  await client.connect();
  await client.query('drop database if exists cagewright_e2e with (force)');
  await client.end();
  await prepareDatabase(cluster, 'cagewright_e2e', testSecrets);

  const ports = {
    app: await freePort(),
    objects: await freePort(),
    smtp: await freePort(),
    mail: await freePort(),
  };
  const folder = mkdtempSync(path.join(tmpdir(), 'cagewright-e2e-'));
  const env = {
    ...environmentFor({ secrets: testSecrets, cluster, database: 'cagewright_e2e', ports }),
    NODE_ENV: 'production' as const,
  };
  const companions = new Companions();
  companions.start('local services', process.execPath, ['--import', 'tsx', 'scripts/local-services.ts'], {
    env: { ...env, LOCAL_SERVICES_FOLDER: folder, MAIL_WEB_PORT: String(ports.mail) },
  });
  await answers(`http://localhost:${ports.objects}/`);
  const seeded = spawnSync(process.execPath, ['--import', 'tsx', 'scripts/seed-demo.ts'], {
    env,
    stdio: 'inherit',
  });
  if (seeded.status !== 0) throw new Error('The demo could not be seeded.');
  companions.start('job worker', process.execPath, ['--import', 'tsx', 'scripts/worker.ts'], { env });
  companions.start(
    'application',
    process.execPath,
    ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', String(ports.app)],
    {
      env,
      stdio: ['ignore', 'ignore', 'inherit'],
    },
  );
  await answers(`http://localhost:${ports.app}/api/health`);
  process.env.E2E_APP = `http://localhost:${ports.app}`;
  process.env.E2E_MAIL = `http://localhost:${ports.mail}`;
  process.env.E2E_DATABASE = cluster.url('cagewright_e2e');
  return async () => {
    await companions.stop();
    rmSync(folder, { recursive: true, force: true });
  };
}
