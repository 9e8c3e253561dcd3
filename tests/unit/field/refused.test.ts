import { expect, test } from 'vitest';
import { againPath } from '@/components/field/again-path';
import { governingBeside } from '@/components/field/governing-beside';
import { measuredValue } from '@/components/field/measure-draft';
import { measureOfValue, nextMeasure } from '@/components/field/measure-of-value';
import { pressesOf, readPresses } from '@/components/field/reading-keys';
import { readRoute } from '@/components/field/field-routes';
import { notSentWords, syncWords } from '@/components/field/sync-words';
import type { SyncState } from '@/lib/device/device-types';
import { readEntry } from '@/lib/inspection/entry';
import { foldSheet } from '@/lib/inspection/sheet';
import { emptySnapshot } from '@/lib/device/snapshot-of';
import { PourStory, smallPlan } from '../../stories/pour-story';

const sync = (part: Partial<SyncState>): SyncState => ({ ...emptySnapshot.sync, ...part });

test('what was refused is never said to wait, and never hidden behind what does', () => {
  const refused = sync({ refusedEntries: 2 });
  expect([notSentWords(refused), syncWords(refused)]).toEqual(['2 refused', 'see why']);
  const both = sync({ refusedEntries: 1, waitingEntries: 3 });
  expect([notSentWords(both), syncWords(both)]).toEqual(['3 not sent yet', '1 refused']);
  const offline = sync({ phase: 'offline', waitingEntries: 3 });
  expect([notSentWords(offline), syncWords(offline)]).toEqual(['3 not sent yet', 'no network']);
});

test('a length is refilled as it was entered, with its unit where the keypad is set to another', () => {
  const entered = { text: '1 3/8', unit: 'in', mm: 34.925 } as const;
  for (const unit of ['in', 'mm'] as const) {
    const read = readPresses(pressesOf(entered, unit), unit);
    expect(read.ok && read.value.mm).toBeCloseTo(34.925, 6);
  }
});

test('a count of ties is refilled as the square it was counted on', () => {
  const value = { quantity: 'share', of: 169, tied: 92 } as const;
  const measure = measureOfValue(value, 'mm');
  expect(measure).toMatchObject({ rows: 13, columns: 13 });
  expect(measuredValue(measure, 'mm')).toEqual({ ok: true, value });
});

test('the next square of ties has the size of the last one, and none of its ties', () => {
  const item = smallPlan().measurements.find((one) => one.quantity === 'share') ?? {
    ...smallPlan().measurements[0]!,
    quantity: 'share' as const,
  };
  const next = nextMeasure(item, { quantity: 'share', of: 169, tied: 92 }, 'mm');
  expect(next).toMatchObject({ rows: 13, columns: 13, tied: [] });
});

test('a refused entry leads to the screen that begins with it', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  const read = readEntry(story.recorded.at(-1)!);
  if (read.kind !== 'known') throw new Error('The story wrote something unknown.');
  const path = againPath(read.entry, foldSheet(smallPlan(), []), null) ?? '';
  expect(path).toContain(`?again=${read.entry.id}`);
  expect(readRoute(path.split('?')[0] ?? '')).toMatchObject({ route: { part: 'face', faceId: 'soffit' } });
});

test('reading again says that the less favourable reading still counts', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  story.reads('A2', 44);
  const point = foldSheet(smallPlan(), story.recorded).faces[0]!.points.find((one) => one.label === 'A2')!;
  const [first, second] = point.readings;
  expect(governingBeside(point, first!)).toBeNull();
  expect(governingBeside(point, second!)).toBe(first);
});
