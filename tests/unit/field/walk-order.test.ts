import { expect, test } from 'vitest';
import { readingTarget } from '@/components/field/reading-target';
import { nextPoint, walkProgress } from '@/components/field/walk-order';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

const faceOf = (story: PourStory) => {
  const face = foldSheet(smallPlan(), story.recorded).faces[0];
  if (!face) throw new Error('The plan has a face.');
  return face;
};

test('the walk begins at the corner and goes to the nearest point not read', () => {
  const story = new PourStory();
  expect(nextPoint(faceOf(story).points, null)?.label).toBe('A1');
  story.reads('A1', 46);
  const face = faceOf(story);
  const from = face.points.find((point) => point.label === 'A1');
  expect(nextPoint(face.points, from ?? null)?.label).toBe('B1');
});

test('a point read out of order is not asked for again, and the walk goes on from there', () => {
  const story = new PourStory();
  story.reads('A3', 46);
  const face = faceOf(story);
  const from = face.points.find((point) => point.label === 'A3');
  expect(nextPoint(face.points, from ?? null)?.label).not.toBe('A3');
  expect(walkProgress(face.points)).toEqual({ read: 1, total: 5, left: 4 });
});

test('a reading that is not verified leaves its point on the walk', () => {
  const story = new PourStory();
  story.reads('A1', 46, 'inspector', { instrumentId: null });
  expect(nextPoint(faceOf(story).points, null)?.label).toBe('A1');
});

test('after a correction its point is asked for again', () => {
  const story = new PourStory().inspected();
  story.reads('A2', 31);
  expect(nextPoint(faceOf(story).points, null)).toBeNull();
  story.tells('superintendent', 'correction', {
    about: [{ kind: 'point', id: 'soffit.A2' }],
    text: 'Chair set under the bar',
    where: { elementId: 'deck', faceId: 'soffit', text: '' },
  });
  const target = readingTarget(faceOf(story), null, null);
  expect(target?.point?.recheck).not.toBeNull();
});

test('a chosen spot is read where it was tapped, not at the next point', () => {
  const face = faceOf(new PourStory());
  const target = readingTarget(face, { kind: 'spot', place: { xMm: 12, yMm: 34 } }, null);
  expect(target).toEqual({ place: { xMm: 12, yMm: 34 }, label: 'spot' });
});
