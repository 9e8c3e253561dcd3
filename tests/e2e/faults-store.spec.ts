import { expect, test, type BrowserContext, type Page } from '@playwright/test';
import { readFile } from 'node:fs/promises';
import { openBuildingSite, sessionCookie, type BuildingSite } from '../faults/browser/building-site';
import { keepReading, notSent, openFace, openField, takeGauge, waiting } from '../faults/browser/field-page';
import { SeenHistory } from '../faults/browser/on-the-line';
import { thoroughTest } from '../faults/browser/thorough-test';
import { picture } from './on-site';

let site: BuildingSite;
test.beforeEach(async ({ context }) => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
  await context.addCookies([sessionCookie(site, site.people.first)]);
});
test.afterEach(() => site.close());

async function opened(page: Page): Promise<void> {
  await openField(page, site);
  await takeGauge(page);
  await keepReading(page, 52);
  await expect(notSent(page)).toContainText('all sent');
}

async function addPhoto(page: Page): Promise<void> {
  await page.goto(`${site.app}/field/pours/${site.pourId}/photos`);
  await page
    .getByLabel('Take the photo')
    .setInputFiles({ name: 'bars.jpg', mimeType: 'image/jpeg', buffer: await picture() });
}

test.describe('a device that is full', () => {
  /**
   * A browser that gives this origin little room, and none but so many bytes above what is used once it is filled. The
   * store believes an earlier figure of the browser's until it has run into the limit: it has to be filled first.
   */
  async function smallDevice(page: Page) {
    const session = await page.context().newCDPSession(page);
    const give = (quotaSize: number) =>
      session.send('Storage.overrideQuotaForOrigin', { origin: site.app, quotaSize });
    const used = async () => (await session.send('Storage.getUsageAndQuota', { origin: site.app })).usage;
    await give(10_000_000);
    return async (bytes: number) => {
      // Coarsely, then finely: what the store believes is left must be too little for a photo.
      await fillUp(page, 1_000_000);
      await fillUp(page, 20_000);
      let last = 0;
      const settled = async () => last === (last = await used());
      await expect.poll(settled, { intervals: [500] }).toBe(true);
      await give(last + bytes);
    };
  }
  /** Fills what is left with something else, in pieces of this many bytes, until no more fits. */
  const fillUp = (page: Page, size: number) =>
    page.evaluate(async (size) => {
      const db = await new Promise<IDBDatabase>((done, failed) => {
        const request = indexedDB.open('filler');
        request.onupgradeneeded = () => request.result.createObjectStore('filler', { autoIncrement: true });
        request.onsuccess = () => done(request.result);
        request.onerror = () => failed(new Error(String(request.error)));
      });
      const fits = () =>
        new Promise<boolean>((done) => {
          const tx = db.transaction('filler', 'readwrite', { durability: 'strict' });
          // Random, so that the store cannot make it smaller.
          const bytes = new Uint8Array(size);
          for (let at = 0; at < size; at += 65_536) crypto.getRandomValues(bytes.subarray(at, at + 65_536));
          tx.objectStore('filler').add(bytes);
          tx.oncomplete = () => done(true);
          tx.onabort = () => done(false);
        });
      while (await fits()) continue;
      db.close();
    }, size);
  const makeRoom = (page: Page) =>
    page.evaluate(
      () => new Promise((done) => (indexedDB.deleteDatabase('filler').onsuccess = () => done(null))),
    );
  /** A page that says "kept" without waiting for its transaction. */
  const hasty = (page: Page) =>
    page.evaluate(async () => {
      const db = await new Promise<IDBDatabase>((done) => {
        const request = indexedDB.open('filler');
        request.onsuccess = () => done(request.result);
      });
      const tx = db.transaction('filler', 'readwrite');
      const over = new Promise<boolean>((done) => {
        tx.oncomplete = () => done(true);
        tx.onabort = () => done(false);
      });
      tx.objectStore('filler').add(new Uint8Array(300_000));
      const said = true;
      const there = await over;
      db.close();
      return { said, there };
    });

  test('has no room for a photo, and saves the reading; then none for a reading, says so, and offers the file', async ({
    context,
  }) => {
    const { first } = site.people;
    const page = await context.newPage();
    const leaveRoom = await smallDevice(page);
    await opened(page);
    const history = new SeenHistory(site);
    await history.note(page, first);
    await context.setOffline(true);
    await leaveRoom(20_000);
    await addPhoto(page);
    await expect(page.getByText('This photo was not kept')).toBeVisible();
    await expect(page.getByText(/no room left/)).toBeVisible();
    expect(await waiting(page, first.id)).toEqual([]);

    await openFace(page, site);
    await keepReading(page, 47);
    await history.note(page, first);
    expect(await waiting(page, first.id)).toHaveLength(1);

    // Until nothing fits any more: each is either kept, and said so, or not, and said so.
    let full = false;
    for (let mm = 30; mm < 60 && !full; mm += 1) {
      await fillUp(page, 1000);
      for (const digit of String(mm)) await page.getByRole('button', { name: digit, exact: true }).click();
      await page.getByRole('button', { name: /^Keep/ }).click();
      const kept = page.getByRole('status').filter({ hasText: new RegExp(`: ${mm} mm`) });
      const refused = page.getByRole('alert').filter({ hasText: 'no room left' });
      await expect(kept.or(refused).first()).toBeVisible();
      full = await refused.isVisible();
      if (full) {
        await expect(page.getByLabel('Reading', { exact: true })).toContainText(String(mm));
        await expect(refused).toContainText('save it to a file');
      }
      const before = history.recorded.size;
      await history.note(page, first);
      expect(history.recorded.size - before, `${mm} mm`).toBe(full ? 0 : 1);
    }
    expect(full).toBe(true);
    // Negative control: whoever does not wait for the transaction says what is not so.
    expect(await hasty(page)).toEqual({ said: true, there: false });

    await page.goto(`${site.app}/field/not-sent`);
    const saving = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Save to a file' }).click();
    const file = JSON.parse(await readFile(await (await saving).path(), 'utf8')) as {
      entries: { id: string }[];
    };
    const here = (await waiting(page, first.id)).map(({ id }) => id);
    expect(file.entries.map(({ id }) => id).sort()).toEqual(here.sort());

    // With a network what waits is sent, full as the device is; with room it goes on as before.
    await context.setOffline(false);
    const arrived = async () => (await site.record()).map(({ id }) => id);
    await expect.poll(arrived, { timeout: 30_000 }).toEqual(expect.arrayContaining(here));
    await makeRoom(page);
    await openFace(page, site);
    await keepReading(page, 48);
    await history.note(page, first);
    await expect(notSent(page)).toContainText('all sent', { timeout: 60_000 });
    expect(await history.violations([{ page, person: first }])).toEqual([]);
  });
});

test.describe('a browser that clears the store', () => {
  /** What a browser takes when it makes room by itself; cookies stay. */
  async function evict(context: BrowserContext, cookiesToo = false): Promise<void> {
    const page = await context.newPage();
    const session = await context.newCDPSession(page);
    await session.send('Storage.clearDataForOrigin', {
      origin: site.app,
      storageTypes: `indexeddb,cache_storage,service_workers,local_storage${cookiesToo ? ',cookies' : ''}`,
    });
    await page.close();
  }

  /**
   * A reading that is sent, a photo whose entry is, and three readings that are not; then the store is cleared, and the
   * person comes back to the list.
   */
  async function cleared(context: BrowserContext, cookiesToo = false) {
    const { first } = site.people;
    const history = new SeenHistory(site);
    const page = await context.newPage();
    await opened(page);
    await context.route('**/api/photos/**', (route) => route.abort());
    await addPhoto(page);
    await expect(notSent(page)).toContainText('1 not sent yet');
    await expect.poll(() => waiting(page, first.id)).toEqual([]);
    await context.setOffline(true);
    await openFace(page, site);
    for (const mm of [46, 47, 48]) await keepReading(page, mm);
    await history.note(page, first);
    await page.close();
    await evict(context, cookiesToo);
    await context.unroute('**/api/photos/**');
    await context.setOffline(false);
    if (cookiesToo) await context.addCookies([sessionCookie(site, first)]);
    const again = await context.newPage();
    await again.goto(`${site.app}/field`);
    await expect(again.getByRole('link', { name: new RegExp(site.pourNumber) })).toBeVisible();
    return { page: again, history };
  }

  test('with work not sent: the person is told what is gone, as the checker finds it, and the rest is fetched anew', async ({
    context,
  }) => {
    const { first } = site.people;
    const { page, history } = await cleared(context);
    const gone = page.getByText('3 entries and 1 photo are gone from this device');
    await expect(gone).toBeVisible();
    await page.goto(`${site.app}/field/pours/${site.pourId}/photos`);
    await expect(page.getByText('gone from this device before it was sent')).toBeVisible();
    await openFace(page, site);
    await takeGauge(page);
    await expect(gone).toBeVisible();
    await expect(page.getByRole('banner')).toContainText('1 of 8 read');
    await keepReading(page, 46);
    await history.note(page, first);
    await expect(notSent(page)).toContainText('all sent');
    // The checker's negative control too: it misses those three, and nothing else.
    const found = await history.violations([{ page, person: first }]);
    expect(found.filter((one) => one.startsWith('lost: '))).toHaveLength(3);
    expect(found).toHaveLength(3);
    // Numbers go on above those that were lost: nothing that comes late can be taken for another.
    const own = (await site.record()).filter((entry) => entry.authorId === first.id);
    expect(own.map((entry) => entry.deviceSeq)).toEqual([1, 2, 6]);

    await page.getByRole('button', { name: 'I have read this' }).click();
    await expect(gone).toBeHidden();
    await page.reload();
    await expect(page.getByRole('group', { name: 'Keypad' })).toBeVisible();
    await expect(gone).toBeHidden();
  });

  thoroughTest(
    'and cookies with it: nobody can tell any more, which is why the mark is kept there (negative control)',
    async ({ context }) => {
      const { page } = await cleared(context, true);
      await expect(notSent(page)).toContainText('all sent');
      await expect(page.getByText('gone from this device')).toBeHidden();
    },
  );
});
