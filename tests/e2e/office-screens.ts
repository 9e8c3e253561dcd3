import { expect, type Browser, type Page } from '@playwright/test';
import { appAddress, signIn, type demo } from './sign-in';

/** The addresses of what the demo has, found as people find them: from the lists. */
export interface DemoAddresses {
  pour: (number: string) => string;
  decisionSheet: string;
  release: string;
}

export interface Screen {
  name: string;
  path: (at: DemoAddresses) => string;
  /** The heading of rank one. */
  heading: RegExp | string;
  /** `rare` is looked at with the option only; of what `colours` has, another test has asked axe by day already. */
  look?: 'rare' | 'colours';
  /** Brings the page into the state that is looked at: opens, fills in, sends what is wrong. */
  then?: (page: Page) => Promise<void>;
}

/** Opens every fold whose line matches. */
const unfold = (summary: RegExp) => (page: Page) =>
  page.locator('summary').evaluateAll((lines, pattern) => {
    for (const line of lines) {
      const fold = line.parentElement;
      if (fold instanceof HTMLDetailsElement && new RegExp(pattern).test(line.textContent)) fold.open = true;
    }
  }, summary.source);

/** Opens the form behind a button and sends it empty. */
const sentEmpty = (button: RegExp | string, submit: string) => async (page: Page) => {
  const wanted = page.getByRole('main').getByRole('button', { name: button }).first();
  if (!(await wanted.isVisible())) await page.getByText('Record something else').click();
  await wanted.click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('button', { name: submit }).click();
  await expect(dialog.locator('[aria-invalid=true]').first()).toBeVisible();
};

/** Sends the form of the page itself and waits for what is said. */
const pressed = (button: string, message: string) => async (page: Page) => {
  await page.getByRole('button', { name: button }).click();
  await expect(page.getByText(message).first()).toBeVisible();
};

const lowCover = /^Low cover at B3/;
const p = (number: string, part = '') => ({
  path: ({ pour }: DemoAddresses) => `${pour(number)}${part}`,
  heading: new RegExp(`\\b${number}\\b`),
});
const page = (path: string, heading: RegExp | string) => ({ path: () => path, heading });

/** `OFFICE_SCREENS=all` looks at the rare screens too, and asks axe for all of its rules in every look. */
export const everything = process.env.OFFICE_SCREENS === 'all';

const looked = (list: Screen[]) => list.filter(({ look }) => everything || look !== 'rare');

const ofRoles: Partial<Record<keyof typeof demo, Screen[]>> = {
  superintendent: [
    { name: 'pours', ...page('/pours', 'Pours') },
    { name: 'pours-none', ...page('/pours?text=nowhere', 'Pours'), look: 'rare' },
    { name: 'pour-held', ...p('P-014'), look: 'rare' },
    {
      name: 'pour-unfolded',
      ...p('P-014'),
      then: async (at) => {
        await unfold(/^(Every reading of .*Soffit|Where these|Record something|Layers|Revisions)/)(at);
        await at.getByText('How was this judged?').first().click();
      },
    },
    {
      name: 'pour-correction',
      ...p('P-014'),
      look: 'rare',
      then: sentEmpty('Report a correction', 'Report the correction'),
    },
    { name: 'pour-not-read', ...p('P-017') },
    { name: 'pour-released', ...p('P-015') },
    { name: 'pour-placed', ...p('P-013') },
    { name: 'record', ...p('P-013', '/record') },
    { name: 'release-held', ...p('P-014', '/release') },
    { name: 'release-stands', ...p('P-015', '/release'), look: 'rare' },
    { name: 'release-void-form', ...p('P-015'), look: 'rare', then: sentEmpty(/^Make void/, 'Make it void') },
    {
      name: 'plan-new-refused',
      ...page('/pours/new', 'Plan a pour'),
      then: pressed('Create the pour and issue its plan', 'The plan cannot be issued yet'),
    },
    {
      name: 'account',
      ...page('/account', 'Account'),
      then: async (at) => {
        await at.getByRole('button', { name: 'Sign out everywhere' }).click();
        await expect(at.getByRole('dialog')).toBeVisible();
      },
    },
    { name: 'office-not-found', ...page('/pours/nothing', /nothing here/) },
  ],
  engineer: [
    { name: 'nonconformances', ...page('/nonconformances', 'Nonconformances') },
    {
      name: 'decision-closed',
      path: ({ decisionSheet }) => decisionSheet,
      heading: lowCover,
      look: 'rare',
    },
    {
      name: 'decision-open',
      path: ({ decisionSheet }) => decisionSheet,
      heading: lowCover,
      then: async (at) => {
        await unfold(/^(Requirement|Extent|Photographs)/)(at);
        await at.getByRole('radio', { name: 'Use as is' }).check();
        await at.getByRole('button', { name: 'Add a condition' }).click();
        await pressed('Sign the decision', 'Write something here.')(at);
      },
    },
    {
      name: 'photo-close',
      path: ({ decisionSheet }) => decisionSheet,
      heading: lowCover,
      look: 'rare',
      then: async (at) => {
        await unfold(/^Photographs/)(at);
        await at
          .getByRole('button', { name: /^Look at closely/ })
          .first()
          .click();
        await expect(at.getByRole('dialog').getByRole('img')).toBeVisible();
      },
    },
    { name: 'plan-revise', ...p('P-014', '/plan'), look: 'rare' },
    {
      name: 'plan-copy',
      path: ({ pour }) => pour('P-016').replace('/pours/', '/pours/new?from='),
      heading: 'Plan a pour',
    },
    { name: 'calculations', ...page('/calculations', 'Calculations') },
    ...['cover', 'lap', 'support-height', 'clear-distance', 'readings', 'low-cover', 'evaporation'].map(
      (slug): Screen => ({
        name: `calculation-${slug}`,
        ...page(`/calculations/${slug}`, /./),
        look: 'colours',
      }),
    ),
  ],
  coordinator: [
    { name: 'project', ...page('/project', /^Ferry landing/), look: 'rare' },
    {
      name: 'project-drawing',
      ...page('/project', /^Ferry landing/),
      then: sentEmpty('Receive a drawing', 'Record it'),
    },
    {
      name: 'person-menu',
      ...page('/project', /^Ferry landing/),
      look: 'rare',
      then: async (at) => {
        await at.getByRole('button', { name: 'Priya Halloran' }).click();
        await expect(at.getByRole('button', { name: 'Sign out' })).toBeVisible();
      },
    },
  ],
  viewer: [{ name: 'pour-viewer', ...p('P-016'), look: 'rare' }],
};

/** Everything that the office shows, by who looks at it. */
export const screens = (Object.keys(ofRoles) as (keyof typeof demo)[])
  .map((who) => ({ who, list: looked(ofRoles[who] ?? []) }))
  .filter(({ list }) => list.length > 0);

/** What is shown to whoever is not signed in. */
export const openScreens: Screen[] = looked([
  {
    name: 'sign-in-empty',
    ...page('/sign-in', 'Sign in'),
    then: pressed('Sign in', 'Write your password.'),
  },
  { name: 'released', path: ({ release }) => release, heading: /^Release \d+: / },
  { name: 'released-not-found', ...page('/released/nothing', /nothing here/), look: 'rare' },
  { name: 'not-found', ...page('/nothing', /nothing here/) },
]);

/** Finds the demo's addresses, as somebody who may see them all. */
export async function demoAddresses(browser: Browser): Promise<DemoAddresses> {
  const at = await browser.newPage();
  await signIn(at, 'superintendent', '/pours');
  const pours = new Map(
    await at
      .getByRole('table')
      .getByRole('link')
      .evaluateAll((links) =>
        links.map((link) => [link.textContent.trim(), link.getAttribute('href') ?? ''] as const),
      ),
  );
  const pour = (number: string) => pours.get(number) ?? `/no-such-pour/${number}`;
  await at.goto(appAddress('/nonconformances'));
  const sheet = at.getByRole('table').getByRole('link', { name: lowCover }).last();
  const decisionSheet = (await sheet.getAttribute('href')) ?? '';
  await at.goto(appAddress(pour('P-015')));
  const itsPage = at.locator('#release').locator('a[href^="/released/"]').first();
  const release = (await itsPage.getAttribute('href')) ?? '';
  await at.close();
  return { pour, decisionSheet, release };
}
