import { expect, type Browser, type BrowserContext, type Page } from '@playwright/test';

export const DEMO_PASSWORD = 'tide-table-lantern';

/** Demo people by what they do. */
export const demo = {
  inspector: 'noor@example.test',
  secondInspector: 'tomasz@example.test',
  superintendent: 'marit@example.test',
  engineer: 'ines@example.test',
  crew: 'elias@example.test',
  coordinator: 'priya@example.test',
  viewer: 'owen@example.test',
} as const;

/** Where the product under test answers; set by the global set-up. */
export const appAddress = (path = '') => `${process.env.E2E_APP ?? ''}${path}`;

/** What a browser is opened with: the size of a screen, and whether it is touched. */
export interface ScreenSize {
  viewport: { width: number; height: number };
  hasTouch: boolean;
}

export const phone = { viewport: { width: 390, height: 844 }, hasTouch: true } as const;
export const laptop = { viewport: { width: 1280, height: 800 }, hasTouch: false } as const;

/** A browser of a person's own, signed in and at a path. */
export async function signedIn(
  browser: Browser,
  who: keyof typeof demo,
  screen: ScreenSize,
  path: string,
): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext(screen);
  const page = await context.newPage();
  await signIn(page, who, path);
  return { context, page };
}

/** Signs in at the sign-in page and waits until the asked page is there. */
export async function signIn(page: Page, who: keyof typeof demo, path: string): Promise<void> {
  await page.goto(appAddress(`/sign-in?next=${encodeURIComponent(path)}`));
  await page.getByLabel('E-mail').fill(demo[who]);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL((url) => url.pathname + url.search === path);
}
