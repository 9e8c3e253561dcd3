import { expect, test } from 'vitest';
import { blockCheckPasses, coverMeterAccuracy } from '@/lib/concrete/cover-meter';
import { carbonationTimeRatio } from '@/lib/concrete/low-cover-cost';
import { QUANTILES_NEED } from '@/lib/concrete/statistics';
import { checkName } from './check-name';
import { numberAt, Topic } from './load-records';

const topic = '08 cover meter';
const book = new Topic('08-cover-meter');
const of = (id: string) => book.take(id);

test(checkName(topic, of('cm.bs1881.lab')), () => {
  expect([20, 40, 60, 100].map(coverMeterAccuracy)).toEqual([2, 2, 3, 5]);
  expect(blockCheckPasses(62.99, 60)).toBe(true);
  expect(blockCheckPasses(63.01, 60)).toBe(false);
});

const few = of('dbv.n');
test(checkName(topic, few), () => {
  expect(QUANTILES_NEED).toBe(numberAt(few.values, 'n_min'));
});

const half = of('rilem.square');
test(checkName(topic, half), () => {
  const left = carbonationTimeRatio(20, 40).ratio;
  expect((1 - left) * 100).toBeCloseTo(numberAt(half.values, 'reduction_of_initiation_time_percent'), 9);
});
