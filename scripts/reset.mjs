import { existsSync, rmSync } from 'node:fs';
import path from 'node:path';
import { createInterface } from 'node:readline/promises';
import { Cluster } from './setup/cluster.mjs';
import { dataFolder, root } from './setup/folders.mjs';
import { ensurePostgres } from './setup/installed.mjs';
import { runMain, say, SetupProblem } from './setup/say.mjs';

/** Throws away everything this installation keeps, after asking. */
await runMain(async () => {
  if (!existsSync(dataFolder)) return say('There is nothing to reset.');
  if (!process.argv.includes('--yes')) {
    if (!process.stdin.isTTY) throw new SetupProblem('This deletes all data. Say so: npm run reset -- --yes');
    const terminal = createInterface({ input: process.stdin, output: process.stdout });
    const answer = await terminal.question(
      'This deletes the database, the photographs and the mail of this installation. Type "delete" to go on: ',
    );
    terminal.close();
    if (answer.trim() !== 'delete') return say('Nothing was deleted.');
  }
  const cluster = new Cluster({
    binaries: ensurePostgres(),
    folder: path.join(dataFolder, 'postgres'),
    port: 0,
    password: '',
  });
  cluster.stop();
  for (const name of ['postgres', 'objects', 'mail', 'logs'])
    rmSync(path.join(dataFolder, name), { recursive: true, force: true });
  rmSync(path.join(root, '.env.local'), { force: true });
  say('Done. "npm start" begins anew.');
});
