import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { overflow } from './field-checks';
import { keepScreenshot } from './keep-screenshot';
import {
  demoAddresses,
  everything,
  openScreens,
  screens,
  type DemoAddresses,
  type Screen,
} from './office-screens';
import { appAddress, signIn } from './sign-in';

/** The looks that every screen has; a picture is kept of those with `kept`, and axe is asked by night, on a phone. */
const looks = [
  { width: 390, theme: 'day', kept: false, axe: false },
  { width: 390, theme: 'night', kept: true, axe: true },
  { width: 1280, theme: 'night', kept: false, axe: false },
  { width: 1280, theme: 'day', kept: true, axe: false },
] as const;

// Hundreds of looks are taken of pages as long as they come: each would be kept a second time in the trace.
test.use({ trace: 'off' });
if (everything) test.setTimeout(900_000);

let at: DemoAddresses;
test.beforeAll(async ({ browser }) => {
  at = await demoAddresses(browser);
});

/** What every screen owes to whoever uses it: a name, no rule of the web broken, nothing pushed off the side. */
async function look(page: Page, screen: Screen): Promise<void> {
  const said: string[] = [];
  page.removeAllListeners('console');
  page.on('console', (message) => {
    // What is not there answers 404, and the browser says so of the page itself.
    if (message.type() === 'error' && !/status of 40[0134]/.test(message.text())) said.push(message.text());
  });
  await page.setViewportSize({ width: looks[0].width, height: 844 });
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
  await page.goto(appAddress(screen.path(at)));
  await expect(page.getByRole('heading', { level: 1 }), screen.name).toHaveText(screen.heading);
  await screen.then?.(page);
  for (const { width, theme, ...what } of looks) {
    const kept = `${screen.name}-${width}-${theme}`;
    await page.setViewportSize({ width, height: width === 390 ? 844 : 800 });
    await page.emulateMedia({ colorScheme: theme === 'night' ? 'dark' : 'light', reducedMotion: 'reduce' });
    expect.soft(await overflow(page), `${kept} scrolls sideways by so many px`).toBe(0);
    if (everything || (what.kept && screen.look !== 'colours')) await keepScreenshot(page, `office/${kept}`);
    if (!everything && !what.axe) continue;
    // No page has frames of another site, for which axe would open a page of its own.
    const builder = new AxeBuilder({ page }).setLegacyMode();
    if (screen.look === 'colours' && !everything) builder.withRules(['color-contrast']);
    const { violations } = await builder.analyze();
    const found = violations.map(
      ({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`,
    );
    expect.soft(found, kept).toEqual([]);
  }
  expect.soft(await page.title(), screen.name).toMatch(/. · Cagewright$/);
  expect.soft(said, `${screen.name}: said by the browser's console`).toEqual([]);
}

for (const { who, list } of screens) {
  test(`what the ${who} sees in the office, on a phone and a laptop, by day and by night`, async ({
    page,
  }) => {
    await signIn(page, who, '/account');
    for (const screen of list) await look(page, screen);
  });
}

test('what anybody sees without signing in, on a phone and a laptop, by day and by night', async ({
  page,
}) => {
  for (const screen of openScreens) await look(page, screen);
});
