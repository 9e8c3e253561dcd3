import type { Page } from '@playwright/test';

/** Keeps a picture of the screen as an artefact of the run, to be looked at and never compared by pixel. */
export async function keepScreenshot(page: Page, name: string): Promise<void> {
  await page.screenshot({ path: `.data/e2e-screens/${name}.png`, fullPage: true });
}
