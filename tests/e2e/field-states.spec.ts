import { gunzipSync } from 'node:zlib';
import { expect, test, type Page } from '@playwright/test';
import { fitsEveryShape, noViolations, smallTargets } from './field-checks';
import { keepScreenshot } from './keep-screenshot';
import { litPoint, openPour, readWith } from './on-site';
import { outboxOf } from './outbox';
import { appAddress, phone, signedIn, signIn } from './sign-in';

test.describe.configure({ timeout: 240_000 });

const bar = (page: Page) => page.getByRole('banner').getByRole('link').last();

async function openTop(page: Page): Promise<void> {
  await page
    .getByRole('link', { name: /Boat ramp, upper, Top .*of 9/ })
    .last()
    .click();
  await expect(page.getByRole('group', { name: /^Points of/ })).toBeVisible();
}

async function type(page: Page, value: string): Promise<void> {
  await page.keyboard.type(value);
  await page.keyboard.press('Enter');
}

test('without a network the phone opens again with everything, and says what waits', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await openTop(page);
  await readWith(page, 'DG-1');
  await type(page, '46');
  await expect(bar(page)).toContainText('1 not sent yet');
  await expect(bar(page)).toContainText('no network');

  // Nothing is called empty or sent while the store is being read: the words on the page are watched from the start.
  await page.addInitScript(() => {
    const said: string[] = [];
    (window as unknown as { said: string[] }).said = said;
    new MutationObserver(() => said.push(document.body?.innerText ?? '')).observe(document, {
      childList: true,
      subtree: true,
      characterData: true,
    });
  });
  for (const [address, there] of [
    ['/field/not-sent', /1 not sent/],
    ['/field', /P-017/],
  ] as const) {
    await page.goto(appAddress(address));
    await expect(page.getByRole('main')).toContainText(there);
    const said = await page.evaluate(() => (window as unknown as { said: string[] }).said.join('\n'));
    expect(said).not.toMatch(/Everything is sent|No project yet|Sign in to|all sent/);
  }
  await page.goto(appAddress('/field/not-sent'));
  await expect(page.getByText('There is no connection to the server.')).toBeVisible();
  await keepScreenshot(page, 'field-state-offline');
  await context.close();
});

test('a refused reading says why where it was read, and is recorded again from what was typed', async ({
  browser,
}) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  const sentence = 'You may not record this in this pour any more.';
  await context.route('**/api/sync/push', async (route) => {
    const sent = route.request().postDataBuffer() ?? Buffer.alloc(0);
    const text = sent[0] === 0x1f ? gunzipSync(sent).toString() : sent.toString();
    const { entries } = JSON.parse(text) as { entries: { id: string }[] };
    const outcomes = entries.map(({ id }) => ({ id, outcome: 'refused', code: 'not-allowed', sentence }));
    await route.fulfill({ json: { serverTime: new Date().toISOString(), outcomes } });
  });
  await openTop(page);
  await readWith(page, 'DG-1');
  const label = await litPoint(page);
  await type(page, '46.5');
  await expect(page.getByRole('alert').filter({ hasText: sentence })).toBeVisible();
  await expect(bar(page)).toContainText('1 refused');
  await expect(page.getByRole('banner')).toContainText('0 of 9 read');

  await page.getByRole('link', { name: /Refused by the server/ }).click();
  await expect(page.getByRole('heading', { name: 'Refused' })).toBeVisible();
  await expect(page.getByRole('main')).toContainText(sentence);
  await noViolations(page, 'the tray');
  expect(await smallTargets(page)).toEqual([]);
  await keepScreenshot(page, 'field-state-refused');

  // From here on there is no network: what is recorded again waits.
  await context.unroute('**/api/sync/push');
  await context.setOffline(true);
  await page.getByRole('link', { name: 'Record it again' }).click();
  expect(await litPoint(page)).toBe(label);
  await expect(page.getByLabel('Reading', { exact: true })).toContainText('46.5');
  await page.getByRole('button', { name: /^Keep/ }).tap();
  await expect(page.getByRole('banner')).toContainText('1 of 9 read');
  await expect(bar(page)).toContainText('1 not sent yet');
  await expect(bar(page)).not.toContainText('refused');
  expect(await outboxOf(page)).toMatchObject([{ type: 'reading', body: { value: { mm: 46.5 } } }]);
  await context.close();
});

test('a refused nonconformance comes back with every field', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  const pour = new URL(page.url()).pathname;
  await context.route('**/api/sync/push', async (route) => {
    const sent = route.request().postDataBuffer() ?? Buffer.alloc(0);
    const text = sent[0] === 0x1f ? gunzipSync(sent).toString() : sent.toString();
    const { entries } = JSON.parse(text) as { entries: { id: string }[] };
    const outcomes = entries.map(({ id }) => ({ id, outcome: 'refused', code: 'invalid', sentence: 'No.' }));
    await route.fulfill({ json: { serverTime: new Date().toISOString(), outcomes } });
  });
  await page.goto(appAddress(`${pour}/nonconformance`));
  await page.getByLabel('What is wrong').fill('Two bars cut at the sleeve');
  await page.getByLabel('How far it reaches').fill('B1, two bars at grid 4');
  await page.getByLabel('Proposal').fill('Two bars beside the sleeve, full lap');
  await page.getByLabel('Answer needed by').fill('2026-12-04T15:30');
  await page.getByRole('button', { name: 'Raise it' }).click();
  await expect(page.getByText('The server refused this nonconformance')).toBeVisible();
  await page.getByRole('link', { name: 'See what was refused' }).click();
  await page.getByRole('link', { name: 'Record it again' }).click();
  await expect(page.getByLabel('What is wrong')).toHaveValue('Two bars cut at the sleeve');
  await expect(page.getByLabel('How far it reaches')).toHaveValue('B1, two bars at grid 4');
  await expect(page.getByLabel('Proposal')).toHaveValue('Two bars beside the sleeve, full lap');
  await expect(page.getByLabel('Answer needed by')).toHaveValue('2026-12-04T15:30');
  await context.close();
});

test('a clock that is off by more than five minutes is told, and marked on what is recorded', async ({
  browser,
}) => {
  const context = await browser.newContext(phone);
  const page = await context.newPage();
  await page.addInitScript(() => {
    const real = Date.now.bind(Date);
    const slow = 23 * 60_000;
    Date.now = () => real() - slow;
  });
  await signIn(page, 'inspector', '/field');
  await expect(page.getByText('The clock is off')).toBeVisible();
  await expect(page.getByText("This device's clock is 23 minutes slow.")).toBeVisible();
  await openPour(page, 'P-017');
  const pour = new URL(page.url()).pathname;
  await context.setOffline(true);
  await openTop(page);
  await readWith(page, 'DG-1');
  await type(page, '46');
  await expect(page.getByRole('banner')).toContainText('1 of 9 read');
  const [reading] = await outboxOf(page);
  await page.goto(appAddress(`${pour}/entries/${reading?.id}`));
  await expect(page.getByText("Recorded while the device's clock was 23 minutes slow")).toBeVisible();
  await context.close();
});

test('the phone works in a browser without vibration, sharing, Background Sync, locks or lasting storage', async ({
  browser,
}) => {
  const context = await browser.newContext(phone);
  const page = await context.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(error.message));
  await page.addInitScript(() => {
    const gone = (of: object, name: string) => Object.defineProperty(of, name, { value: undefined });
    gone(Navigator.prototype, 'vibrate');
    gone(Navigator.prototype, 'share');
    gone(Navigator.prototype, 'canShare');
    gone(Navigator.prototype, 'locks');
    gone(StorageManager.prototype, 'persist');
    gone(StorageManager.prototype, 'persisted');
    gone(StorageManager.prototype, 'estimate');
    gone(window, 'BroadcastChannel');
    gone(window, 'SyncManager');
    gone(window, 'CompressionStream');
    gone(ServiceWorkerRegistration.prototype, 'sync');
  });
  await signIn(page, 'inspector', '/field');
  await openPour(page, 'P-017');
  const pour = new URL(page.url()).pathname;
  await context.setOffline(true);
  await openTop(page);
  await readWith(page, 'DG-1');
  await type(page, '46');
  await expect(page.getByRole('banner')).toContainText('1 of 9 read');
  await page.goto(appAddress(`${pour}/fix-list`));
  await expect(page.getByRole('heading', { level: 1, name: /Fix list/ })).toBeVisible();
  await page.goto(appAddress('/field/not-sent'));
  await expect(page.getByText('This browser does not say how much is used.')).toBeVisible();
  await expect(page.getByText('This browser does not say whether it keeps it.')).toBeVisible();
  expect(errors).toEqual([]);
  await context.close();
});

test('a screen whose piece did not arrive says so, and opens once it can be fetched', async ({ browser }) => {
  const context = await browser.newContext({ ...phone, serviceWorkers: 'block' });
  const page = await context.newPage();
  await signIn(page, 'inspector', '/field');
  await expect(page.getByRole('link', { name: /P-017/ })).toBeVisible();
  await context.setOffline(true);
  await page.getByRole('link', { name: /P-017/ }).click();
  await expect(page.getByText('This screen did not arrive')).toBeVisible();
  await fitsEveryShape(page, 'a piece that is missing', false);
  await keepScreenshot(page, 'field-state-piece-missing');
  await context.setOffline(false);
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page.getByRole('heading', { name: 'Left for you' })).toBeVisible();
  await context.close();
});
