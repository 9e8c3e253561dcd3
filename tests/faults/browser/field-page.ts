import { expect, type Page } from '@playwright/test';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { SITE_PASSWORD, type BuildingSite, type SitePerson } from './building-site';

/** Signs in with the password, and waits for the list of pours on the phone's side. */
export async function signIn(page: Page, site: BuildingSite, person: SitePerson): Promise<void> {
  await page.goto(`${site.app}/sign-in?next=/field`);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password').fill(SITE_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('link', { name: new RegExp(site.pourNumber) })).toBeVisible();
}

/** Opens the phone's side and waits until the pour is on the device with its plan, and the worker keeps the shell. */
export async function openField(page: Page, site: BuildingSite): Promise<void> {
  await page.goto(`${site.app}/field`);
  await expect(page.getByRole('link', { name: new RegExp(site.pourNumber) })).toBeVisible();
  await openFace(page, site);
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
}

/** Opens the face to be read, without a network too. */
export async function openFace(page: Page, site: BuildingSite): Promise<void> {
  await page.goto(`${site.app}/field/pours/${site.pourId}/faces/deck-top`);
  await expect(page.getByRole('group', { name: 'Keypad' })).toBeVisible();
}

/** Chooses the gauge, where the device does not remember it. */
export async function takeGauge(page: Page): Promise<void> {
  const instrument = page.getByRole('button', { name: /^Instrument/ });
  if (/DG-1/.test(await instrument.innerText())) return;
  await instrument.click();
  const dialog = page.getByRole('dialog', { name: 'Read with' });
  await dialog.getByText('DG-1').first().click();
  const done = dialog.getByRole('button', { name: 'Done' });
  if (await done.isVisible()) await done.click();
  await expect(dialog).toBeHidden();
}

/** Types a reading in millimetres and keeps it; comes back once the screen says that it is kept. */
export async function keepReading(page: Page, mm: number): Promise<void> {
  // Once every point is read none is lit: one is chosen, as somebody does who reads again.
  const everyPointIsRead = page.getByText('Every point is read');
  if (await everyPointIsRead.isVisible()) {
    await page
      .getByRole('group', { name: /^Points of/ })
      .getByRole('button')
      .first()
      .click();
    await expect(everyPointIsRead).toBeHidden();
  }
  for (const digit of String(mm)) await page.getByRole('button', { name: digit, exact: true }).click();
  await page.getByRole('button', { name: /^Keep/ }).click();
  await expect(page.getByRole('status').filter({ hasText: new RegExp(`: ${mm} mm`) })).toHaveCount(1);
}

/** The line at the top of each screen that says what has not been sent. */
export const notSent = (page: Page) => page.getByRole('banner').getByRole('link').last();

/** One store of a person's database, as it is on the device. */
export function stored<T>(page: Page, personId: string, store: string): Promise<T[]> {
  return page.evaluate(
    ([name, from]) =>
      new Promise<unknown[]>((read, failed) => {
        const request = indexedDB.open(name);
        request.onerror = () => failed(new Error(String(request.error)));
        // Where there is no such database, none must come into being by being asked for.
        request.onupgradeneeded = () => request.transaction?.abort();
        request.onsuccess = () => {
          const all = request.result.transaction(from).objectStore(from).getAll();
          all.onsuccess = () => {
            request.result.close();
            read(all.result as unknown[]);
          };
          all.onerror = () => failed(new Error(String(all.error)));
        };
      }),
    [`cagewright-${personId}`, store] as const,
  ) as Promise<T[]>;
}

/** What waits on the device, by its own store. */
export const waiting = async (page: Page, personId: string): Promise<EntryEnvelope[]> =>
  (await stored<{ envelope: EntryEnvelope }>(page, personId, 'outbox')).map(({ envelope }) => envelope);

/** What a person has recorded on this device, sent or not. */
export const recordedHere = async (page: Page, personId: string): Promise<EntryEnvelope[]> =>
  (await stored<{ entry: EntryEnvelope }>(page, personId, 'entries'))
    .map(({ entry }) => entry)
    .filter((entry) => entry.authorId === personId);
