import type { Bench, Line } from '../bench';
import { figure, limitRow, median, ratioRow, type Row } from '../row';
import { freshPage, freshPhone } from '../world/browser';
import { deviceIdOf, fetchedInto, fillOutbox, saysAtTop } from '../world/device-in-page';
import { keepAsDocuments, replicate } from '../world/peer-in-page';
import { batchesOf, BenchDevice } from '../world/readings';
import { sendFromPage } from '../world/send-batches';
import { plannedSite, type Site } from '../world/site';

const READINGS = 10_000;
const THIRTY_DAYS = { pours: 10, faces: 4, pointsOfFace: 250 };

/** What one round has measured, milliseconds for all readings. */
interface Round {
  bare: number;
  push: number;
  pull: number;
  peerPush: number;
  peerPull: number;
  bytesUp: number;
}

/**
 * Ten thousand readings from a browser's own store to the server and into an empty device: ours, the peer's, and the
 * bare inserts driven from the same browser, in turns.
 */
export const deviceAgainstPeer: Line = async (bench) => {
  const rounds: Round[] = [];
  for (let number = 0; number < bench.rounds; number += 1) rounds.push(await oneRound(bench, number));
  const perSecond = (of: (round: Round) => number) => (READINGS / median(rounds.map(of))) * 1000;
  const bare = perSecond((round) => round.bare);
  const push = perSecond((round) => round.push);
  const peerPush = perSecond((round) => round.peerPush);
  const rows: Row[] = [
    ratioRow({
      work: 'push 10,000 readings from the browser’s store',
      unit: 'readings/s',
      ours: push,
      peer: bare,
      peerName: 'H from the same browser',
      atLeast: 0.4,
    }),
    {
      work: 'the same by the peer',
      measured: `${figure(peerPush)} docs/s`,
      peer: `H ${figure(bare)} readings/s`,
      ratio: figure(peerPush / bare),
      target: '',
      reached: null,
    },
    ratioRow({
      work: 'pull 10,000 readings into an empty device',
      unit: 'readings/s',
      ours: perSecond((round) => round.pull),
      peer: perSecond((round) => round.peerPull),
      peerName: 'peer',
      atLeast: 2,
    }),
    limitRow({
      work: 'bytes up per reading, as the device packs them',
      unit: 'bytes',
      value: median(rounds.map((round) => round.bytesUp)) / READINGS,
      most: 60,
    }),
  ];
  return rows;
};

async function oneRound(bench: Bench, number: number): Promise<Round> {
  const site = await plannedSite(bench.product, THIRTY_DAYS);
  const bare = await bareFromBrowser(bench, site);
  const { push, bytesUp } = await pushFromDevice(bench, site);
  const peer = await peerBothWays(bench, site, `round-${number}`).catch(withoutPeer);
  return { bare, push, bytesUp, pull: await pullIntoDevice(bench, site), ...peer };
}

async function bareFromBrowser({ browser, product }: Bench, site: Site): Promise<number> {
  const { context, page } = await freshPage(browser, product.bare);
  const ms = await sendFromPage(page, batchesOf(new BenchDevice(site).allReadings()));
  await context.close();
  return ms;
}

async function pushFromDevice(
  { browser, product }: Bench,
  site: Site,
): Promise<{ push: number; bytesUp: number }> {
  const { inspector } = site.people;
  const { context, page } = await freshPhone(browser, product.app, inspector);
  let bytesUp = 0;
  const sizes: Promise<void>[] = [];
  page.on('requestfinished', (request) => {
    if (!request.url().endsWith('/api/sync/push')) return;
    sizes.push(
      request.sizes().then((size) => void (bytesUp += size.requestBodySize + size.requestHeadersSize)),
    );
  });
  await page.goto(`${product.app}/field`);
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await saysAtTop(page, 'up to date');
  await context.setOffline(true);
  const device = new BenchDevice(site, await deviceIdOf(page));
  await fillOutbox(page, inspector.id, device.allReadings());
  await page.reload();
  await saysAtTop(page, `${READINGS} not sent yet`);

  const online = page.evaluate(
    () =>
      new Promise<number>((resolve) =>
        addEventListener('online', () => resolve(performance.now()), { once: true }),
      ),
  );
  const sent = saysAtTop(page, 'all sent');
  await context.setOffline(false);
  const push = (await sent) - (await online);
  await Promise.all(sizes);
  await context.close();
  if (bytesUp === 0) throw new Error('No request of the device was seen.');
  return { push, bytesUp };
}

async function pullIntoDevice({ browser, product }: Bench, site: Site): Promise<number> {
  const { inspector } = site.people;
  const { context, page } = await freshPhone(browser, product.app, inspector);
  await page.goto(`${product.app}/field`, { waitUntil: 'commit' });
  const ms = await fetchedInto(page, inspector.id, READINGS);
  await context.close();
  return ms;
}

async function peerBothWays(
  { browser, product }: Bench,
  site: Site,
  database: string,
): Promise<{ peerPush: number; peerPull: number }> {
  const address = await product.peer();
  const from = await freshPage(browser, address);
  await keepAsDocuments(from.page, new BenchDevice(site).allReadings());
  const peerPush = await replicate(from.page, 'to', database, READINGS);
  await from.context.close();
  const into = await freshPage(browser, address);
  const peerPull = await replicate(into.page, 'from', database, READINGS);
  await into.context.close();
  return { peerPush, peerPull };
}

/** What is measured against nothing else is printed all the same. */
function withoutPeer(error: unknown): { peerPush: number; peerPull: number } {
  console.error(error);
  process.exitCode = 1;
  return { peerPush: Number.NaN, peerPull: Number.NaN };
}
