import { spawn, spawnSync } from 'node:child_process';
import { SetupProblem } from './say.mjs';
import { root } from './folders.mjs';

/** Runs a command to its end with its output shown. @throws SetupProblem naming the command when it fails */
export function run(command, args, options = {}) {
  const result = spawnSync(command, args, { cwd: root, stdio: 'inherit', ...options });
  if (result.error || result.status !== 0) {
    const why = result.error ? result.error.message : `it ended with ${result.status ?? result.signal}`;
    throw new SetupProblem(`"${command} ${args.join(' ')}" did not work: ${why}.`);
  }
}

/** Runs a command to its end and gives back what it printed; null when it failed. */
export function ask(command, args, options = {}) {
  const result = spawnSync(command, args, { cwd: root, encoding: 'utf8', ...options });
  return result.error || result.status !== 0 ? null : result.stdout.trim();
}

/**
 * Processes that run beside this one. Started in order, stopped in the reverse order, by their own ids only; when one
 * ends by itself the others are stopped too.
 */
export class Companions {
  constructor() {
    this.running = [];
    this.stopping = false;
    this.ended = new Promise((resolve) => (this.onEnd = resolve));
  }

  start(name, command, args, options = {}) {
    // A group of its own: Ctrl-C reaches only this process, which then stops the others in order.
    const child = spawn(command, args, { cwd: root, stdio: 'inherit', detached: true, ...options });
    this.running.push({ name, child });
    child.on('exit', (code) => {
      if (this.stopping) return;
      console.error(`\nThe ${name} ended by itself (${code ?? 'signal'}). Everything else is stopped.`);
      process.exitCode = 1;
      this.onEnd();
    });
    return child;
  }

  async stop() {
    this.stopping = true;
    for (const { child } of this.running.reverse()) {
      if (child.exitCode !== null || child.signalCode !== null) continue;
      const gone = new Promise((resolve) => child.once('exit', resolve));
      signalGroup(child.pid, 'SIGTERM');
      const late = setTimeout(() => signalGroup(child.pid, 'SIGKILL'), 8000);
      await gone;
      clearTimeout(late);
    }
    this.running = [];
  }
}

function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch {
    // It was gone already.
  }
}

/** Resolves once the address answers with a success, for at most `seconds`. */
export async function answers(url, seconds = 60) {
  for (let tries = 0; tries < seconds * 5; tries += 1) {
    try {
      if ((await fetch(url, { redirect: 'manual' })).status < 500) return;
    } catch {
      // Not up yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new SetupProblem(`Nothing answered at ${url} within ${seconds} seconds.`);
}
