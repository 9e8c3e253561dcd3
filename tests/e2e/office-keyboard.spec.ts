import { expect, test, type Locator, type Page } from '@playwright/test';
import { appAddress, laptop, signedIn, signIn } from './sign-in';

const openPour = async (page: Page, number: string) => {
  await page.getByRole('table').getByRole('link', { name: number }).click();
  await expect(page.getByRole('heading', { level: 1, name: new RegExp(number) })).toBeVisible();
};

/** In sight, and not under the bar that stays at the top of a long sheet. */
async function expectUncovered(page: Page, target: Locator): Promise<void> {
  await expect(target).toBeInViewport();
  const bar = await page.getByRole('navigation', { name: 'On this sheet' }).boundingBox();
  await expect(async () => {
    const place = await target.boundingBox();
    expect(place!.y).toBeGreaterThanOrEqual(bar!.y + bar!.height);
  }).toPass();
}

test('on a phone every link of the head is in sight, and every part of a sheet a press away', async ({
  page,
}) => {
  await signIn(page, 'superintendent', '/pours');
  const links = page.getByRole('navigation', { name: 'Main' }).getByRole('link');
  await expect(links).toHaveText(['Pours', 'Nonconformances', 'Project', 'Field', 'Calculations']);
  for (const width of [390, 320]) {
    await page.setViewportSize({ width, height: 844 });
    for (const link of await links.all()) {
      const box = (await link.boundingBox())!;
      expect(box.x, `${await link.innerText()} at ${width} px`).toBeGreaterThanOrEqual(0);
      expect(box.x + box.width, `${await link.innerText()} at ${width} px`).toBeLessThanOrEqual(width);
      expect(box.height).toBeGreaterThanOrEqual(36);
    }
  }
  await openPour(page, 'P-014');
  const parts = page.getByRole('navigation', { name: 'On this sheet' });
  await parts.getByRole('button', { name: 'All parts' }).press('Enter');
  const checks = page.locator('#sheet-parts').getByRole('link', { name: /^Checks/ });
  await expect(checks).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(checks).toBeHidden();
  await expect(parts.getByRole('button', { name: 'All parts' })).toBeFocused();
  await page.keyboard.press('Enter');
  await checks.press('Enter');
  await expect(checks).toBeHidden();
  await expectUncovered(page, page.getByRole('heading', { name: 'Checks', exact: true }));
});

test('the keyboard goes past the head of the page, and always shows where it is', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'superintendent', laptop, '/pours');
  await openPour(page, 'P-014');
  await page.reload();
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Skip to the sheet' })).toBeFocused();
  await expect(page.getByRole('link', { name: 'Skip to the sheet' })).toBeInViewport();
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/#main$/);

  // From here on the keyboard goes down the sheet in the order in which it reads, and is never out of sight.
  const passed: string[] = [];
  for (let step = 0; step < 40; step += 1) {
    await page.keyboard.press('Tab');
    const at = await page.evaluate(() => {
      const one = document.activeElement!;
      const { outlineStyle, outlineWidth } = getComputedStyle(one);
      const box = one.getBoundingClientRect();
      const over = document.elementFromPoint(box.x + box.width / 2, box.y + Math.min(8, box.height / 2));
      return {
        name: one.getAttribute('aria-label') ?? one.textContent.trim(),
        main: one.closest('main') !== null,
        drawn: outlineStyle !== 'none' && parseFloat(outlineWidth) >= 2,
        covered: over === null || !(one.contains(over) || over.contains(one)),
      };
    });
    expect(at, `stop ${step + 1}`).toMatchObject({ main: true, drawn: true, covered: false });
    passed.push(at.name);
  }
  expect(passed[0]).toBe('Release');
  const order = ['Look at the release', 'Report a correction', 'Record something else'].map((name) =>
    passed.indexOf(name),
  );
  expect(order).toEqual([...order].sort((a, b) => a - b));
  expect(order[0]).toBeGreaterThan(0);
  await context.close();
});

test('a hold leads to its check or its reading, which opens what it is folded into', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'superintendent', laptop, '/pours');
  await openPour(page, 'P-014');
  for (const kind of ['check', 'point']) {
    const place = page.locator(`#holds a[href^="#${kind}-"]`).first();
    const target = page.locator(`[id="${(await place.getAttribute('href'))!.slice(1)}"]`);
    await page.locator('details', { has: target }).evaluateAll((folds: HTMLDetailsElement[]) => {
      for (const fold of folds) fold.open = false;
    });
    await expect(target).toBeHidden();
    await place.press('Enter');
    await expectUncovered(page, target);
  }
  await context.close();
});

test('a hold, a reading and an entry open by their own address', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'superintendent', laptop, '/pours');
  await openPour(page, 'P-014');
  const pour = new URL(page.url()).pathname;
  const reading = (await page.locator('tr[id^="point-"]').last().getAttribute('id'))!;
  await page.goto(appAddress('/account'));
  await page.goto(appAddress(`${pour}#${reading}`));
  await expectUncovered(page, page.locator(`[id="${reading}"]`));

  await page.goto(appAddress(`${pour}/release`));
  const hold = page.getByRole('main').locator('a[href*="#hold-"]').last();
  const title = await hold.innerText();
  await hold.click();
  await expect(page).toHaveURL(/#hold-/);
  const row = page.locator('#holds li:target');
  await expect(row).toContainText(title);
  await expectUncovered(page, row);

  // What is asked about lies further back in the record than its first page.
  await page
    .locator('#queries')
    .getByRole('link', { name: /^Cover 51 mm at A3/ })
    .click();
  const entry = page.locator('li[id^="entry-"]:target');
  await expect(entry).toContainText('Cover 51 mm at A3');
  await expect(entry).toBeInViewport();

  // Page by page the record leads through every entry once, and back to the latest.
  const pages = page.getByRole('navigation', { name: 'Pages of the record' });
  await page.goto(appAddress(`${pour}/record`));
  const total = Number(/of (\d+) entries/.exec(await pages.innerText())?.[1]);
  expect(total).toBeGreaterThan(50);
  const seen: string[] = [];
  const earlier = pages.getByRole('link', { name: 'Earlier entries' });
  for (;;) {
    const shown = await page.locator('li[id^="entry-"]').evaluateAll((lines) => lines.map(({ id }) => id));
    seen.push(...shown);
    if ((await earlier.count()) === 0) break;
    await earlier.click();
    await expect(page.locator(`[id="${shown[0]}"]`)).toHaveCount(0);
  }
  expect(seen).toHaveLength(total);
  expect(new Set(seen).size).toBe(total);
  await pages.getByRole('link', { name: 'Latest entries' }).click();
  await expect(page.locator(`[id="${seen[0]}"]`)).toBeVisible();
  await context.close();
});
