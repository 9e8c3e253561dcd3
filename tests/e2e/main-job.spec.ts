import { expect, test, type Page } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { mailArrives } from './mail';
import { keepInInches, litPoint, openPour, picture, pointOnMap, readWith } from './on-site';
import { appAddress, demo, DEMO_PASSWORD, laptop, phone, signedIn } from './sign-in';

const POUR = 'P-019';
/** The top of the slab is accepted from 1 1/8 in: two of the twelve are not met, far from each other. */
const firstRound: Record<string, string> = {
  A1: '1',
  A2: '1 9/16',
  A3: '1 3/8',
  A4: '1 5/8',
  B1: '1 1/2',
  B2: '1 7/16',
  B3: '1 1/2',
  C1: '1 11/16',
  C2: '1 1/2',
  C3: '7/8',
  x1: '1 5/8',
  x2: '1 1/2',
};
const checks = ['documents', 'steel', 'supports', 'cleanliness'];

/** The line at the top of each screen of the phone that says what has not been sent. */
const notSent = (page: Page) => page.getByRole('banner').getByRole('link').last();
const back = (page: Page) =>
  page
    .getByRole('banner')
    .getByRole('link', { name: `Back to ${POUR}` })
    .click();

test.describe.configure({ timeout: 400_000 });

test('a pour from plan to release and to its void, partly without a network', async ({ browser }) => {
  const inspector = await signedIn(browser, 'inspector', phone, '/field');
  const site = inspector.page;
  let pourId = '';

  await test.step('the inspector opens the pour online and goes down without a signal', async () => {
    await openPour(site, POUR);
    pourId = /pours\/([0-9a-f-]+)/.exec(site.url())?.[1] ?? '';
    await expect(notSent(site)).toContainText('all sent');
    await inspector.context.setOffline(true);
  });

  await test.step('reads twelve points in inches, two of them not met', async () => {
    await site.getByRole('link', { name: /Pump pit roof slab, Top .*0 of 12/ }).click();
    await readWith(site, 'DG-1');
    for (let read = 0; read < 12; read += 1) {
      const label = await litPoint(site);
      const value = firstRound[label] ?? '';
      await keepInInches(site, value);
      const met = label !== 'A1' && label !== 'C3';
      await expect(
        site.getByRole('status').filter({ hasText: new RegExp(`^${label}: .*, ${met ? 'met' : 'not met'}`) }),
      ).toHaveCount(1);
    }
    await expect(site.getByRole('banner')).toContainText('12 of 12 read');
    await expect(pointOnMap(site, 'A1')).toHaveAccessibleName(/not met, low/);
    await expect(pointOnMap(site, 'C3')).toHaveAccessibleName(/not met, low/);
    await expect(pointOnMap(site, 'B2')).toHaveAccessibleName(/, met/);
    await keepScreenshot(site, 'main-job-read-offline');
    await back(site);
  });

  await test.step('answers the checks', async () => {
    for (const group of checks) {
      await site.goto(appAddress(`/field/pours/${pourId}/checks/${group}`));
      await site.getByRole('button', { name: 'Met', exact: true }).click();
      await expect(site.getByRole('button', { name: 'Met', exact: true })).toHaveAttribute(
        'aria-pressed',
        'true',
      );
    }
    await back(site);
  });

  await test.step('photographs the chairs, since that check asks for it', async () => {
    await site.getByRole('link', { name: /^Photo missing: Chairs/ }).click();
    await site.getByLabel('Take the photo').setInputFiles({
      name: 'chairs.jpg',
      mimeType: 'image/jpeg',
      buffer: await picture(),
    });
    await expect(site.getByText(/^Kept/)).toBeVisible();
    await site.goto(appAddress(`/field/pours/${pourId}`));
  });

  await test.step('raises a nonconformance about one point, with a photo', async () => {
    await site
      .getByRole('link', { name: /Pump pit roof slab, Top/ })
      .first()
      .click();
    await pointOnMap(site, 'C3').click();
    await site.getByRole('button', { name: /^Point C3/ }).click();
    const readings = site.getByRole('dialog', { name: 'Readings at C3' });
    await keepScreenshot(site, 'main-job-point');
    await readings.getByRole('link', { name: 'Nonconformance' }).click();
    await site.getByLabel('What is wrong').fill('Cover of 7/8 in at C3');
    await site.getByLabel('How far it reaches').fill('Two top bars over 3 ft at C3');
    await site.getByLabel(/^Proposal/).fill('Leave the bars and seal the top');
    await site.getByRole('button', { name: 'Raise it' }).click();
    await expect(site.getByRole('heading', { level: 1, name: 'Nonconformance' })).toBeVisible();
    await site
      .getByLabel('Take the photo')
      .setInputFiles({ name: 'c3.jpg', mimeType: 'image/jpeg', buffer: await picture() });
    await expect(site.getByText(/^Kept/)).toBeVisible();
    await keepScreenshot(site, 'main-job-nonconformance');
  });

  await test.step('reloads without a network and finds all of it', async () => {
    await site.goto(appAddress(`/field/pours/${pourId}`));
    await site.reload();
    await expect(
      site.getByRole('link', { name: /Pump pit roof slab, Top .*2 not met · all 12 read/ }),
    ).toBeVisible();
    await expect(site.getByText('Cover of 7/8 in at C3').first()).toBeVisible();
    // Twelve readings, four answers, a nonconformance, two photos and their bytes.
    await expect(notSent(site)).toContainText('21 not sent yet');
    await keepScreenshot(site, 'main-job-reloaded-offline');
  });

  await test.step('the network is back, and it is sent without a touch', async () => {
    await inspector.context.setOffline(false);
    await expect(notSent(site)).toContainText('all sent', { timeout: 60_000 });
    await mailArrives(POUR, /decision|asked/i, demo.engineer);
  });

  const boss = await signedIn(browser, 'superintendent', phone, `/field/pours/${pourId}/holds`);
  const holds = boss.page;

  await test.step('the superintendent sees the holds and reports a correction', async () => {
    await expect(holds.getByRole('heading', { name: 'You, as superintendent' })).toBeVisible();
    await keepScreenshot(holds, 'main-job-holds');
    const cover = holds.getByRole('listitem').filter({ hasText: 'Pump pit roof slab, Top, A1' });
    await cover.getByRole('link', { name: 'Report the correction', exact: true }).click();
    await expect(holds.getByText('A1, Pump pit roof slab, Top', { exact: true })).toBeVisible();
    await expect(holds.getByText(/C3, Pump pit/)).toBeHidden();
    await holds.getByLabel('What was done').fill('Fallen chair set up again, bars tied back');
    await holds.getByRole('button', { name: 'Report it' }).click();
    await expect(holds.getByText('Reported. The inspector looks again.')).toBeVisible();
    await expect(notSent(holds)).toContainText('all sent');
  });

  await test.step('the inspector rechecks the failed point and those beside it', async () => {
    await site.goto(appAddress(`/field/pours/${pourId}`));
    await site
      .getByRole('link', { name: /Pump pit roof slab, Top/ })
      .first()
      .click();
    const again: string[] = [];
    const done = site.getByText('Every point is read');
    // Which of them is lit first depends on where the points were drawn.
    await expect(pointOnMap(site, 'A1')).toHaveAccessibleName('A1 again, not met, low');
    while (!(await done.isVisible())) {
      const label = await litPoint(site);
      again.push(label);
      await keepInInches(site, '1 1/2');
      await expect(
        site.getByRole('status').filter({ hasText: new RegExp(`^${label}: 1 1/2 in, met`) }),
      ).toHaveCount(1);
    }
    expect(again).toContain('A1');
    expect(again.length).toBeGreaterThan(1);
    expect(again.length).toBeLessThan(12);
    await expect(pointOnMap(site, 'A1')).toHaveAccessibleName(/, met/);
    await expect(pointOnMap(site, 'C3')).toHaveAccessibleName(/not met, low/);
    await expect(notSent(site)).toContainText('all sent');
  });

  await test.step('the engineer decides the other, with a condition for after the pour', async () => {
    const { page, context } = await signedIn(browser, 'engineer', laptop, '/nonconformances');
    await page.getByRole('link', { name: /Cover of 7\/8 in at C3/ }).click();
    await expect(page.getByRole('heading', { name: /Cover of 7\/8 in at C3/ }).first()).toBeVisible();
    const sign = page.getByRole('button', { name: 'Sign the decision' });
    await expect(sign).toBeDisabled();
    for (const part of [/^Requirement and clause/, /^Extent/, /^Photographs/])
      await page.locator('summary').filter({ hasText: part }).click();
    await page.getByRole('radio', { name: /^Use as is/ }).check();
    await page
      .getByLabel('Reason')
      .fill('Durability and fire reviewed at 7/8 in over the extent named; strength is not touched.');
    await page.getByRole('group', { name: 'What it accepts' }).getByRole('checkbox').first().check();
    await page.getByRole('button', { name: 'Add a condition' }).click();
    const condition = page.getByRole('group', { name: 'Conditions' });
    await condition.getByLabel('What', { exact: true }).fill('Seal the top at C3');
    await condition.getByLabel('Met when').fill('Two coats, on record');
    await condition.getByLabel('Stage').selectOption({ label: 'after the pour' });
    await page.getByLabel('Your password').fill(DEMO_PASSWORD);
    await keepScreenshot(page, 'main-job-decision');
    await sign.click();
    await expect(page.getByText('accepted', { exact: true }).first()).toBeVisible();
    await mailArrives(POUR, /use as is|decided/i, demo.superintendent);
    await context.close();
  });

  await test.step('the inspector walks a last time and signs; then the superintendent', async () => {
    await site.goto(appAddress(`/field/pours/${pourId}/last-walk`));
    await site.getByText('Met', { exact: true }).click();
    await site.getByRole('button', { name: 'Keep the walk' }).click();
    await expect(site.getByText('Walked', { exact: true })).toBeVisible();
    await sign(site, pourId);
    await keepScreenshot(site, 'main-job-signed');
    await sign(holds, pourId);
  });

  let token = '';
  await test.step('the release is given, and its page is there', async () => {
    const { page, context } = await signedIn(browser, 'superintendent', laptop, `/pours/${pourId}/release`);
    await keepScreenshot(page, 'main-job-release');
    await page.getByRole('button', { name: 'Give the release' }).click();
    const link = page.getByRole('link', { name: 'Its page' });
    token = (await link.getAttribute('href')) ?? '';
    await context.close();
    const stranger = await browser.newPage();
    await stranger.goto(appAddress(token));
    await expect(stranger.getByRole('heading', { level: 1 })).toContainText('stands');
    await expect(stranger.getByText(/^Chain checked now/)).toBeVisible();
    await keepScreenshot(stranger, 'main-job-public-page');
    await stranger.close();
    const mail = await mailArrives(POUR, /release/i, demo.superintendent);
    expect(mail.text).toContain(token);
  });

  await test.step('one more reading that is not met makes it void, and mail says so', async () => {
    await site.goto(appAddress(`/field/pours/${pourId}/faces/roof-top`));
    await pointOnMap(site, 'B2').click();
    await keepInInches(site, '3/4');
    await expect(notSent(site)).toContainText('all sent');
    await mailArrives(POUR, /void/i, demo.superintendent);
    const stranger = await browser.newPage();
    await stranger.goto(appAddress(token));
    await expect(stranger.getByRole('heading', { level: 1 })).toContainText('void');
    await keepScreenshot(stranger, 'main-job-void-page');
    await stranger.close();
  });
});

/** Signs with a finger on the phone, and confirms with the password. */
async function sign(page: Page, pourId: string): Promise<void> {
  await page.goto(appAddress(`/field/pours/${pourId}/sign`));
  const field = page.getByLabel('Empty signature field');
  await field.scrollIntoViewIfNeeded();
  const box = (await field.boundingBox())!;
  await page.mouse.move(box.x + 30, box.y + 60);
  await page.mouse.down();
  for (let step = 1; step <= 12; step += 1)
    await page.mouse.move(box.x + 30 + step * 15, box.y + 60 + (step % 2) * 25);
  await page.mouse.up();
  await page.getByRole('button', { name: 'Sign', exact: true }).click();
  await page.getByLabel('Your password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Confirm the signature' }).click();
  await expect(page.getByLabel('Your password')).toBeHidden();
  await expect(page.getByRole('article').filter({ hasText: 'stands' }).first()).toBeVisible();
}
