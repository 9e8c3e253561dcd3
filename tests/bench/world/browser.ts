import { existsSync } from 'node:fs';
import { chromium, type Browser, type BrowserContext, type Page } from '@playwright/test';
import type { Person } from './site';

/** How much slower than this machine the phone is taken to be, where a line says so. */
export const PHONE_SLOWDOWN = 4;

export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: ['/usr/bin/chromium', '/usr/bin/chromium-browser'].find((file) => existsSync(file)),
    chromiumSandbox: process.getuid?.() !== 0,
    args: [
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--no-first-run',
    ],
  });
}

/** A phone that is signed in as this person, with nothing on it. */
export async function freshPhone(
  browser: Browser,
  app: string,
  person: Person,
  options: { serviceWorkers?: 'allow' | 'block' } = {},
): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext({
    viewport: { width: 390, height: 844 },
    hasTouch: true,
    ...options,
  });
  await readyForFunctions(context);
  await context.addCookies([{ ...person.cookie, url: app, httpOnly: true, sameSite: 'Lax' }]);
  return { context, page: await context.newPage() };
}

/** A page of another server, in a store of its own. */
export async function freshPage(
  browser: Browser,
  address: string,
): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext();
  await readyForFunctions(context);
  const page = await context.newPage();
  await page.goto(address);
  return { context, page };
}

/** The compiler that runs these files names nested functions by a helper, which a function sent to a page has to find. */
async function readyForFunctions(context: BrowserContext): Promise<void> {
  await context.addInitScript({ content: 'globalThis.__name ??= (named) => named;' });
}

/** Makes a page's processor as slow as a phone's. */
export async function slowDown(page: Page): Promise<void> {
  const session = await page.context().newCDPSession(page);
  await session.send('Emulation.setCPUThrottlingRate', { rate: PHONE_SLOWDOWN });
}
