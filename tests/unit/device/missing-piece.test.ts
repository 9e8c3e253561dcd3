import { expect, it, vi } from 'vitest';
import { until } from '@/tests/faults/world/phone';
import { pourId, site } from '@/tests/faults/world/site';

vi.mock('@/lib/device/sheet-engine', () => Promise.reject(new TypeError('Failed to fetch the piece')));

it('tells that a pour did not open where its piece of the program is missing, and tries no more by itself', async () => {
  const { phone } = site();
  const tab = await phone.tab();
  await until(() => tab.snapshot().pours.some((pour) => pour.id === pourId), 'the pour is listed');
  let told = 0;
  const stop = tab.subscribe(() => {
    told += 1;
    tab.pour(pourId);
  });
  expect(tab.pour(pourId)).toBeUndefined();
  await until(() => tab.pourFailed(pourId), 'the pour is said not to open');
  const before = told;
  await new Promise((done) => setTimeout(done, 50));
  expect(tab.pour(pourId)).toBeUndefined();
  expect(told - before).toBeLessThan(5);
  stop();
  await phone.kill();
});
