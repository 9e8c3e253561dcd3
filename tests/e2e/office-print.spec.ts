import { expect, test, type Page } from '@playwright/test';
import { appAddress, laptop, signedIn } from './sign-in';

/** As wide as an A4 sheet within its margins, in CSS pixels. */
const PAPER = { width: 718, height: 1046 };

/** What paper cannot do, or would lose: buttons that are drawn (a photo is one), and what reaches over its place. */
const lost = (page: Page) =>
  page.evaluate(() => {
    const main = document.querySelector('main')!;
    const drawn = [...main.querySelectorAll('button, input, select')].filter(
      (one) => one.checkVisibility() && !one.matches('[aria-label^="Look at closely"]'),
    );
    const over = [...main.querySelectorAll('table, svg[role=img]')].filter((one) => {
      const box = one.getBoundingClientRect();
      return box.width > 0 && box.right > main.getBoundingClientRect().right + 1;
    });
    const words = (one: Element) => one.getAttribute('aria-label') ?? one.textContent.trim().slice(0, 40);
    return { drawn: drawn.map(words), over: over.map(words) };
  });

test('on paper a sheet has what is folded away, nothing to press, and nothing cut off', async ({
  browser,
}) => {
  const { page, context } = await signedIn(browser, 'superintendent', laptop, '/pours');
  const pour = await page.getByRole('table').getByRole('link', { name: 'P-014' }).getAttribute('href');
  await page.goto(appAddress('/nonconformances'));
  const decision = await page
    .getByRole('table')
    .getByRole('link', { name: /^Low cover at B3/ })
    .last()
    .getAttribute('href');
  await page.setViewportSize(PAPER);
  await page.emulateMedia({ media: 'print', colorScheme: 'dark' });
  for (const path of [pour!, `${pour}/record`, `${pour}/release`, decision!]) {
    await page.goto(appAddress(path));
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    expect(await lost(page), path).toEqual({ drawn: [], over: [] });
    await expect(page.getByRole('navigation')).toHaveCount(0);
    // Paper is white whatever the light, and the state is printed as it is filled in, not paled away.
    await expect(page.locator('.title-block').first()).toHaveCSS('print-color-adjust', 'exact');
    await expect(page.locator('.sheet-frame').first()).toHaveCSS('background-color', 'rgb(255, 255, 255)');
  }
  await expect(page.getByText('Two bars of B1 over 900 mm').first()).toBeVisible();
  await page.goto(appAddress(pour!));
  await expect(page.locator('tr[id^="point-"]').first()).toBeVisible();
  expect((await page.pdf({ format: 'A4' })).subarray(0, 5).toString()).toBe('%PDF-');
  await context.close();
});
