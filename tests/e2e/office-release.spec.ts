import { expect, test } from '@playwright/test';
import { ask, inspectAndSign, planPour, reading, record } from './office-pour';
import { appAddress, laptop, phone, signedIn } from './sign-in';

test.describe.serial('the release of a pour, from the office', () => {
  let pourId = '';
  let publicPath = '';

  test('is refused with the holds, and the attempt is on record', async ({ browser }) => {
    const { page, context } = await signedIn(browser, 'superintendent', phone, '/pours');
    pourId = await planPour(page, 'P-911', 'Waiting room slab, east');
    await page.goto(appAddress(`/pours/${pourId}/release`));
    await expect(page.getByRole('heading', { name: '4 holds stand in this scope' })).toBeVisible();
    await expect(page.getByRole('button', { name: 'Give the release' })).toHaveCount(0);
    await page.getByText('Ask all the same, for the record').click();
    await page.getByLabel('Reason').fill('The pump is booked');
    await page.getByRole('button', { name: 'Ask for the release' }).click();
    await expect(page.getByText('Refused', { exact: true })).toBeVisible();
    const against = page.getByRole('list', { name: 'Holds that stood against it' });
    await expect(against.getByRole('listitem')).toHaveCount(4);
    await expect(against).toContainText('5 of 5 points not read');
    await page.goto(appAddress(`/pours/${pourId}`));
    await expect(page.locator('#release')).toContainText(
      '1 refused attempt is on record, the last by Marit Ødegård',
    );
    await expect(page.locator('#record')).toContainText('Reason given: The pump is booked');
    await context.close();
  });

  test('is given once nothing stands in the way, and not a second time', async ({ browser }) => {
    await inspectAndSign(browser, pourId);
    const { page, context } = await signedIn(browser, 'superintendent', phone, `/pours/${pourId}`);
    await expect(page.locator('#holds')).toContainText('No hold stands');
    await page.getByRole('link', { name: 'Go to the release' }).click();
    // Placing is planned days ahead, the release stands for a day.
    await expect(page.getByText(/before placing is planned to start/)).toBeVisible();
    await page.getByRole('button', { name: 'Give the release' }).click();
    const itsPage = page.getByRole('link', { name: 'Its page' });
    await expect(itsPage).toBeVisible();
    publicPath = (await itsPage.getAttribute('href')) ?? '';
    await page.reload();
    await expect(page.getByText(/^Release \d+ stands for this scope already/)).toBeVisible();
    await expect(page.getByRole('button', { name: 'Give the release' })).toHaveCount(0);
    await context.close();
  });

  test('has a certificate, which opens', async ({ browser }) => {
    const { page, context } = await signedIn(browser, 'viewer', laptop, `/pours/${pourId}`);
    const certificate = page.getByRole('button', { name: /^Certificate of release/ });
    // The headless browser has nothing to show a PDF with: it is enough that it goes there.
    const opened: string[] = [];
    await context.route(/X-Amz-Signature/, async (route) => {
      if (!route.request().isNavigationRequest()) return route.continue();
      opened.push(route.request().url());
      // An answer without content leaves the page where it is.
      await route.fulfill({ status: 204 });
    });
    // A job writes it; until then the button says so, and can be pressed again.
    await expect(async () => {
      await certificate.click();
      await expect(certificate).toBeEnabled();
      expect(opened.length).toBeGreaterThan(0);
    }).toPass();
    const file = await context.request.get(opened[0]!);
    expect(file.headers()['content-type']).toBe('application/pdf');
    expect((await file.body()).subarray(0, 5).toString()).toBe('%PDF-');
    await context.close();
  });

  test('is made void with a reason, for good', async ({ browser }) => {
    const stranger = await browser.newPage(phone);
    await stranger.goto(appAddress(publicPath));
    await expect(stranger.getByRole('heading', { level: 1 })).toHaveText(/^Release \d+: stands$/);
    await expect(stranger.getByText(/^Chain checked now: \d+ entries of this pour/)).toBeVisible();

    const { page, context } = await signedIn(browser, 'engineer', laptop, `/pours/${pourId}`);
    await page.getByRole('button', { name: /^Make void: release/ }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: 'Make it void' }).click();
    await expect(dialog.getByText('Write something here.')).toBeVisible();
    await dialog.getByLabel('Why').fill('The bulkhead was moved');
    await dialog.getByRole('button', { name: 'Make it void' }).click();
    await expect(dialog).toBeHidden();
    await expect(page.locator('#release')).toContainText('The bulkhead was moved');
    await expect(page.getByRole('button', { name: /^Make void/ })).toHaveCount(0);
    await context.close();

    await stranger.reload();
    await expect(stranger.getByRole('heading', { level: 1 })).toHaveText(/^Release \d+: void$/);
    await expect(stranger.getByText(/^Void since .*: The bulkhead was moved/)).toBeVisible();
    await stranger.close();
  });
});

test('a reading that is not met, from the office, voids what stands', async ({ browser }) => {
  const boss = await signedIn(browser, 'superintendent', laptop, '/pours');
  const pourId = await planPour(boss.page, 'P-912', 'Waiting room slab, west');
  await inspectAndSign(browser, pourId);
  const given = await ask(boss.page, 'POST', `/api/pours/${pourId}/release`, {
    scope: { elementIds: null, limits: '' },
    reason: '',
  });
  expect(given.status).toBe(201);
  await boss.page.goto(appAddress(`/pours/${pourId}`));
  await expect(boss.page.locator('#release')).toContainText(/Release \d+, stands/);
  const point = await boss.page
    .locator('tr[id^="point-"]')
    .first()
    .evaluate((row) => row.id.slice('point-'.length));

  const site = await signedIn(browser, 'inspector', laptop, `/pours/${pourId}`);
  await record(site.page, pourId, 'reading', reading(point, 30));
  await site.context.close();
  // The page follows what others record without being asked.
  await expect(boss.page.locator('#release')).toContainText(/Release \d+, void/);
  await expect(boss.page.locator('#holds')).toContainText('Cover 30 mm, accepted from 40 mm');
  await boss.context.close();
});

test('a public page that does not exist says so', async ({ page }) => {
  const answer = await page.goto(appAddress('/released/not-a-release'));
  expect(answer?.status()).toBe(404);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('There is nothing here that you can see');
});
