import { expect, test, type Page } from '@playwright/test';
import { slabInput } from '../stories/measured-slab';
import type { MeasurementRule } from '@/lib/inspection/measurement-rule';
import { fitsEveryShape } from './field-checks';
import { keepScreenshot } from './keep-screenshot';
import { ask, projectOf } from './office-pour';
import { litPoint, openPour } from './on-site';
import { phone, signedIn } from './sign-in';

/** `FIELD_SCREENS=all` tries every screen at each width by day and by night, and every group of checks. */
const every = process.env.FIELD_SCREENS === 'all';
test.describe.configure({ timeout: 900_000 });

/** Goes to another screen of the phone within the page, as its own links do. */
async function go(page: Page, path: string): Promise<void> {
  await page.evaluate((to) => window.history.pushState(null, '', to), path);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await expect(page.getByText(/^(Opening|Fetching)/)).toHaveCount(0);
}

/** Looks at what is on the page in every shape, and keeps a picture of it on a phone by day. */
async function look(page: Page, name: string): Promise<void> {
  await fitsEveryShape(page, name, every);
  await keepScreenshot(page, `field-${name}`);
}

/** Opens a screen of a pour by its path, or presses through to it, and looks at it. */
async function lookAt(page: Page, name: string, path: string): Promise<void> {
  await go(page, path);
  await look(page, name);
}

/** What opens over a screen is looked at and shut again. */
async function lookAtDialog(page: Page, name: string, opener: ReturnType<Page['getByRole']>): Promise<void> {
  await opener.click();
  await expect(page.getByRole('dialog')).toBeVisible();
  await look(page, name);
  await page.keyboard.press('Escape');
  await expect(page.getByRole('dialog')).toHaveCount(0);
}

/** One of each form in which something is measured. */
const measured: Record<string, MeasurementRule> = {
  'bar-size': { rule: 'bar-size', layerId: 'b1' },
  'bar-count': { rule: 'bar-count', layerId: 'b2', bay: null },
  'clear-distance': { rule: 'clear-distance', layerId: 'b1', place: 'layer', code: 'en-1992-1-1' },
  'support-height': {
    rule: 'support-height',
    faceId: 'top',
    carriedLayerIds: ['t1', 't2'],
    standsOn: { faceId: 'soffit', layerIds: ['b1', 'b2'], otherMm: 0 },
    ownMinusMm: 10,
  },
  'tie-share': {
    rule: 'tie-share',
    layerId: 't1',
    otherLayerId: 't2',
    pattern: 'alternate',
    sharePercent: null,
  },
  'share-lapped': { rule: 'share-lapped', lapMm: 860, code: 'en-1992-1-1', mostPercent: 50 },
  coupler: { rule: 'coupler', type: 'Threaded 16', mostThreads: 2 },
  starter: {
    rule: 'embedment',
    layerId: 'b1',
    tolerance: 'none',
    ownMinusMm: null,
    lengthMm: 620,
    starter: true,
  },
  'coating-damage': {
    rule: 'coating-damage',
    layerId: 'epoxy',
    damagedMostPercent: null,
    patchedMostPercent: null,
  },
  'tendon-height': {
    rule: 'tendon-height',
    heightMm: 220,
    from: 'soffit',
    to: 'centre',
    band: 'as-3600',
    ownMm: null,
  },
  'fibre-dosage': { rule: 'fibre-dosage', fibreType: 'steel hooked 60', kgPerM3: 30, minusPercent: 10 },
};

/** Plans a pour that asks for one of each. */
async function planMeasured(page: Page, number: string): Promise<string> {
  const measurements = Object.entries(measured).map(([id, rule]) => ({
    id,
    title: `Measured: ${id}`,
    elementId: 'slab',
    required: 1,
    loaded: id === 'support-height',
    rule,
  }));
  const { status, body } = await ask(page, 'POST', '/api/pours', {
    projectId: await projectOf(page),
    number,
    title: 'Ramp slab, all that can be measured',
    location: 'Grid A',
    plannedAt: new Date(Date.now() + 5 * 86_400_000).toISOString(),
    reason: 'First issue',
    plan: slabInput({ measurements }),
  });
  expect(status, JSON.stringify(body)).toBe(201);
  return body.pourId as string;
}

// Without a network from the first pour on: what is typed here reaches no other test.
test('the screens of an inspector fit a small phone, a phone and a tablet, by day and by night', async ({
  browser,
}) => {
  const boss = await signedIn(browser, 'superintendent', phone, '/field');
  const slab = await planMeasured(boss.page, 'P-931');
  await boss.context.close();

  const { context, page } = await signedIn(browser, 'inspector', phone, '/field');
  await page.getByRole('button', { name: 'Choose what is kept here' }).click();
  const row = page.getByRole('listitem').filter({ hasText: 'P-931' });
  const keep = row.getByRole('button', { name: 'Keep on this device' });
  if (await keep.isVisible()) await keep.click();
  await expect(row.getByRole('button', { name: 'Take off this device' })).toBeVisible();
  if (every) await look(page, 'pours-chosen');
  await page.getByRole('button', { name: 'Done choosing' }).click();
  // What a browser sends that would install the application.
  await page.evaluate(() =>
    window.dispatchEvent(
      Object.assign(new Event('beforeinstallprompt'), { prompt: () => Promise.resolve() }),
    ),
  );
  await expect(page.getByRole('heading', { name: 'Install on this device' })).toBeVisible();
  await look(page, 'pours');
  await page.getByRole('button', { name: 'Install' }).click();
  await expect(page.getByRole('heading', { name: 'Install on this device' })).toHaveCount(0);
  await page.getByRole('link', { name: /P-931/ }).click();
  await expect(page.getByRole('heading', { name: 'Left for you' })).toBeVisible();
  await go(page, '/field');
  await openPour(page, 'P-014');
  const pour = new URL(page.url()).pathname;
  await look(page, 'pour');
  const groups = await page
    .getByRole('main')
    .locator('a[href*="/checks/"]')
    .evaluateAll((links) => links.map((link) => link.getAttribute('href') ?? ''));
  for (const group of every ? groups : groups.slice(4, 5))
    await lookAt(page, `checks-${group.split('/').at(-1)}`, group);
  if (every) await lookAt(page, 'checks', `${pour}/checks`);

  await lookAt(page, 'reading', `${pour}/faces/soffit`);
  await lookAtDialog(page, 'reading-instrument', page.getByRole('button', { name: /^Instrument/ }));
  if (every) await lookAtDialog(page, 'reading-steel', page.getByRole('button', { name: /^To/ }));
  await lookAtDialog(page, 'reading-read-by', page.getByRole('button', { name: /^Read by/ }));
  if (every) await lookAtDialog(page, 'reading-unit', page.getByRole('button', { name: /^Unit/ }));
  await page
    .getByRole('group', { name: /^Points of/ })
    .getByRole('button', { name: /^A5, not met/ })
    .click();
  expect(await litPoint(page)).toBe('A5');
  await lookAtDialog(page, 'reading-readings', page.getByRole('button', { name: /^Point A5/ }));
  await page.getByRole('button', { name: /^Point A5/ }).click();
  const reading = await page.getByRole('dialog').getByRole('link').first().getAttribute('href');
  await page.keyboard.press('Escape');
  await lookAt(page, 'entry', reading ?? '');
  if (every) await lookAt(page, 'face-gone', `${pour}/faces/gone`);

  if (every) await lookAt(page, 'measurements', `${pour}/measurements`);
  await lookAt(page, 'measurement-not-met', `${pour}/measurements/chair-spacing`);
  // Those left out are a field or a keypad, as others that are looked at.
  const alike = ['bar-count', 'clear-distance', 'share-lapped', 'fibre-dosage'];
  for (const id of Object.keys(measured).filter((one) => every || !alike.includes(one)))
    await lookAt(page, `measurement-${id}`, `/field/pours/${slab}/measurements/${id}`);

  for (const part of ['holds', 'fix-list', 'photos', 'nonconformance', 'correction', 'confirm'])
    await lookAt(page, part, `${pour}/${part}`);
  await go(page, `${pour}/events`);
  for (const summary of await page.locator('summary').all()) await summary.click();
  await look(page, 'events');
  for (const part of ['last-walk', 'sign']) await lookAt(page, part, `${pour}/${part}`);
  await lookAt(page, 'instruments', `${pour}/instruments`);
  await lookAtDialog(page, 'block-check', page.getByRole('button', { name: 'Block check' }).first());
  await lookAtDialog(page, 'instrument-new', page.getByRole('button', { name: 'Add an instrument' }));
  await go(page, pour);
  await page.getByRole('link', { name: /Low cover at B3/ }).click();
  await look(page, 'nonconformance-shown');

  await lookAt(page, 'nothing-unsent', '/field/not-sent');
  await lookAt(page, 'not-here', '/field/no-such-screen');
  if (every) await lookAt(page, 'unheard-of', '/field/pours/unheard-of');
  if (every) await lookAt(page, 'entry-gone', `${pour}/entries/gone`);
  await lookAtDialog(page, 'hand-over', page.getByRole('button', { name: /Hand over$/ }));
  await lookAt(page, 'pin', '/field/pin');
  for (const last of ['Next', 'Keep']) {
    for (const digit of '2580') await page.getByRole('button', { name: digit, exact: true }).click();
    await page.getByRole('button', { name: last, exact: true }).click();
  }
  await expect(page.getByText('The PIN is kept on this device')).toBeVisible();
  await page.getByRole('button', { name: /Hand over$/ }).click();
  await expect(page.getByRole('heading', { name: 'Who is holding this device?' })).toBeVisible();
  await look(page, 'who-is-holding');
  await context.close();
});

test('the screens of a superintendent fit too', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'superintendent', phone, '/field');
  await openPour(page, 'P-014');
  const pour = new URL(page.url()).pathname;
  await look(page, 'superintendent-pour');
  await lookAt(page, 'superintendent-face', `${pour}/faces/soffit`);
  if (every) await lookAt(page, 'superintendent-checks', `${pour}/checks/supports`);
  await lookAt(page, 'superintendent-holds', `${pour}/holds`);
  await page.getByRole('link', { name: 'Report the correction', exact: true }).first().click();
  await expect(page.getByLabel('What was done')).toBeVisible();
  await look(page, 'superintendent-correction');
  if (every) await lookAt(page, 'superintendent-sign', `${pour}/sign`);
  await go(page, `${pour}/events`);
  for (const summary of await page.locator('summary').all()) await summary.click();
  await look(page, 'superintendent-events');
  await context.close();
});

test('the screens of the crew fit too, in English and in Spanish', async ({ browser }) => {
  const { context, page } = await signedIn(browser, 'crew', phone, '/field');
  await look(page, 'crew-pours');
  await page.getByRole('link', { name: /P-014/ }).click();
  await expect(page.getByRole('heading', { level: 1, name: /^Fix list P-014/ })).toBeVisible();
  await look(page, 'crew-list-english');
  await page.getByRole('button', { name: 'Español' }).click();
  await expect(page.getByRole('heading', { level: 1, name: /^Lista de correcciones/ })).toBeVisible();
  await look(page, 'crew-list-spanish');
  await page.getByRole('link', { name: 'Avisar que está corregido' }).first().click();
  await expect(page.getByLabel('Qué se hizo')).toBeVisible();
  await look(page, 'crew-correction');
  await context.close();
});
