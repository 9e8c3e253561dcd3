import { expect, test, type Page } from '@playwright/test';
import { openBuildingSite, type BuildingSite } from '../faults/browser/building-site';
import { FaultyProxy } from '../faults/browser/faulty-proxy';
import { keepReading, notSent, openFace, openField, takeGauge } from '../faults/browser/field-page';
import { SeenHistory } from '../faults/browser/on-the-line';
import { OwnChromium, profileFolder } from '../faults/browser/own-chromium';
import { faults } from '../faults/world/faulty-line';
import { pick, seeded, seeds } from '../faults/world/seeded';

let site: BuildingSite;
test.beforeEach(async () => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
});
test.afterEach(() => site.close());

/** As the browser says it when a network is there again: what waits is tried at once. */
const networkIsBack = (page: Page) => page.evaluate(() => void window.dispatchEvent(new Event('online')));

for (const seed of seeds(1)) {
  test(`seed ${seed}: a browser on a line that does its worst, with tabs that are closed in the middle of it`, async () => {
    test.setTimeout(240_000);
    const random = seeded(seed * 12_289);
    const { first } = site.people;
    const profile = profileFolder();
    const proxy = await FaultyProxy.start();
    const chromium = await OwnChromium.start(profile.folder, { proxy: proxy.port });
    const history = new SeenHistory(site);
    try {
      await chromium.signIn(site, first);
      let page = await chromium.page();
      await openField(page, site);
      await takeGauge(page);
      proxy.decide = () => pick(random, faults);
      for (let step = 0; step < 30; step += 1) {
        const what = pick(random, [
          [12, 'read'],
          [8, 'try'],
          [2, 'close the tab in the middle'],
          [2, 'reload'],
          [4, 'late'],
        ] as const);
        if (what === 'read') {
          await keepReading(page, Math.round(30 + random() * 30));
          await history.note(page, first);
        } else if (what === 'try') {
          await networkIsBack(page);
        } else if (what === 'late') {
          await proxy.deliverLate();
        } else {
          await networkIsBack(page);
          const pushes = () => proxy.log.filter((line) => line.includes('/push')).length;
          const before = pushes();
          // Mostly a batch is on its way by then; where the line fails before it, that is one more thing to happen.
          await expect
            .poll(() => pushes() > before, { timeout: 700 })
            .toBe(true)
            .catch(() => undefined);
          if (what === 'reload') await page.reload();
          else {
            await page.close();
            page = await chromium.page();
          }
          await openFace(page, site);
        }
      }
      proxy.decide = () => 'delivered';
      await proxy.deliverLate();
      await expect
        .poll(
          async () => {
            await networkIsBack(page);
            return notSent(page).innerText();
          },
          { timeout: 60_000 },
        )
        .toMatch(/all sent/);
      const found = await history.violations([{ page, person: first }]);
      expect(found, `FAULT_SEED=${seed}\n${proxy.log.join('\n')}`).toEqual([]);
      expect(history.recorded.size).toBeGreaterThan(5);
      // The line did do something to it.
      expect(new Set(proxy.log.map((line) => line.split(': ')[1])).size).toBeGreaterThan(3);
    } finally {
      await chromium.kill();
      await proxy.stop();
      profile.remove();
    }
  });
}
