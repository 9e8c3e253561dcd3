import { expect, test, type Page } from '@playwright/test';
import { openBuildingSite, type BuildingSite } from '../faults/browser/building-site';
import { FaultyProxy } from '../faults/browser/faulty-proxy';
import { keepReading, notSent, openFace, openField, takeGauge } from '../faults/browser/field-page';
import { SeenHistory } from '../faults/browser/on-the-line';
import { OwnChromium, profileFolder } from '../faults/browser/own-chromium';
import { thoroughTest } from '../faults/browser/thorough-test';

let site: BuildingSite;
let proxy: FaultyProxy;
let chromium: OwnChromium;
let profile: ReturnType<typeof profileFolder>;
test.beforeEach(async () => {
  profile = profileFolder();
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
  proxy = await FaultyProxy.start();
  chromium = await OwnChromium.start(profile.folder, { proxy: proxy.port });
  await chromium.signIn(site, site.people.first);
});
test.afterEach(async () => {
  await chromium.kill();
  await proxy.stop();
  await site.close();
  profile.remove();
});

/**
 * From now on the server gives out another version: another worker with another shell in its list. `each` makes it
 * another one every time.
 */
function deploy(version: string, each = false): void {
  let times = 0;
  proxy.rewrite = (path, text) => {
    if (path === '/field') return text.replace('</head>', `<meta name="shell" content="${version}"></head>`);
    if (path !== '/sw.js') return text;
    const name = each ? `${version} ${(times += 1)}` : version;
    const changed = text.replace(/"revision":"\w+","url":"\/field"/, `"revision":"${name}","url":"/field"`);
    if (changed === text) throw new Error('The worker lists no shell.');
    return `${changed}\nself.addEventListener('message', ({ data, ports }) => data === 'version' && ports[0].postMessage('${name}'));`;
  };
}
/** The version of the shell that a tab runs, and of the worker that is in charge of it. */
const versions = (page: Page) =>
  page.evaluate(async () => {
    const told = new MessageChannel();
    const worker = new Promise<string>((heard) => {
      told.port1.onmessage = ({ data }: MessageEvent<string>) => heard(data);
      setTimeout(() => heard('the first'), 300);
    });
    navigator.serviceWorker.controller?.postMessage('version', [told.port2]);
    const shell = document.querySelector('meta[name=shell]')?.getAttribute('content') ?? 'the first';
    return { shell, worker: await worker };
  });
/** As somebody does who takes the phone out of a pocket: the page looks whether there is a new version. */
const looksAgain = (page: Page) =>
  page.evaluate(() => void document.dispatchEvent(new Event('visibilitychange')));
const offer = (page: Page) => page.getByRole('button', { name: 'Update now' });

function countLoads(page: Page): () => number {
  let loads = 0;
  page.on('load', () => (loads += 1));
  return () => loads;
}

test('a new deploy over a half-filled form and older entries: offered, let in where it was agreed to, nothing lost', async () => {
  const { first } = site.people;
  const history = new SeenHistory(site);
  const page = await chromium.page();
  await openField(page, site);
  await takeGauge(page);
  const old = await chromium.page();
  await openFace(old, site);
  proxy.decide = () => 'request lost';
  await keepReading(page, 46);
  await history.note(page, first);
  await page.goto(`${site.app}/field`);
  await expect(notSent(page)).toContainText('1 not sent yet');
  await old.getByRole('button', { name: '4', exact: true }).click();

  deploy('the next');
  const [loads, oldLoads] = [countLoads(page), countLoads(old)];
  await looksAgain(page);
  await expect(offer(page)).toHaveCount(1, { timeout: 30_000 });
  await expect(offer(old)).toHaveCount(0);
  expect(await versions(page)).toEqual({ shell: 'the first', worker: 'the first' });
  await offer(page).click();
  await expect.poll(loads, { timeout: 30_000 }).toBe(1);
  await expect(page.getByRole('link', { name: new RegExp(site.pourNumber) })).toBeVisible();
  expect(await versions(page)).toEqual({ shell: 'the next', worker: 'the next' });
  await expect(offer(page)).toHaveCount(0);
  await expect(notSent(page)).toContainText('1 not sent yet');

  // Under the form nothing has moved: the old program goes on, under the new worker, and saves.
  await expect(old.getByLabel('Reading', { exact: true })).toContainText('4');
  await old.getByRole('button', { name: '8', exact: true }).click();
  await old.getByRole('button', { name: /^Keep/ }).click();
  await expect(old.getByRole('status').filter({ hasText: ': 48 mm' })).toHaveCount(1);
  await keepReading(old, 49);
  await history.note(old, first);
  expect(await versions(old)).toEqual({ shell: 'the first', worker: 'the next' });

  proxy.decide = () => 'delivered';
  await old.evaluate(() => void window.dispatchEvent(new Event('online')));
  for (const tab of [page, old]) await expect(notSent(tab)).toContainText('all sent', { timeout: 60_000 });
  expect([loads(), oldLoads()]).toEqual([1, 0]);
  expect(history.recorded.size).toBe(3);
  expect(await history.violations([{ page, person: first }])).toEqual([]);

  // Once the form is left, that tab is offered the same, and all of it is there afterwards.
  await old.getByRole('link', { name: /Back/ }).first().click();
  await offer(old).click();
  await expect.poll(oldLoads, { timeout: 30_000 }).toBe(1);
  expect(await versions(old)).toEqual({ shell: 'the next', worker: 'the next' });
  await openFace(old, site);
  await expect(old.getByRole('banner')).toContainText('3 of 8 read');
  expect(oldLoads()).toBe(2);
});

thoroughTest(
  'a server that gives out another version each time it is asked makes no page reload by itself',
  async () => {
    const page = await chromium.page();
    await openField(page, site);
    await page.goto(`${site.app}/field`);
    deploy('restless', true);
    const loads = countLoads(page);
    for (let times = 0; times < 4; times += 1) {
      await looksAgain(page);
      await page.waitForTimeout(500);
    }
    await expect(offer(page)).toHaveCount(1, { timeout: 30_000 });
    expect(loads()).toBe(0);
    await offer(page).click();
    await expect.poll(loads, { timeout: 30_000 }).toBe(1);
    await page.waitForTimeout(1500);
    expect(loads()).toBe(1);
  },
);

thoroughTest(
  'a page that loads again for whatever takes over goes round and round there (negative control)',
  async () => {
    const page = await chromium.page();
    await openField(page, site);
    deploy('restless', true);
    // What is easily written: let each new version in at once, and load again when one has taken over.
    await page.addInitScript(() => {
      const { serviceWorker } = navigator;
      serviceWorker.addEventListener('controllerchange', () => location.reload());
      window.addEventListener('load', () => {
        void serviceWorker.ready.then((registration) => {
          registration.addEventListener('updatefound', () => {
            const next = registration.installing;
            next?.addEventListener('statechange', () => {
              if (next.state === 'installed') next.postMessage({ type: 'SKIP_WAITING' });
            });
          });
          return registration.update();
        });
      });
    });
    const loads = countLoads(page);
    await page.goto(`${site.app}/field`);
    await expect.poll(loads, { timeout: 30_000 }).toBeGreaterThan(3);
  },
);
