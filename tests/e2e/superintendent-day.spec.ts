import { expect, test, type Page } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { openPour, picture } from './on-site';
import { appAddress, laptop, phone, signedIn } from './sign-in';

const POUR = 'P-014';
const notSent = (page: Page) => page.getByRole('banner').getByRole('link').last();

test("a superintendent's morning: holds, corrections with photographs and a shower, without a signal", async ({
  browser,
}) => {
  const { page, context } = await signedIn(browser, 'superintendent', phone, '/field');
  await openPour(page, POUR);
  const pourId = /pours\/([0-9a-f-]+)/.exec(page.url())?.[1] ?? '';
  const at = (path: string) => page.goto(appAddress(`/field/pours/${pourId}${path}`));
  await expect(notSent(page)).toContainText('all sent');
  await context.setOffline(true);

  await test.step('sees what stands, own matters first', async () => {
    await at('/holds');
    await expect(page.getByRole('heading', { level: 2 }).first()).toHaveText(/^You, as superintendent/);
    await keepScreenshot(page, 'superintendent-holds');
  });

  await test.step('reports what was put right, with a photograph', async () => {
    const cover = page
      .getByRole('listitem')
      .filter({ hasText: /^Cover .*Soffit/ })
      .first();
    await cover.getByRole('link', { name: 'Report the correction', exact: true }).click();
    // B3 is before the engineer, and is no part of it.
    await expect(page.getByText(/^A5, .*Soffit$/).first()).toBeVisible();
    await expect(page.getByText(/^B3, /)).toBeHidden();
    await page.getByRole('button', { name: 'Report it' }).click();
    await expect(page.getByRole('textbox', { name: 'What was done' })).toHaveAttribute(
      'aria-invalid',
      'true',
    );
    await page.getByLabel('What was done').fill('Block reset under the bar');
    await page.getByRole('button', { name: 'Report it' }).click();
    await expect(page.getByText('Reported. The inspector looks again.')).toBeVisible();
    await page
      .getByLabel('Take the photo')
      .setInputFiles({ name: 'a5.jpg', mimeType: 'image/jpeg', buffer: await picture() });
    await expect(page.getByText(/^Kept/)).toBeVisible();
  });

  await test.step('records a shower', async () => {
    await at('/events');
    await page.getByText('Rain, or something changed').click();
    const form = page.locator('form').filter({ has: page.getByLabel('Depth of rain') });
    await form.getByLabel('Depth of rain').fill('3');
    await form.getByLabel('What and where').fill('Ten minutes over the deck');
    await form.getByRole('button', { name: 'Put it on record' }).click();
    await expect(page.getByRole('heading', { name: 'On record' })).toBeVisible();
    await expect(page.getByText('not sent yet').first()).toBeVisible();
  });

  await test.step('finds it all after a reload, and it goes out by itself', async () => {
    await at('');
    await page.reload();
    await expect(notSent(page)).toContainText('4 not sent yet');
    await context.setOffline(false);
    await expect(notSent(page)).toContainText('all sent', { timeout: 60_000 });
  });

  await test.step('the office sees the correction, and that A5 is to be read again', async () => {
    const office = await signedIn(browser, 'engineer', laptop, `/pours/${pourId}`);
    await expect(office.page.getByText('Block reset under the bar').first()).toBeAttached();
    await expect(office.page.locator('#holds').getByText(/A5/).first()).toBeVisible();
    await office.context.close();
  });
});
