import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { appAddress, laptop, phone, signedIn } from './sign-in';

interface Walk {
  slug: string;
  title: string;
  /** Inputs of the link, and what its result says. */
  link: Record<string, string>;
  says: string;
  /** An input that is changed, and what the result and the address say then. */
  change: { label: string; name: string; to: string; says: string };
  /** What cannot be, and what is said beside the field. */
  wrong: { label: string; to: string; says: RegExp };
}

const walks: Walk[] = [
  {
    slug: 'cover',
    title: 'Required cover',
    link: {
      units: 'mm',
      basis: 'en-1992',
      element: 'beam',
      meeting: 'formed',
      thickness: '500',
      enExposure: 'XC1',
      enExposure2: 'none',
      enClass: 'S4',
      bar: '20 mm',
      bundle: '1',
      ties: '8 mm',
      deviation: 'basis',
      toleranceClass: '1',
    },
    says: 'Specified cover: 33 mm',
    change: { label: 'Behind ties of', name: 'ties', to: '', says: 'Specified cover: 30 mm' },
    wrong: { label: 'Section', to: '40', says: /do not fit into a section of 40 mm/ },
  },
  {
    slug: 'lap',
    title: 'Lap length',
    link: {
      units: 'mm',
      basis: 'en-1992',
      bar: '16 mm',
      strengthClass: 'C25/30',
      sigma: '434.78',
      bond: 'good',
      alpha1: '1',
      alpha2: '1',
      alpha3: '1',
      alpha5: '1',
      gammaC: '1.5',
      alphaCt: '1',
      lapped: '100',
      tolerance: 'none',
    },
    says: 'Required lap: 966.18 mm',
    change: { label: 'Lapped in one section', name: 'lapped', to: '25', says: 'Required lap: 644.12 mm' },
    wrong: { label: 'α1', to: '0.5', says: /from 0\.7 to 1/ },
  },
  {
    slug: 'support-height',
    title: 'Support height',
    link: {
      units: 'in',
      thickness: '12',
      topCover: '1 3/4',
      upper: '#5',
      lower: '#4',
      standsOn: 'form',
      limits: 'none',
      spacingRule: 'common-practice',
    },
    says: 'Support height: 9 1/8 in',
    change: { label: 'Thickness', name: 'thickness', to: '10', says: 'Support height: 7 1/8 in' },
    wrong: { label: 'Top cover', to: '12', says: /as large as the section/ },
  },
  {
    slug: 'clear-distance',
    title: 'Clear distance between bars',
    link: {
      units: 'mm',
      basis: 'en-1992',
      bar: '25 mm',
      aggregate: '20',
      k1: '1',
      k2: '5',
      layout: 'none',
    },
    says: 'Least clear distance: 25 mm',
    change: { label: 'Largest aggregate', name: 'aggregate', to: '32', says: 'Least clear distance: 37 mm' },
    wrong: { label: 'Largest bar', to: '17 mm', says: /no bar size known here/ },
  },
  {
    slug: 'readings',
    title: 'Number of readings',
    link: {
      units: 'mm',
      element: 'slab',
      width: '10 m',
      height: '6 m',
      mostBelow: '5',
      confidence: '95',
      below: '0',
    },
    says: 'Readings by element and area: 12',
    change: {
      label: 'Width of the face',
      name: 'width',
      to: '20 m',
      says: 'Readings by element and area: 24',
    },
    wrong: { label: 'Of them below', to: '500', says: /more than readings/ },
  },
  {
    slug: 'low-cover',
    title: 'What low cover costs',
    link: {
      units: 'mm',
      specified: '50',
      measured: '25',
      bar: '16 mm',
      ageing: 'none',
      carbonation: 'ratio',
      chloride: 'ratio',
      depth: 'none',
      fire: 'none',
    },
    says: 'Time to carbonation at the bar, against that at the specified cover: × 0.25',
    change: {
      label: 'Measured cover',
      name: 'measured',
      to: '40',
      says: 'Time to carbonation at the bar, against that at the specified cover: × 0.64',
    },
    wrong: { label: 'Measured cover', to: '0', says: /more than zero/ },
  },
  {
    slug: 'evaporation',
    title: 'Evaporation rate',
    link: { units: 'mm', concrete: '30', air: '30', humidity: '50', wind: '20', silicaFume: 'no' },
    says: 'Evaporation rate: 0.96 kg/m²/h',
    change: { label: 'Wind', name: 'wind', to: '30', says: 'Evaporation rate: 1.36 kg/m²/h' },
    wrong: { label: 'Concrete temperature', to: '80', says: /from -18 to 60/ },
  },
];

async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
}

const addressOf = ({ slug, link }: Walk) => `/calculations/${slug}?${new URLSearchParams(link).toString()}`;
const status = (page: Page, text: string) => page.getByRole('status').filter({ hasText: text });

test('calculations are for people who are signed in', async ({ page }) => {
  await page.goto(appAddress('/calculations/lap?bar=%235'));
  await expect(page).toHaveURL(/\/sign-in\?next=%2Fcalculations%2Flap%3Fbar%3D%25235/);
});

/** The engineer's session, signed in once for all pages. */
let session: Awaited<ReturnType<BrowserContext['storageState']>>;

test.beforeAll(async ({ browser }) => {
  const { context } = await signedIn(browser, 'engineer', laptop, '/calculations');
  session = await context.storageState();
  await context.close();
});

/** A page in a browser of the engineer's. */
async function openAs(browser: Browser, screen: typeof laptop | typeof phone, path: string): Promise<Page> {
  const context = await browser.newContext({ ...screen, storageState: session });
  const page = await context.newPage();
  await page.goto(appAddress(path));
  return page;
}

test('the list leads to each calculation', async ({ browser }) => {
  const page = await openAs(browser, laptop, '/pours');
  await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Calculations' }).click();
  await expectAccessible(page);
  for (const { title, slug } of walks)
    await expect(page.getByRole('main').getByRole('link', { name: title })).toHaveAttribute(
      'href',
      `/calculations/${slug}`,
    );
  await page.context().close();
});

for (const [name, screen] of [
  ['laptop', laptop],
  ['phone', phone],
] as const) {
  for (const walk of walks) {
    test(`${walk.title} opens from its link and follows what is typed, on a ${name}`, async ({ browser }) => {
      const page = await openAs(browser, screen, addressOf(walk));
      await expect(page.getByRole('heading', { level: 1, name: walk.title })).toBeVisible();
      await expect(page.getByText('This link is not all that the calculation needs')).toHaveCount(0);
      await expect(status(page, walk.says)).toHaveCount(1);
      await expect(page.getByRole('heading', { name: 'How it was found' })).toBeVisible();
      await expect(page.getByText('The contract documents and the local code decide.')).toBeVisible();
      await expectAccessible(page);
      await keepScreenshot(page, `calculation-${walk.slug}-${name}`);

      await page.getByRole('textbox', { name: walk.change.label }).fill(walk.change.to);
      await expect(status(page, walk.change.says)).toHaveCount(1);
      await expect(page).toHaveURL(
        (url) => (url.searchParams.get(walk.change.name) ?? '') === walk.change.to,
      );
      const link = page.url();

      const field = page.getByRole('textbox', { name: walk.wrong.label });
      await field.fill(walk.wrong.to);
      await expect(field).toHaveAttribute('aria-invalid', 'true');
      await expect(field).toHaveAccessibleDescription(walk.wrong.says);
      await expect(status(page, 'No result')).toHaveCount(1);
      await expect(page.getByText('NaN')).toHaveCount(0);
      await expectAccessible(page);

      await page.goto(link);
      await expect(status(page, walk.change.says)).toHaveCount(1);
      await page.context().close();
    });
  }
}

test('a link is copied with the inputs in it, and one that cannot be read says what was left out', async ({
  browser,
}) => {
  const page = await openAs(browser, laptop, '/calculations/clear-distance');
  await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.getByRole('textbox', { name: 'Largest aggregate' }).fill('28');
  await page.getByRole('button', { name: 'Copy link' }).click();
  await expect(status(page, 'The link is copied')).toHaveCount(1);
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  await page.goto(copied);
  await expect(page.getByRole('textbox', { name: 'Largest aggregate' })).toHaveValue('28');
  await expect(status(page, 'Least clear distance: 33 mm')).toHaveCount(1);

  await page.goto(copied.replace('aggregate=28', 'aggregate=28%20furlongs').replace('k1=1&', ''));
  const notice = page.getByRole('note').filter({ hasText: 'This link is not all' });
  await expect(notice).toContainText('Largest aggregate “28 furlongs”: "furlongs" is not a unit known here');
  await expect(page.getByRole('textbox', { name: 'Largest aggregate' })).toHaveValue('');
  await expect(page.getByRole('textbox', { name: 'k1' })).toHaveValue('');
  await expect(status(page, 'No result')).toHaveCount(1);
  await page.context().close();
});

test('a calculation is printed on one page with its inputs, its trail, its caution and the date', async ({
  browser,
}) => {
  const page = await openAs(browser, laptop, '/calculations');
  for (const { slug } of walks) {
    await page.goto(appAddress(`/calculations/${slug}`));
    await expect(page.getByRole('heading', { name: 'Result' })).toBeVisible();
    const margin = { top: '10mm', bottom: '10mm', left: '10mm', right: '10mm' };
    const pdf = (await page.pdf({ format: 'A4', margin })).toString('latin1');
    expect(pdf.match(/\/Type\s*\/Page\b/g), slug).toHaveLength(1);
  }
  await page.emulateMedia({ media: 'print' });
  await expect(page.getByRole('textbox')).toHaveCount(0);
  await expect(page.getByRole('button')).toHaveCount(0);
  await expect(page.getByRole('term').filter({ hasText: 'Relative humidity' })).toBeVisible();
  await expect(page.getByRole('term').filter({ hasText: 'Date' })).toBeVisible();
  await expect(page.getByText(String(new Date().getFullYear()), { exact: false }).first()).toBeVisible();
  await expect(page.getByText('Advice for the time of placing.')).toBeVisible();
  await page.context().close();
});
