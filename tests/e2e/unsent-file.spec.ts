import { readFileSync } from 'node:fs';
import { expect, test } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { openPour, picture } from './on-site';
import { appAddress, laptop, phone, signedIn } from './sign-in';

const POUR = 'P-017';

test('work saved to a file on a phone that cannot send is brought in at the office, once, by its author', async ({
  browser,
}) => {
  const site = await signedIn(browser, 'secondInspector', phone, '/field');
  await openPour(site.page, POUR);
  const pourId = /pours\/([0-9a-f-]+)/.exec(site.page.url())?.[1] ?? '';
  await site.context.setOffline(true);
  await site.page.goto(appAddress(`/field/pours/${pourId}/checks/documents`));
  await site.page.getByRole('button', { name: 'Met', exact: true }).first().click();
  await site.page.goto(appAddress(`/field/pours/${pourId}/photos`));
  await site.page
    .getByLabel('Take the photo')
    .setInputFiles({ name: 'ramp.jpg', mimeType: 'image/jpeg', buffer: await picture() });
  await expect(site.page.getByText(/^Kept/)).toBeVisible();
  await site.page.goto(appAddress('/field/not-sent'));
  const saved = site.page.waitForEvent('download');
  await site.page.getByRole('button', { name: /Save to a file/ }).click();
  const path = test.info().outputPath('not-sent.json');
  await (await saved).saveAs(path);
  // The phone is gone: its store with it.
  await site.context.close();

  const other = await signedIn(browser, 'superintendent', laptop, '/account');
  await other.page.getByLabel('The saved file').setInputFiles(path);
  await expect(other.page.getByText(/^This is the work of/)).toBeVisible();
  await expect(other.page.getByRole('button', { name: 'Bring it in' })).toBeHidden();
  await other.context.close();

  const { page } = await signedIn(browser, 'secondInspector', laptop, '/account');
  const field = page.getByLabel('The saved file');
  const cut = readFileSync(path, 'utf8').slice(0, 400);
  await field.setInputFiles({ name: 'cut.json', mimeType: 'application/json', buffer: Buffer.from(cut) });
  await expect(page.getByText(/cut short on the way/)).toBeVisible();
  await field.setInputFiles(path);
  await page.getByRole('button', { name: 'Bring it in' }).click();
  await expect(page.getByText('2 entries kept, 0 there already, 1 photograph sent.')).toBeVisible();
  await keepScreenshot(page, 'unsent-file-brought-in');
  await page.getByRole('button', { name: 'Bring it in' }).click();
  await expect(page.getByText(/^0 entries kept, 2 there already/)).toBeVisible();
  // The photograph counts: its bytes were read, and are what the entry announced.
  await expect(async () => {
    await page.goto(appAddress(`/pours/${pourId}/record`));
    await expect(page.getByText(/digest checked/).first()).toBeVisible({ timeout: 2_000 });
  }).toPass({ timeout: 30_000 });
});
