import { mkdirSync } from 'node:fs';
import { dataFolder, root } from './setup/folders.mjs';
import { ensureBuild } from './setup/build.mjs';
import { Cluster } from './setup/cluster.mjs';
import { prepareDatabase } from './setup/database.mjs';
import { ensurePackages, ensurePostgres, requireNode } from './setup/installed.mjs';
import { requireFree } from './setup/ports.mjs';
import { ask, Companions, run } from './setup/run.mjs';
import { runMain, say } from './setup/say.mjs';
import { environmentFor, localSecrets } from './setup/secrets.mjs';
import path from 'node:path';

const dev = process.argv.includes('--dev');
const logFolder = path.join(dataFolder, 'logs');
const ports = {
  app: Number(process.env.PORT ?? 3000),
  postgres: Number(process.env.POSTGRES_PORT ?? 54329),
  objects: Number(process.env.OBJECTS_PORT ?? 9010),
  smtp: Number(process.env.SMTP_PORT ?? 2525),
  mail: Number(process.env.MAIL_PORT ?? 8025),
};

/** Everything from a fresh clone to a running product; a second run finds it all there and takes seconds. */
async function main() {
  requireNode();
  ensurePackages();
  const binaries = ensurePostgres();
  mkdirSync(dataFolder, { recursive: true });
  const secrets = localSecrets();
  const cluster = new Cluster({
    binaries,
    folder: path.join(dataFolder, 'postgres'),
    port: ports.postgres,
    password: secrets.POSTGRES_PASSWORD,
  });
  await requireFree(ports.app, 'application', 'PORT');
  await requireFree(ports.objects, 'object store', 'OBJECTS_PORT');
  await requireFree(ports.smtp, 'mail sink', 'SMTP_PORT');
  await requireFree(ports.mail, 'page that shows the mail', 'MAIL_PORT');
  cluster.create();
  if (!cluster.isRunning()) await requireFree(ports.postgres, 'database', 'POSTGRES_PORT');

  const companions = new Companions(logFolder);
  let stopped = false;
  const stop = async () => {
    if (stopped) return;
    stopped = true;
    say('\nStopping …');
    await companions.stop();
    cluster.stop();
  };
  const interrupted = new Promise((resolve) => {
    process.on('SIGINT', resolve);
    process.on('SIGTERM', resolve);
  });
  try {
    cluster.start();
    await prepareDatabase(cluster, 'cagewright', secrets);
    const env = environmentFor({ secrets, cluster, database: 'cagewright', ports, given: process.env });
    const tsx = ['--import', 'tsx'];
    companions.start('local services', process.execPath, [...tsx, 'scripts/local-services.ts'], {
      env: { ...env, LOCAL_SERVICES_FOLDER: dataFolder, MAIL_WEB_PORT: String(ports.mail) },
    });
    await companions.answers(`http://localhost:${ports.objects}/`);
    run(process.execPath, [...tsx, 'scripts/seed-demo.ts'], { env });
    if (dev) run(process.execPath, ['scripts/copy-vendor.mjs']);
    else ensureBuild();
    companions.start('job worker', process.execPath, [...tsx, 'scripts/worker.ts'], {
      env: { ...env, NODE_ENV: 'production' },
    });
    const next = path.join(root, 'node_modules/next/dist/bin/next');
    companions.start(
      'application',
      process.execPath,
      [next, dev ? 'dev' : 'start', '-H', '127.0.0.1', '-p', String(ports.app)],
      {
        env: { ...env, NODE_ENV: dev ? 'development' : 'production' },
        // Whoever changes the code wants to see at once what Next says of it.
        ...(dev ? { stdio: 'inherit' } : {}),
      },
    );
    await companions.answers(`http://localhost:${ports.app}/api/health`);
    welcome(env);
    await Promise.race([interrupted, companions.ended]);
  } finally {
    await stop();
  }
}

function welcome(env) {
  const people = ask(process.execPath, ['--import', 'tsx', 'scripts/demo-sign-ins.ts'], { env }) ?? '';
  say(`
Cagewright is running.

  Office        ${env.APP_URL}
  Phone         ${env.APP_URL}/field
  Mail it sent  http://localhost:${ports.mail}
  Logs          ${path.relative(root, logFolder)}/

Demo sign-ins (invented people, this machine only):
${people
  .split('\n')
  .map((line) => `  ${line}`)
  .join('\n')}

Data is kept in ${path.relative(root, dataFolder) || '.'}/. Stop with Ctrl-C; "npm run reset" starts over.`);
}

await runMain(main);
