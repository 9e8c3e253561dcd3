import type { Line } from '../bench';
import { limitRow, median } from '../row';
import { freshPhone, PHONE_SLOWDOWN, slowDown } from '../world/browser';
import { saysAtTop } from '../world/device-in-page';
import { plannedSite } from '../world/site';

const TIMES = 5;

/** How much script the phone's side loads at first, and how soon it can be used when it is loaded without a network. */
export const fieldShell: Line = async ({ browser, product }) => {
  const site = await plannedSite(product, { pours: 4, faces: 1, pointsOfFace: 20 });
  const { context, page } = await freshPhone(browser, product.app, site.people.inspector);
  await page.goto(`${product.app}/field`);
  await page.waitForSelector('a[href*="/pours/"]');
  // What the worker keeps for later is fetched by the worker, and is not among the page's own requests.
  const scriptBytes = await page.evaluate(() => {
    const scripts = performance
      .getEntriesByType('resource')
      .filter((one): one is PerformanceResourceTiming => /\.js(\?|$)/.test(one.name));
    return scripts.reduce((sum, script) => sum + script.encodedBodySize, 0);
  });

  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await saysAtTop(page, 'up to date');
  await context.setOffline(true);
  await slowDown(page);
  const times: number[] = [];
  for (let time = 0; time < TIMES; time += 1) {
    await page.reload({ waitUntil: 'commit' });
    // The list comes out of the phone's store: when it is drawn, the page is alive, and a tap does something.
    await page.waitForSelector('a[href*="/pours/"]', { state: 'attached' });
    times.push(
      await page.evaluate(
        () => new Promise<number>((resolve) => setTimeout(() => resolve(performance.now()))),
      ),
    );
  }
  await context.close();
  return [
    limitRow({
      work: 'field shell, script at first load, as sent (gzip)',
      unit: 'kB',
      value: scriptBytes / 1000,
      most: 200,
    }),
    limitRow({
      work: `field shell, offline reload until it can be used, ${PHONE_SLOWDOWN}x slower processor`,
      unit: 'ms',
      value: median(times),
      most: 1000,
    }),
  ];
};
