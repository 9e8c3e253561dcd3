import { spawn, spawnSync } from 'node:child_process';
import { closeSync, existsSync, mkdirSync, openSync, readFileSync, renameSync } from 'node:fs';
import path from 'node:path';
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

/** How many lines of a log are shown when its process ends by itself. */
const LAST_LINES = 15;

/**
 * Processes that run beside this one. Started in order, stopped in the reverse order, by their own ids only; when one
 * ends by itself the others are stopped too.
 */
export class Companions {
  /** @param {string} [logFolder] where each writes what it has to say, in a file of its own; else to the terminal */
  constructor(logFolder) {
    this.logFolder = logFolder;
    this.running = [];
    this.stopping = false;
    this.over = false;
    this.ended = new Promise((resolve) => (this.onEnd = resolve));
  }

  start(name, command, args, options = {}) {
    const log = this.logFolder && !options.stdio ? newLog(this.logFolder, name) : null;
    const stdio = log ? ['ignore', log.handle, log.handle] : 'inherit';
    // A group of its own: Ctrl-C reaches only this process, which then stops the others in order.
    const child = spawn(command, args, { cwd: root, stdio, detached: true, ...options });
    if (log) closeSync(log.handle);
    this.running.push({ name, child });
    child.on('exit', (code) => {
      if (this.stopping) return;
      console.error(`\nThe ${name} ended by itself (${code ?? 'signal'}). Everything else is stopped.`);
      if (log) console.error(lastLines(log.file));
      process.exitCode = 1;
      this.over = true;
      this.onEnd();
    });
    return child;
  }

  /** Resolves once the address answers. @throws SetupProblem as soon as one of the processes has ended instead */
  answers(url, seconds) {
    return answers(url, seconds, () => !this.over);
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

/** A log to be written; what the run before wrote is kept beside it, so that its end can still be read. */
function newLog(folder, name) {
  mkdirSync(folder, { recursive: true });
  const file = path.join(folder, `${name.replaceAll(' ', '-')}.log`);
  if (existsSync(file)) renameSync(file, file.replace(/log$/, 'before.log'));
  return { file, handle: openSync(file, 'a') };
}

function lastLines(file) {
  const lines = readFileSync(file, 'utf8').trimEnd().split('\n').slice(-LAST_LINES);
  const where = path.relative(root, file);
  if (lines.join('') === '') return `It wrote nothing to ${where}.`;
  return [`The end of ${where}:`, ...lines.map((line) => `  ${line}`)].join('\n');
}

/**
 * Resolves once the address answers with a success, for at most `seconds`.
 * @param {() => boolean} goOn tells whether it is still worth waiting
 */
export async function answers(url, seconds = 60, goOn = () => true) {
  for (let tries = 0; tries < seconds * 5; tries += 1) {
    if (!goOn()) throw new SetupProblem('It could not be started.');
    try {
      if ((await fetch(url, { redirect: 'manual' })).status < 500) return;
    } catch {
      // Not up yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new SetupProblem(`Nothing answered at ${url} within ${seconds} seconds.`);
}
