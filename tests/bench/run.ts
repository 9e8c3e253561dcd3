import type { Bench, Line } from './bench';
import { deviceAgainstPeer } from './lines/device-against-peer';
import { fieldShell } from './lines/field-shell';
import { fold } from './lines/fold';
import { localSave } from './lines/local-save';
import { openSheet } from './lines/open-sheet';
import { poursList } from './lines/pours-list';
import { pushRoute } from './lines/push-route';
import { release } from './lines/release';
import { printTable } from './print-table';
import type { Row } from './row';
import { launchBrowser } from './world/browser';
import { startProduct } from './world/product';

const lines: Record<string, Line> = {
  device: deviceAgainstPeer,
  route: pushRoute,
  save: localSave,
  fold,
  sheet: openSheet,
  shell: fieldShell,
  release,
  list: poursList,
};

/** A whole number from the environment, at least 1. */
function option(name: string, otherwise: number): number {
  const value = Number(process.env[name] ?? otherwise);
  if (!Number.isInteger(value) || value < 1) throw new Error(`${name} has to be a whole number from 1 on.`);
  return value;
}

const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !(name in lines));
if (unknown.length > 0)
  throw new Error(`No such line: ${unknown.join(', ')}. There are: ${Object.keys(lines).join(', ')}.`);

const options = { rounds: option('BENCH_ROUNDS', 3), scale: option('BENCH_SCALE', 20) };
const product = await startProduct();
const browser = await launchBrowser();
const bench: Bench = { product, browser, ...options };
const rows: Row[] = [];
try {
  for (const [name, line] of Object.entries(lines)) {
    if (asked.length > 0 && !asked.includes(name)) continue;
    console.log(`Measuring: ${name} …`);
    try {
      rows.push(...(await line(bench)));
    } catch (error) {
      process.exitCode = 1;
      const why = error instanceof Error ? error.message : String(error);
      console.error(error);
      rows.push({
        work: name,
        measured: 'could not be measured',
        peer: '',
        ratio: '',
        target: why,
        reached: null,
      });
    }
  }
} finally {
  await browser.close();
  await product.stop();
}
console.log(
  `\nMedians of ${options.rounds} rounds; H is the bare server, the peer is PouchDB with its own server.\n`,
);
printTable(rows);
