import { expect, test, type BrowserContext } from '@playwright/test';
import { openBuildingSite, sessionCookie, type BuildingSite } from '../faults/browser/building-site';
import { keepReading, notSent, openFace, openField, takeGauge } from '../faults/browser/field-page';
import { SeenHistory } from '../faults/browser/on-the-line';
import { thoroughTest } from '../faults/browser/thorough-test';

let site: BuildingSite;
test.beforeEach(async () => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
});
test.afterEach(() => site.close());

/** Counts batches under way at once, each held for a while so that others could begin. */
async function countPushes(context: BrowserContext): Promise<() => { most: number; all: number }> {
  let underWay = 0;
  let most = 0;
  let all = 0;
  await context.route('**/api/sync/push', async (route) => {
    all += 1;
    most = Math.max(most, (underWay += 1));
    await new Promise((done) => setTimeout(done, 700));
    await route.continue().catch(() => undefined);
    underWay -= 1;
  });
  return () => ({ most, all });
}

test('of three tabs one sends, and each shows what the others recorded', async ({ context }) => {
  const { first } = site.people;
  await context.addCookies([sessionCookie(site, first)]);
  const page = await context.newPage();
  await openField(page, site);
  await takeGauge(page);
  const tabs = [page, await context.newPage(), await context.newPage()];
  for (const tab of tabs.slice(1)) await openFace(tab, site);
  const counted = await countPushes(context);
  const history = new SeenHistory(site);

  // Offline first, so that all of them have something to send and begin together.
  await context.setOffline(true);
  for (const [index, tab] of tabs.entries()) {
    await tab.bringToFront();
    await keepReading(tab, 51 + index);
    await history.note(tab, first);
  }
  for (const tab of tabs) await expect(notSent(tab)).toContainText('3 not sent yet');
  await context.setOffline(false);
  await Promise.all(tabs.map((tab) => tab.evaluate(() => void window.dispatchEvent(new Event('online')))));
  for (const tab of tabs) await expect(notSent(tab)).toContainText('all sent', { timeout: 30_000 });
  expect(counted().all).toBeGreaterThan(0);
  expect(counted().most).toBe(1);
  expect(await history.violations([{ page, person: first }])).toEqual([]);
});

thoroughTest(
  'without the lock all three send, and nothing is doubled even so (negative control)',
  async ({ context }) => {
    const { first } = site.people;
    await context.addCookies([sessionCookie(site, first)]);
    await context.addInitScript(() =>
      Object.defineProperty(Navigator.prototype, 'locks', { value: undefined }),
    );
    const page = await context.newPage();
    await openField(page, site);
    await takeGauge(page);
    const tabs = [page, await context.newPage(), await context.newPage()];
    for (const tab of tabs.slice(1)) await openFace(tab, site);
    const counted = await countPushes(context);
    const history = new SeenHistory(site);
    await context.setOffline(true);
    await keepReading(page, 54);
    await history.note(page, first);
    for (const tab of tabs) await expect(notSent(tab)).toContainText('1 not sent yet');
    await context.setOffline(false);
    await Promise.all(tabs.map((tab) => tab.evaluate(() => void window.dispatchEvent(new Event('online')))));
    for (const tab of tabs) await expect(notSent(tab)).toContainText('all sent', { timeout: 30_000 });
    expect(counted().most).toBeGreaterThan(1);
    expect(await history.violations([{ page, person: first }])).toEqual([]);
  },
);
