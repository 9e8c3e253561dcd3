import { expect, test } from '@playwright/test';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { openBuildingSite, type BuildingSite } from '../faults/browser/building-site';
import {
  keepReading,
  notSent,
  openFace,
  openField,
  recordedHere,
  takeGauge,
  waiting,
} from '../faults/browser/field-page';
import { OwnChromium, profileFolder } from '../faults/browser/own-chromium';
import { violations, type History } from '../faults/world/check-history';
import { fetchedAfresh } from '../faults/world/hand';
import { httpLine } from '../faults/world/http-line';
import { contentOf } from '../faults/world/model-server';
import { Clock } from '../faults/world/phone';
import { everything } from '../faults/world/seeded';

let site: BuildingSite;
test.beforeAll(async () => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
});
test.afterAll(() => site.close());

const KILLS = everything ? 20 : 2;

test(`the browser is killed ${KILLS} times right after "kept": each reading is there again, and is sent once`, async () => {
  test.setTimeout(60_000 + KILLS * 20_000);
  const { first, engineer } = site.people;
  const profile = profileFolder();
  const history: History = { recorded: new Map() };
  let chromium = await OwnChromium.start(profile.folder);
  try {
    await chromium.signIn(site, first);
    const page = await chromium.page();
    await openField(page, site);
    await takeGauge(page);
    await keepReading(page, 52);
    await expect(notSent(page)).toContainText('all sent');
    const [before] = await recordedHere(page, first.id);
    if (before) history.recorded.set(before.id, { content: contentOf(before), phone: 'a', poison: false });
    await chromium.quit();

    for (let kill = 1; kill <= KILLS; kill += 1) {
      chromium = await OwnChromium.start(profile.folder);
      // Nothing gets out: what is kept can be on the device only.
      await chromium.context.setOffline(true);
      const opened = await chromium.page();
      await openFace(opened, site);
      await keepReading(opened, 40 + kill);
      await chromium.kill();

      chromium = await OwnChromium.start(profile.folder);
      await chromium.context.setOffline(true);
      const again = await chromium.page();
      await openFace(again, site);
      await expect(notSent(again)).toContainText(`${kill} not sent yet`);
      const kept = (await waiting(again, first.id)).filter((one) => !history.recorded.has(one.id));
      expect(kept.map(readingOf)).toEqual([40 + kill]);
      for (const entry of kept)
        history.recorded.set(entry.id, { content: contentOf(entry), phone: 'a', poison: false });
      await chromium.kill();
    }

    chromium = await OwnChromium.start(profile.folder);
    await chromium.signIn(site, first);
    const last = await chromium.page();
    await openFace(last, site);
    await expect(notSent(last)).toContainText('all sent', { timeout: 60_000 });
    const secondDevice = await fetchedAfresh(
      httpLine(site.app, site.cookieOf(engineer)),
      realClock(),
      site.pourId,
    );
    const server = await site.record();
    const found = violations({
      history,
      server,
      phones: [{ name: 'a', waiting: (await waiting(last, first.id)).map(({ id }) => id), refused: [] }],
      secondDevice,
      writtenByServer: ['plan-issued'],
    });
    expect(found).toEqual([]);
    expect(history.recorded.size).toBe(KILLS + 1);
    await chromium.quit();
  } finally {
    await chromium.kill();
    profile.remove();
  }
});

test('a page that keeps a reading in memory alone loses it to the same kill (negative control)', async () => {
  const profile = profileFolder();
  let chromium = await OwnChromium.start(profile.folder);
  try {
    const page = await chromium.page();
    await page.goto(`${site.app}/sign-in`);
    await page.evaluate(() => sessionStorage.setItem('reading', '46'));
    await chromium.kill();
    chromium = await OwnChromium.start(profile.folder);
    const again = await chromium.page();
    await again.goto(`${site.app}/sign-in`);
    expect(await again.evaluate(() => sessionStorage.getItem('reading'))).toBeNull();
  } finally {
    await chromium.kill();
    profile.remove();
  }
});

const readingOf = ({ body }: EntryEnvelope) => (body.value as { mm: number }).mm;
const realClock = () => new Clock(new Date().toISOString());
