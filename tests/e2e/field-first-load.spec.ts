import { expect, test } from '@playwright/test';
import { appAddress, phone, signedIn } from './sign-in';

const MOST_BYTES = 200_000;

test('the phone opens with at most 200 kB of script, and has the rest once the worker is there', async ({
  browser,
}) => {
  const first = await signedIn(browser, 'inspector', phone, '/field');
  const cookies = await first.context.cookies();
  await first.context.close();

  // A device that has never been here, with a session: nothing is in its cache.
  const context = await browser.newContext(phone);
  await context.addCookies(cookies);
  const page = await context.newPage();
  const scripts = new Map<string, Promise<number>>();
  page.on('response', (response) => {
    if (response.request().resourceType() !== 'script') return;
    const size = response
      .request()
      .sizes()
      .then((sizes) => sizes.responseBodySize);
    scripts.set(new URL(response.url()).pathname, size);
  });
  await page.goto(appAddress('/field'));
  await expect(page.getByRole('heading', { level: 1, name: 'Pours' })).toBeVisible();

  // What the page names itself is what has to arrive before anything can be touched.
  const named = await page.evaluate(async () => {
    const html = await (await fetch('/field')).text();
    const found = new DOMParser()
      .parseFromString(html, 'text/html')
      .querySelectorAll('script[src]:not([nomodule])');
    return [...found].map((script) => new URL((script as HTMLScriptElement).src).pathname);
  });
  let bytes = 0;
  for (const script of named) {
    const size = await scripts.get(script);
    expect(size, `${script} was fetched`).toBeGreaterThan(0);
    bytes += size ?? 0;
  }
  test.info().annotations.push({ type: 'bytes of script, gzipped', description: String(bytes) });
  expect(bytes).toBeLessThanOrEqual(MOST_BYTES);

  // Every other piece is kept by the worker at once: with the network gone, all screens open.
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  const unkept = await page.evaluate(async () => {
    const kept = new Set<string>();
    for (const name of await caches.keys()) {
      for (const request of await (await caches.open(name)).keys()) kept.add(new URL(request.url).pathname);
    }
    const loaded = performance.getEntriesByType('resource').map((entry) => new URL(entry.name).pathname);
    return loaded.filter(
      (path) => path.startsWith('/_next/static/') && path.endsWith('.js') && !kept.has(path),
    );
  });
  expect(unkept.filter((path) => !named.includes(path))).toEqual([]);
  await context.close();
});
