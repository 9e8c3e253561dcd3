import { expect, test, type Page, type Locator } from '@playwright/test';
import { noViolations, smallTargets } from './field-checks';
import { keepScreenshot } from './keep-screenshot';
import { planPour } from './office-pour';
import { litPoint, openPour, pointOnMap, readWith } from './on-site';
import { outboxOf } from './outbox';
import { phone, signedIn } from './sign-in';

test.describe.configure({ timeout: 240_000 });

/** Opens a face of a pour, as the sheet leads to it. */
async function openFace(page: Page, face: RegExp): Promise<void> {
  await page.getByRole('link', { name: face }).last().click();
  await expect(page.getByRole('group', { name: /^Points of/ })).toBeVisible();
}

/** Taps on the page since it was asked last: what a hand did, whatever the test called. */
async function countTaps(page: Page): Promise<() => Promise<number>> {
  await page.evaluate(() => {
    const counted = window as unknown as { taps: number };
    counted.taps = 0;
    window.addEventListener('click', () => (counted.taps += 1), true);
  });
  return () =>
    page.evaluate(() => {
      const counted = window as unknown as { taps: number };
      const taps = counted.taps;
      counted.taps = 0;
      return taps;
    });
}

/** Keeps a pour on the device that was not planned for it, and opens it. */
async function keepOnDevice(page: Page, number: string): Promise<void> {
  const row = page.getByRole('listitem').filter({ hasText: number });
  await expect(row).toBeVisible();
  const keep = row.getByRole('button', { name: 'Keep on this device' });
  if (await keep.isVisible()) await keep.tap();
  await openPour(page, number);
}

async function tapReading(page: Page, value: string): Promise<void> {
  for (const digit of value) await page.getByRole('button', { name: digit, exact: true }).tap();
  await page.getByRole('button', { name: /^Keep/ }).tap();
}

const verdict = (page: Page, words: RegExp) => page.getByRole('status').filter({ hasText: words });

// Without a network nothing of this reaches the server: other tests find the pours as they were.
test('twenty readings in a row with the keypad take three taps each, and none to get on', async ({
  browser,
}) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await page.getByRole('link', { name: 'Back to pours' }).click();
  await openPour(page, 'P-014');
  await page.getByRole('link', { name: 'Back to pours' }).click();
  await openPour(page, 'P-017');
  await context.setOffline(true);
  const taps = await countTaps(page);
  let read = 0;

  const readAll = async (count: number) => {
    for (let index = 0; index < count; index += 1) {
      const label = await litPoint(page);
      await taps();
      await tapReading(page, String(44 + (index % 5)));
      await expect(verdict(page, new RegExp(`^${label}: 4\\d mm, (not )?met`))).toHaveCount(1);
      expect(await taps(), `taps for ${label}`).toBeLessThanOrEqual(3);
      read += 1;
    }
  };
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'DG-1');
  await readAll(9);
  await expect(page.getByRole('banner')).toContainText('9 of 9 read');
  await page.getByRole('link', { name: /^Next: Underside/ }).tap();
  await readAll(6);
  await page.getByRole('link', { name: 'Back to P-017' }).first().tap();
  await page.getByRole('link', { name: 'Back to pours' }).tap();
  await page.getByRole('link', { name: /P-014/ }).first().tap();
  await openFace(page, /Quay deck, bay 3, Soffit .*14 of 17/);
  await readAll(3);
  await page.getByRole('link', { name: /^Next: Top/ }).tap();
  await readAll(2);

  expect(read).toBe(20);
  const kept = await outboxOf(page);
  expect(kept.filter((entry) => entry.type === 'reading')).toHaveLength(20);
  await keepScreenshot(page, 'field-reading-twenty');
  await context.close();
});

test('a gauge that types is heard wherever the focus is, and Enter keeps what it typed', async ({
  browser,
}) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'DG-1');

  const focused = [
    page.getByRole('button', { name: '7', exact: true }),
    page.getByRole('button', { name: /^Instrument/ }),
    page.getByRole('link', { name: 'Back to P-017' }),
    page.getByRole('heading', { level: 1 }),
  ];
  for (const [index, place] of focused.entries()) {
    const label = await litPoint(page);
    await place.focus();
    await page.keyboard.type(`4${index}.5`);
    await expect(page.getByLabel('Reading', { exact: true })).toContainText(`4${index}.5`);
    await page.keyboard.press('Enter');
    await expect(verdict(page, new RegExp(`^${label}: 4${index}\\.5 mm, met`))).toHaveCount(1);
    await expect(page.getByRole('dialog')).toHaveCount(0);
  }
  await expect(page.getByRole('banner')).toContainText('4 of 9 read');
  await context.close();
});

test('undo takes the last reading back as a withdrawal, and the point is lit again', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'DG-1');
  const label = await litPoint(page);
  await tapReading(page, '64');
  await expect(page.getByRole('banner')).toContainText('1 of 9 read');
  await page.getByRole('button', { name: 'Undo' }).tap();
  await expect(page.getByRole('banner')).toContainText('0 of 9 read');
  expect(await litPoint(page)).toBe(label);

  const [reading, withdrawal, ...more] = await outboxOf(page);
  expect(more).toEqual([]);
  expect(reading).toMatchObject({ type: 'reading', body: { value: { mm: 64 } } });
  expect(withdrawal).toMatchObject({
    type: 'amendment',
    body: { rootId: reading?.id, replacement: null, reason: expect.stringContaining('undone') },
  });
  await context.close();
});

test('a tap beside the points reads a spot, and a low one asks what next without erasing', async ({
  browser,
}) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'DG-1');

  const map = page.getByRole('group', { name: /^Points of/ });
  const box = (await map.boundingBox())!;
  const spot = await emptiestPlace(map, box);
  await page.touchscreen.tap(spot.x, spot.y);
  await expect(page.getByText('Spot reading')).toBeVisible();
  await tapReading(page, '31');
  await expect(verdict(page, /^spot 1: 31 mm, not met, low/)).toHaveCount(1);
  await expect(pointOnMap(page, 'spot 1')).toHaveAccessibleName(/not met, low/);
  await expect(page.getByRole('link', { name: 'Photo', exact: true })).toBeVisible();
  await expect(page.getByRole('link', { name: 'Nonconformance', exact: true })).toBeVisible();

  await page.getByRole('button', { name: /^Read again/ }).tap();
  await tapReading(page, '46');
  await expect(verdict(page, /^spot 1: 46 mm, met/)).toHaveCount(1);
  await expect(page.getByText('31 mm, read before, still governs.')).toBeVisible();
  await expect(pointOnMap(page, 'spot 1')).toHaveAccessibleName(/not met, low/);

  const [first, second] = await outboxOf(page);
  expect(first).toMatchObject({ type: 'reading', body: { pointId: null, value: { mm: 31 } } });
  expect(second).toMatchObject({ type: 'reading', body: { pointId: `spot:${first?.id}` } });
  await keepScreenshot(page, 'field-reading-spot');
  await context.close();
});

test('one reads the gauge and another types: three taps each, and it counts once who read confirms it', async ({
  browser,
}) => {
  const boss = await signedIn(browser, 'superintendent', phone, '/field');
  await planPour(boss.page, 'P-921', 'Waiting room slab, measured by two');
  await boss.context.close();

  const tomasz = await signedIn(browser, 'secondInspector', phone, '/field');
  await keepOnDevice(tomasz.page, 'P-921');
  await openFace(tomasz.page, /Waiting room slab, Top .*0 of 5/);
  await readWith(tomasz.page, 'DG-1');
  await tomasz.page.getByRole('button', { name: 'Read by you' }).tap();
  const dialog = tomasz.page.getByRole('dialog', { name: 'Who reads the gauge' });
  await expect(dialog.getByRole('radio')).toHaveCount(2);
  await dialog.getByText('read by Noor Valdés').tap();
  await dialog.getByRole('button', { name: 'Done' }).tap();
  const taps = await countTaps(tomasz.page);
  const met = await litPoint(tomasz.page);
  await tapReading(tomasz.page, '46');
  expect(await taps()).toBeLessThanOrEqual(3);
  await expect(
    verdict(tomasz.page, new RegExp(`^${met}: 46 mm, met, not verified until Noor Valdés confirms it`)),
  ).toHaveCount(1);
  await expect(pointOnMap(tomasz.page, met)).toHaveAccessibleName(/not verified/);
  await expect(tomasz.page.getByRole('button', { name: /^Read by Noor/ })).toBeVisible();
  await keepScreenshot(tomasz.page, 'field-reading-typed-for-another');
  const second = await litPoint(tomasz.page);
  await tapReading(tomasz.page, '31');
  await expect(verdict(tomasz.page, new RegExp(`^${second}: 31 mm, not met, low`))).toHaveCount(1);
  await expect(tomasz.page.getByRole('link', { name: 'Photo', exact: true })).toBeVisible();
  await expect(tomasz.page.getByRole('banner').getByRole('link').last()).toContainText('all sent');
  await tomasz.context.close();

  const noor = await signedIn(browser, 'inspector', phone, '/field');
  await keepOnDevice(noor.page, 'P-921');
  await noor.page.getByRole('link', { name: /Read by you, typed by others/ }).tap();
  const typed = noor.page.getByRole('listitem');
  await expect(typed).toHaveCount(2);
  await expect(typed.filter({ hasText: `${second}: 31 mm` })).toContainText('typed by Tomasz Brük');
  await noViolations(noor.page, 'readings to confirm');
  expect(await smallTargets(noor.page)).toEqual([]);
  await keepScreenshot(noor.page, 'field-readings-to-confirm');
  await noor.page.getByRole('button', { name: 'Confirm: I read these 2' }).tap();
  await expect(noor.page.getByText('Nothing waits for your word')).toBeVisible();
  await noor.page.getByRole('link', { name: 'Back to P-921' }).tap();
  await openFace(noor.page, /Waiting room slab, Top .*2 of 5/);
  await expect(pointOnMap(noor.page, met)).toHaveAccessibleName(/, met/);
  await expect(pointOnMap(noor.page, second)).toHaveAccessibleName(/not met, low/);
  await pointOnMap(noor.page, second).tap();
  await noor.page.getByRole('button', { name: /1 reading/ }).tap();
  await expect(noor.page.getByRole('dialog')).toContainText('Noor Valdés, typed by Tomasz Brük');
  await noor.context.close();
});

test('a block that passes or not has two keys, and proves no number', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await page.getByRole('link', { name: /^Instruments/ }).click();
  await page.getByRole('button', { name: 'Add an instrument' }).tap();
  await page.getByLabel('Name on site').fill('Block 38');
  await page.getByLabel('Kind').selectOption('block');
  await page.getByRole('button', { name: 'Add it' }).tap();
  await page.getByRole('link', { name: 'Back to P-017' }).tap();
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'Block 38');
  const label = await litPoint(page);
  await page.getByRole('button', { name: /^Passes/ }).tap();
  await expect(verdict(page, new RegExp(`^${label}: block 38 mm passes, met`))).toHaveCount(1);
  const low = await litPoint(page);
  await page.getByRole('button', { name: /^Does not pass/ }).tap();
  await expect(verdict(page, new RegExp(`^${low}: block 38 mm does not pass, not met, low`))).toHaveCount(1);
  const readings = (await outboxOf(page)).filter((entry) => entry.type === 'reading');
  expect(readings.map((entry) => entry.body)).toEqual([
    expect.objectContaining({ value: null, goNoGo: { blockMm: 38, passes: true } }),
    expect.objectContaining({ value: null, goNoGo: { blockMm: 38, passes: false } }),
  ]);
  await context.close();
});

test('a block check that fails marks at once what was read since the last good one', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await openPour(page, 'P-017');
  await context.setOffline(true);
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await readWith(page, 'DG-1');
  const label = await litPoint(page);
  await tapReading(page, '46');
  await expect(pointOnMap(page, label)).toHaveAccessibleName(/, met/);

  await page.getByRole('button', { name: /^Instrument/ }).tap();
  await page.getByRole('link', { name: /^Block check/ }).tap();
  const card = page.getByRole('article').filter({ has: page.getByRole('heading', { name: 'DG-1' }) });
  await card.getByRole('button', { name: 'Block check' }).tap();
  await page.getByLabel('The instrument shows').fill('53');
  await expect(page.getByText('Outside its tolerance.')).toBeVisible();
  await page.getByRole('button', { name: 'Keep: the check fails' }).tap();
  await expect(card.getByText('suspect', { exact: true })).toBeVisible();

  await page.getByRole('link', { name: 'Back to P-017' }).tap();
  await openFace(page, /Boat ramp, upper, Top .*0 of 9/);
  await expect(pointOnMap(page, label)).toHaveAccessibleName(/not verified/);
  await context.close();
});

/** Where on the map no point is near: points are drawn anew for each pour. */
async function emptiestPlace(
  map: Locator,
  box: { x: number; y: number; width: number; height: number },
): Promise<{ x: number; y: number }> {
  const points = await map.getByRole('button').evaluateAll((buttons) =>
    buttons.map((button) => {
      const { x, y, width, height } = button.getBoundingClientRect();
      return { x: x + width / 2, y: y + height / 2 };
    }),
  );
  const nearest = (at: { x: number; y: number }) =>
    Math.min(...points.map((point) => Math.hypot(point.x - at.x, point.y - at.y)));
  const places = Array.from({ length: 81 }, (_, index) => ({
    x: box.x + (box.width * (1 + (index % 9))) / 10,
    y: box.y + (box.height * (1 + Math.floor(index / 9))) / 10,
  }));
  return places.reduce((best, place) => (nearest(place) > nearest(best) ? place : best));
}
