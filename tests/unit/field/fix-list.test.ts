import { expect, test } from 'vitest';
import { fixItemWords, fixListText } from '@/components/field/fix-list-words';
import { fixList } from '@/lib/inspection/fix-list';
import { holds } from '@/lib/inspection/holds';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

const listOf = (story: PourStory) => {
  const sheet = foldSheet(smallPlan(), story.recorded);
  return fixList(sheet, holds(sheet, story.now));
};

test('the crew is told what was read, where, and what is accepted, in both languages', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  story.say('inspector', 'answer', { checkId: 'debris', answer: 'not-met', note: 'Sawdust at the east end' });
  const items = listOf(story);
  expect(items.map((item) => item.what.kind)).toEqual(['cover', 'check']);
  const [cover] = items;
  if (!cover) throw new Error('There is a low reading.');
  expect(fixItemWords(cover, 'en')).toEqual({
    title: 'Cover too small: accepted from 38 mm',
    lines: ['A2: 31 mm'],
  });
  expect(fixItemWords(cover, 'es').title).toBe('Recubrimiento insuficiente: se acepta desde 38 mm');
  const text = fixListText(items, { number: 'P-014', title: 'Quay deck', planned: '' }, 'es');
  expect(text).toContain('Lista de correcciones: P-014');
  expect(text).toContain('Sawdust at the east end');
});

test('what has been reported as corrected leaves the list and waits for the inspector', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  story.tells('superintendent', 'correction', {
    about: [{ kind: 'point', id: 'soffit.A2' }],
    text: 'Chair set under the bar',
    where: { elementId: 'deck', faceId: 'soffit', text: '' },
  });
  expect(listOf(story)).toEqual([]);
});

test('what is only not done yet is not for the crew', () => {
  expect(listOf(new PourStory())).toEqual([]);
});
