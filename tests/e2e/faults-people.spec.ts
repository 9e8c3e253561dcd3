import { expect, test, type Page } from '@playwright/test';
import { openBuildingSite, sessionCookie, type BuildingSite } from '../faults/browser/building-site';
import {
  keepReading,
  notSent,
  openFace,
  openField,
  signIn,
  takeGauge,
  waiting,
} from '../faults/browser/field-page';
import { SeenHistory } from '../faults/browser/on-the-line';
import { thoroughTest } from '../faults/browser/thorough-test';

// What a short run tries of the first is in faults-month: its session ends too.
// A negative control with chance in it, a server that takes anybody's entries, is in tests/faults/shared-tablet.test.ts.
let site: BuildingSite;
test.beforeEach(async () => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
});
test.afterEach(() => site.close());

/** Confirms signing out, and waits until the page was loaded afresh for the next person. */
async function confirmSignOut(page: Page): Promise<void> {
  const afresh = page.waitForEvent('load');
  await page.getByRole('dialog').getByRole('button', { name: 'Sign out' }).click();
  await afresh;
  await expect(page.getByRole('link', { name: 'Sign in' }).first()).toBeVisible();
}

thoroughTest(
  'a session that ends while offline: kept, one can go on, and all is sent after signing in again',
  async ({ context }) => {
    const { first } = site.people;
    const page = await context.newPage();
    await signIn(page, site, first);
    await openField(page, site);
    await takeGauge(page);
    const history = new SeenHistory(site);
    await context.setOffline(true);
    await keepReading(page, 46);
    await site.sql('update sessions set revoked_at = now() where person_id = $1', [first.id]);
    await context.setOffline(false);
    await expect(notSent(page)).toContainText('sign in to send', { timeout: 30_000 });
    await expect(notSent(page)).toContainText('1 not sent yet');
    await keepReading(page, 47);
    await history.note(page, first);
    await page.goto(`${site.app}/field`);
    await expect(page.getByText('Everything you recorded is kept here')).toBeVisible();
    expect((await site.record()).filter((entry) => entry.type === 'reading')).toEqual([]);

    await signIn(page, site, first);
    await expect(notSent(page)).toContainText('all sent', { timeout: 30_000 });
    expect(history.recorded.size).toBe(2);
    expect(await history.violations([{ page, person: first }])).toEqual([]);
  },
);

test('signing out with unsent work: it is said and kept, hidden from the next person, and sent as its author’s only', async ({
  context,
}) => {
  const { first, second } = site.people;
  const page = await context.newPage();
  await signIn(page, site, first);
  await openField(page, site);
  await takeGauge(page);
  const history = new SeenHistory(site);
  // The network lets through everything but people's work.
  await context.route('**/api/sync/push', (route) => route.abort());
  await keepReading(page, 46);
  await keepReading(page, 47);
  await history.note(page, first);
  await page.goto(`${site.app}/field`);
  await page.getByRole('button', { name: 'Sign out' }).click();
  const dialog = page.getByRole('dialog', { name: `Sign out ${first.name}` });
  await expect(dialog).toContainText('2 not sent yet. It stays on this device, hidden from others');
  await confirmSignOut(page);
  await context.unroute('**/api/sync/push');

  await signIn(page, site, second);
  await expect(notSent(page)).toContainText('all sent');
  await expect(page.getByText('Work of others on this device')).toBeVisible();
  await expect(page.getByText(new RegExp(`${first.name}: .*2 `))).toBeVisible();
  await openFace(page, site);
  await takeGauge(page);
  await expect(page.getByRole('banner')).toContainText('0 of 8 read');
  await keepReading(page, 52);
  await history.note(page, second);
  await expect(notSent(page)).toContainText('all sent');
  expect(
    (await site.record()).filter((entry) => entry.type === 'reading').map((entry) => entry.authorId),
  ).toEqual([second.id]);

  await page.goto(`${site.app}/field`);
  await page.getByRole('button', { name: 'Sign out' }).click();
  await confirmSignOut(page);
  await signIn(page, site, first);
  await expect(notSent(page)).toContainText('all sent', { timeout: 30_000 });
  const readings = (await site.record()).filter((entry) => entry.type === 'reading');
  expect(readings.map((entry) => entry.authorId).sort()).toEqual([first.id, first.id, second.id].sort());
  expect(history.recorded.size).toBe(3);
  const found = await history.violations([
    { page, person: first },
    { page, person: second },
  ]);
  expect(found).toEqual([]);
});

thoroughTest(
  'a program that sends what lies there as whoever is signed in is found out (negative control)',
  async ({ context }) => {
    const { first, second } = site.people;
    const page = await context.newPage();
    await signIn(page, site, first);
    await openField(page, site);
    await takeGauge(page);
    const history = new SeenHistory(site);
    // The product itself must not be quicker than what is sent here by hand.
    await context.route('**/api/sync/push', (route) =>
      route.request().headers()['x-by-hand'] ? route.continue() : route.abort(),
    );
    await keepReading(page, 46);
    await history.note(page, first);
    const [entry] = await waiting(page, first.id);
    const send = (authorId: string) =>
      page.evaluate(
        async (body) => {
          const headers = { 'content-type': 'application/json', 'x-by-hand': 'yes' };
          const answer = await fetch('/api/sync/push', { method: 'POST', headers, body });
          return answer.text();
        },
        JSON.stringify({
          ...{ protocol: 1, projectId: site.projectId, deviceId: entry?.deviceId },
          ...{ sentAt: new Date().toISOString(), entries: [{ ...entry, authorId }] },
        }),
      );
    await context.clearCookies({ name: 'cagewright.session' });
    await context.addCookies([sessionCookie(site, second)]);
    expect(await send(first.id)).toContain('wrong-author');
    expect(await send(second.id)).toContain('kept');
    expect(await history.violations([{ page, person: first }])).toEqual([`changed: ${entry?.id}`]);
  },
);
