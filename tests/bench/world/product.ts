import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { Cluster } from '../../../scripts/setup/cluster.mjs';
import { prepareDatabase } from '../../../scripts/setup/database.mjs';
import { dataFolder } from '../../../scripts/setup/folders.mjs';
import { ensurePostgres } from '../../../scripts/setup/installed.mjs';
import { freePort } from '../../../scripts/setup/ports.mjs';
import { answers, Companions } from '../../../scripts/setup/run.mjs';
import { environmentFor } from '../../../scripts/setup/secrets.mjs';
import { testSecrets } from '../../../scripts/setup/test-cluster.mjs';

const DATABASE = 'cagewright_bench';

/** The whole product as `npm start` runs it, and beside it the bare server and the peer, all on free ports. */
export interface Product {
  app: string;
  bare: string;
  /** Starts the peer's server when it is first asked for. @throws when its packages are not there */
  peer(): Promise<string>;
  database: pg.Pool;
  stop(): Promise<void>;
}

/** Starts everything with an empty database on a PostgreSQL of its own, which is as durable as the one people use. */
export async function startProduct(): Promise<Product> {
  const cluster = new Cluster({
    binaries: ensurePostgres(),
    folder: path.join(dataFolder, 'bench-postgres'),
    port: await freePort(),
    password: 'postgres-for-bench-only',
  });
  cluster.stop('immediate');
  cluster.start();
  const admin = new pg.Client({ connectionString: cluster.url('postgres') });
  await admin.connect();
  await admin.query(`drop database if exists ${DATABASE} with (force)`);
  await admin.end();
  await prepareDatabase(cluster, DATABASE, testSecrets);

  const ports = {
    app: await freePort(),
    objects: await freePort(),
    smtp: await freePort(),
    mail: await freePort(),
  };
  const folder = mkdtempSync(path.join(tmpdir(), 'cagewright-bench-'));
  const env: NodeJS.ProcessEnv = {
    ...environmentFor({ secrets: testSecrets, cluster, database: DATABASE, ports }),
    NODE_ENV: 'production',
    LOG_LEVEL: 'error',
  };
  // Sessions are opened here as sign-in opens them, with the product's own secrets.
  Object.assign(process.env, env);

  const companions = new Companions();
  const quiet = { env, stdio: ['ignore', 'ignore', 'inherit'] as ['ignore', 'ignore', 'inherit'] };
  const script = (file: string) => ['--import', 'tsx', file];
  companions.start('local services', process.execPath, script('scripts/local-services.ts'), {
    ...quiet,
    env: { ...env, LOCAL_SERVICES_FOLDER: folder, MAIL_WEB_PORT: String(ports.mail) },
  });
  const next = ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', String(ports.app)];
  companions.start('application', process.execPath, next, quiet);
  companions.start('job worker', process.execPath, script('scripts/worker.ts'), quiet);
  const barePort = await freePort();
  companions.start('bare server', process.execPath, script('tests/bench/world/bare-server.ts'), {
    ...quiet,
    env: { ...env, BARE_PORT: String(barePort) },
  });
  const app = `http://localhost:${ports.app}`;
  const bare = `http://127.0.0.1:${barePort}`;
  await answers(`${app}/api/health`);
  await answers(bare);

  let peer: Promise<string> | null = null;
  const startPeer = async () => {
    const port = await freePort();
    const packages = path.join(dataFolder, 'bench-peer');
    const args = ['tests/bench/peer/serve-peer.mjs', String(port), packages, path.join(folder, 'peer')];
    companions.start('peer', process.execPath, args, { ...quiet, env: process.env });
    await answers(`http://127.0.0.1:${port}/`);
    return `http://127.0.0.1:${port}`;
  };
  const database = new pg.Pool({ connectionString: env.DATABASE_OWNER_URL, max: 2 });
  return {
    app,
    bare,
    peer: () => (peer ??= startPeer()),
    database,
    stop: async () => {
      await database.end();
      await companions.stop();
      cluster.stop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
