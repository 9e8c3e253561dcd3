import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { Companions } from '../../scripts/setup/run.mjs';

let folder: string;
let shown: string[];
beforeEach(() => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'cagewright-logs-'));
  shown = [];
  vi.spyOn(console, 'error').mockImplementation((text: string) => void shown.push(text));
});
afterEach(() => {
  vi.restoreAllMocks();
  // Set by a companion that ends by itself; here that is what was wanted.
  process.exitCode = undefined;
  rmSync(folder, { recursive: true, force: true });
});

const says = (lines: number, end: string) =>
  `for (let line = 1; line <= ${lines}; line += 1) console.log('line ' + line + ','); ${end}`;

it('shows the end of the log of a companion that ends by itself, and says that all is stopped', async () => {
  const companions = new Companions(folder);
  companions.start('job worker', process.execPath, ['-e', says(40, 'console.error("why"); process.exit(3)')]);
  await expect(companions.answers('http://127.0.0.1:9/')).rejects.toThrow('could not be started');
  await companions.ended;
  const text = shown.join('\n');
  expect(text).toContain('The job worker ended by itself (3)');
  expect(text).toContain('job-worker.log');
  expect(text).toMatch(/line 40,\s+why/);
  expect(text).not.toContain('line 2,');
  expect(process.exitCode).toBe(1);
});

it('keeps the log of the run before beside that of this one', async () => {
  for (const word of ['earlier', 'later']) {
    const companions = new Companions(folder);
    companions.start('job worker', process.execPath, ['-e', `console.log('${word}')`]);
    await companions.ended;
  }
  const logs = readdirSync(folder).map((name) => [
    name,
    readFileSync(path.join(folder, name), 'utf8').trim(),
  ]);
  expect(Object.fromEntries(logs)).toEqual({ 'job-worker.before.log': 'earlier', 'job-worker.log': 'later' });
});

it('says nothing of a companion that was told to end', async () => {
  const companions = new Companions(folder);
  companions.start('job worker', process.execPath, ['-e', 'setInterval(() => undefined, 1000)']);
  await companions.stop();
  expect(shown).toEqual([]);
  expect(process.exitCode).toBeUndefined();
});
