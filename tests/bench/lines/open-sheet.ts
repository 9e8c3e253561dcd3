import type { Page } from '@playwright/test';
import type { Line } from '../bench';
import { figure, median } from '../row';
import { freshPhone, PHONE_SLOWDOWN, slowDown } from '../world/browser';
import { saysAtTop } from '../world/device-in-page';
import { batchesOf, BenchDevice } from '../world/readings';
import { sendFromNode } from '../world/send-batches';
import { ask, plannedSite } from '../world/site';

const TIMES = 5;

/** From the tap on a pour in the list to its page with all that the sheet says, in milliseconds. */
function tapAndWait(page: Page): Promise<number> {
  return page.evaluate(
    () =>
      new Promise<number>((resolve, reject) => {
        const started = performance.now();
        document.querySelector<HTMLAnchorElement>('a[href*="/pours/"]')?.click();
        const look = () => {
          const there = [...document.querySelectorAll('h2')].some(
            (one) => one.textContent === 'Left for you',
          );
          if (there) resolve(performance.now() - started);
          else if (performance.now() - started > 60_000) reject(new Error('The sheet did not open.'));
          else requestAnimationFrame(look);
        };
        look();
      }),
  );
}

/** Opening a sheet of 1,000 readings that is in the phone's store and not yet in memory, without a network. */
export const openSheet: Line = async ({ browser, product }) => {
  const site = await plannedSite(product, { pours: 1, faces: 4, pointsOfFace: 250 });
  const { inspector } = site.people;
  const bodies = batchesOf(new BenchDevice(site).allReadings());
  await sendFromNode((body) => ask(product, inspector, '/api/sync/push', body), bodies);
  const { context, page } = await freshPhone(browser, product.app, inspector);
  await page.goto(`${product.app}/field`);
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await saysAtTop(page, 'up to date');
  await context.setOffline(true);
  await slowDown(page);
  const times: number[] = [];
  for (let time = 0; time < TIMES; time += 1) {
    await page.goto(`${product.app}/field`);
    await page.waitForSelector('a[href*="/pours/"]');
    times.push(await tapAndWait(page));
  }
  await context.close();
  return [
    {
      work: `opening a sheet of 1,000 readings, ${PHONE_SLOWDOWN}x slower processor`,
      measured: `${figure(median(times))} ms`,
      peer: '',
      ratio: '',
      target: '',
      reached: null,
    },
  ];
};
