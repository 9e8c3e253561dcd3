import { expect, test } from 'vitest';
import { correctedTogether, failingOnFace } from '@/lib/inspection/corrected-together';
import { failingBeside, nonconformanceDraft } from '@/components/field/nonconformance-draft';
import { holdPath } from '@/components/field/hold-path';
import { clockWords, notSentWords, syncWords } from '@/components/field/sync-words';
import { readRoute } from '@/components/field/field-routes';
import { holds } from '@/lib/inspection/holds';
import { foldSheet } from '@/lib/inspection/sheet';
import { MemoryDevice } from './memory-device';
import { PourStory, smallPlan } from '../../stories/pour-story';

test('a nonconformance begins with what was read, what is accepted, and where', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  story.reads('B1', 36);
  const sheet = foldSheet(smallPlan(), story.recorded);
  const about = { kind: 'point', id: 'soffit.A2' } as const;
  expect(nonconformanceDraft(sheet, about).title).toBe(
    'Cover 31 mm, accepted from 38 mm, A2, Quay deck, bay 3, soffit',
  );
  expect(failingBeside(sheet, about).map((point) => point.label)).toEqual(['B1']);
});

test('a correction of a nonconformance is about the points it names, so that they are read again', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  const id = story.tells('inspector', 'nonconformance', {
    title: 'Low cover',
    about: [{ kind: 'point', id: 'soffit.A2' }],
    where: { elementId: 'deck', faceId: 'soffit', text: 'A2' },
    extent: 'one bar',
    description: '',
    proposal: '',
    neededBy: null,
  });
  const sheet = foldSheet(smallPlan(), story.recorded);
  expect(correctedTogether(sheet, { kind: 'nonconformance', id })).toContainEqual({
    kind: 'point',
    id: 'soffit.A2',
  });
});

test('a report on a face offers each point that fails, and marks what the engineer is asked about', () => {
  const story = new PourStory();
  story.reads('A1', 60);
  story.reads('A2', 31);
  story.reads('B1', 30);
  story.tells('inspector', 'nonconformance', {
    title: 'Low cover',
    about: [{ kind: 'point', id: 'soffit.A2' }],
    where: { elementId: 'deck', faceId: 'soffit', text: 'A2' },
    extent: 'one bar',
    description: '',
    proposal: 'Leave it',
    neededBy: null,
  });
  const sheet = foldSheet(smallPlan(), story.recorded);
  expect(failingOnFace(sheet, 'soffit').map(({ label, asked }) => [label, asked])).toEqual([
    ['A2', true],
    ['B1', false],
  ]);
  const cover = holds(sheet, story.now).filter((hold) => hold.kind === 'cover-not-met');
  expect(cover.map((hold) => [hold.clearedBy, hold.subjects.map((one) => one.id)]).sort()).toEqual([
    ['engineer', ['soffit.A2']],
    ['superintendent', ['soffit.B1']],
  ]);
});

test('every hold leads to a screen that exists', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  story.say('inspector', 'answer', { checkId: 'debris', answer: 'not-met' });
  story.say('inspector', 'verbal-instruction', { from: 'The owner', text: 'Leave it', signedBy: null });
  const sheet = foldSheet(smallPlan(), story.recorded);
  const found = holds(sheet, story.now);
  expect(found.length).toBeGreaterThan(5);
  for (const hold of found) expect(readRoute(holdPath(hold, sheet)).screen).toBe('pour');
});

test('something that waits is never called up to date', () => {
  const { sync } = new MemoryDevice(smallPlan(), new PourStory().recorded).snapshot();
  const idle = { ...sync, phase: 'idle' as const };
  expect(syncWords(idle)).toBe('up to date');
  expect(syncWords({ ...idle, waitingPhotos: 1 })).not.toBe('up to date');
  expect(syncWords({ ...idle, refusedEntries: 1 })).not.toBe('up to date');
  expect(notSentWords({ ...idle, waitingEntries: 2, waitingPhotos: 1 })).toBe('3 not sent yet');
});

test('a clock off by more than five minutes is told, by how much and which way', () => {
  expect(clockWords(4 * 60_000)).toBeNull();
  expect(clockWords(-60 * 60_000)).toContain('60 minutes fast');
  expect(clockWords(365 * 86_400_000)).toContain('365 days slow');
});
