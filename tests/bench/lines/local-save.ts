import { build } from 'esbuild';
import path from 'node:path';
import { root } from '../../../scripts/setup/folders.mjs';
import type { Line } from '../bench';
import { figure, percentile } from '../row';
import { freshPhone, PHONE_SLOWDOWN, slowDown } from '../world/browser';
import { readingBody } from '../world/readings';
import { plannedSite } from '../world/site';

const SAVES = 300;
const FRAME_MS = 1000 / 60;

/** The device's own code as one script, without screens. */
async function deviceScript(): Promise<string> {
  const { outputFiles } = await build({
    entryPoints: [path.join(root, 'tests/bench/pages/save-page.ts')],
    bundle: true,
    write: false,
    format: 'iife',
    target: 'es2022',
    alias: { '@': root },
    define: { 'process.env.NODE_ENV': '"production"' },
  });
  return outputFiles[0]?.text ?? '';
}

/**
 * Saving a reading on the phone, record and outbox in one strict transaction and taken into memory, against putting a
 * record of the same content into a bare store with the same durability, in turns on one page.
 */
export const localSave: Line = async ({ browser, product }) => {
  const site = await plannedSite(product, { pours: 1, faces: 2, pointsOfFace: 250 });
  const { context, page } = await freshPhone(browser, product.app, site.people.inspector, {
    serviceWorkers: 'block',
  });
  const script = await deviceScript();
  // An empty page below the phone's own address, so that the device has its store, cookies and session.
  await page.route('**/field/save', (route) =>
    route.fulfill({ contentType: 'text/html', body: '<!doctype html><title>Save</title>' }),
  );
  await page.addInitScript({ content: script });
  await page.goto(`${product.app}/field/save`);
  const pour = site.pours[0];
  if (!pour) throw new Error('No pour was planned.');
  const at = { projectId: site.projectId, pourId: pour.id };
  const bodies = pour.points.slice(0, SAVES).map((point) => readingBody(point, 46, site.gaugeId));
  await page.evaluate((place) => window.savePage.open(place), at);
  await context.setOffline(true);
  await slowDown(page);
  const times = await page.evaluate(
    ({ place, readings }) => window.savePage.saveInTurns(place, JSON.parse(readings) as object[]),
    // As text: the protocol's own types of nested values are too deep for the compiler.
    { place: at, readings: JSON.stringify(bodies) },
  );
  await context.close();
  const [device, bare] = [percentile(times.device, 0.95), percentile(times.bare, 0.95)];
  return [
    {
      work: `local save, record and outbox, ${PHONE_SLOWDOWN}x slower processor, p95`,
      measured: `${figure(device)} ms`,
      peer: `bare strict put ${figure(bare)} ms`,
      ratio: figure(device / bare),
      target: `at most ${figure(FRAME_MS)} ms more`,
      reached: device - bare <= FRAME_MS,
    },
  ];
};
