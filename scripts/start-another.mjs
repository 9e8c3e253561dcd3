import { existsSync } from 'node:fs';
import path from 'node:path';
import { dataFolder, root } from './setup/folders.mjs';
import { setLocalEnvironment } from './setup/local-environment.mjs';
import { requireFree } from './setup/ports.mjs';
import { Companions } from './setup/run.mjs';
import { runMain, say, SetupProblem } from './setup/say.mjs';

/** One more application process for the product that `npm start` runs here; a proxy shares requests between them. */
await runMain(async () => {
  const port = Number(process.env.PORT ?? 3001);
  if (!existsSync(path.join(root, '.next', 'built-from')))
    throw new SetupProblem('Nothing is built here yet. Run "npm start" first, and leave it running.');
  await requireFree(port, 'application', 'PORT');
  // The address that people see is the first process's, whatever this one listens on.
  process.env.APP_URL ??= 'http://localhost:3000';
  setLocalEnvironment();
  const companions = new Companions(path.join(dataFolder, 'logs'));
  const interrupted = new Promise((resolve) => {
    process.on('SIGINT', resolve);
    process.on('SIGTERM', resolve);
  });
  try {
    const next = path.join(root, 'node_modules/next/dist/bin/next');
    companions.start(
      `application ${port}`,
      process.execPath,
      [next, 'start', '-H', '127.0.0.1', '-p', String(port)],
      { env: { ...process.env, NODE_ENV: 'production' } },
    );
    await companions.answers(`http://127.0.0.1:${port}/api/health`);
    say(
      `One more application process answers on 127.0.0.1:${port}. Its log is in ${path.relative(root, dataFolder)}/logs/. Stop it with Ctrl-C.`,
    );
    await Promise.race([interrupted, companions.ended]);
  } finally {
    await companions.stop();
  }
});
