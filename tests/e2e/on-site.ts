import { expect, type Page } from '@playwright/test';
import sharp from 'sharp';

/** A photograph as a camera would give it: large, and not empty. */
export function picture(): Promise<Buffer> {
  const noise = { type: 'gaussian', mean: 128, sigma: 30 } as const;
  return sharp({ create: { width: 2400, height: 1800, channels: 3, background: '#7a7468', noise } })
    .jpeg({ quality: 90 })
    .toBuffer();
}

/** Opens a pour from the list on the phone, and waits until the device holds what it needs without a network. */
export async function openPour(page: Page, number: string): Promise<void> {
  await page
    .getByRole('link', { name: new RegExp(number) })
    .first()
    .click();
  await expect(page.getByRole('heading', { level: 1, name: new RegExp(number) })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Left for you' })).toBeVisible();
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
}

const fractions: Record<string, string[]> = {
  '1/16': ['and a sixteenth'],
  '1/8': ['and an eighth'],
  '3/16': ['and an eighth', 'and a sixteenth'],
  '1/4': ['and a quarter'],
  '5/16': ['and a quarter', 'and a sixteenth'],
  '3/8': ['and a quarter', 'and an eighth'],
  '7/16': ['and a quarter', 'and an eighth', 'and a sixteenth'],
  '1/2': ['and a half'],
  '9/16': ['and a half', 'and a sixteenth'],
  '5/8': ['and a half', 'and an eighth'],
  '11/16': ['and a half', 'and an eighth', 'and a sixteenth'],
  '3/4': ['and a half', 'and a quarter'],
  '7/8': ['and a half', 'and a quarter', 'and an eighth'],
};

/** Types a length in inches on the keypad, whole and fraction, and keeps it. */
export async function keepInInches(page: Page, value: string): Promise<void> {
  const [, whole, fraction] = /^(\d+)?(?: ?(\d+\/\d+))?$/.exec(value) ?? [];
  for (const digit of whole ?? '') await page.getByRole('button', { name: digit, exact: true }).click();
  for (const key of fraction ? (fractions[fraction] ?? []) : [])
    await page.getByRole('button', { name: key }).click();
  await expect(page.getByLabel('Reading', { exact: true })).toContainText(value);
  await page.getByRole('button', { name: /^Keep/ }).click();
}

/** The label of the point that is lit on the face map. */
export async function litPoint(page: Page): Promise<string> {
  const lit = page.getByRole('group', { name: /^Points of/ }).getByRole('button', { pressed: true });
  await expect(lit).toHaveCount(1);
  return /^\w+/.exec((await lit.getAttribute('aria-label')) ?? (await lit.innerText()))?.[0] ?? '';
}

/** The mark of a point on the face map, by its label. */
export const pointOnMap = (page: Page, label: string) =>
  page
    .getByRole('group', { name: /^Points of/ })
    .getByRole('button', { name: new RegExp(`^${label}( again)?, `) });

/** Chooses the instrument that readings are taken with. */
export async function readWith(page: Page, instrument: string): Promise<void> {
  await page.getByRole('button', { name: /^Instrument/ }).click();
  const dialog = page.getByRole('dialog', { name: 'Read with' });
  await dialog.getByText(instrument, { exact: false }).first().click();
  const done = dialog.getByRole('button', { name: 'Done' });
  if (await done.isVisible()) await done.click();
  await expect(dialog).toBeHidden();
}
