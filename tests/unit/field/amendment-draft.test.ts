import { expect, test } from 'vitest';
import { amendmentDraft, amendmentNeedsPhoto } from '@/components/field/amendment-draft';
import { currentBody } from '@/components/field/current-body';
import type { Entry } from '@/lib/inspection/entry';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

function readingAt(mm: number) {
  const story = new PourStory();
  const id = story.reads('A1', mm);
  const sheet = foldSheet(smallPlan(), story.recorded);
  const entry = sheet.entries.find((one) => one.id === id) as Entry;
  const draft = amendmentDraft(entry, currentBody(sheet, entry) ?? {}, entry.authorId);
  if (draft?.kind !== 'text') throw new Error('A reading is amended by its length.');
  return { sheet, entry, draft };
}

test('a reading is amended as it was entered, with its unit', () => {
  const { draft } = readingAt(46);
  expect(draft.value).toBe('46 mm');
  const made = draft.with('1 3/4 in').replacement();
  expect(made).toMatchObject({ ok: true, body: { value: { text: '1 3/4 in', unit: 'in', mm: 44.45 } } });
});

test('a length without its unit is not guessed', () => {
  const made = readingAt(46).draft.with('64').replacement();
  expect(made).toMatchObject({ ok: false });
});

test('from not met to met it asks for the photo, the other way and within not met it does not', () => {
  const low = readingAt(31);
  expect(amendmentNeedsPhoto(low.sheet, low.entry, low.draft.with('41 mm'))).toBe(true);
  expect(amendmentNeedsPhoto(low.sheet, low.entry, low.draft.with('30 mm'))).toBe(false);
  const good = readingAt(46);
  expect(amendmentNeedsPhoto(good.sheet, good.entry, good.draft.with('36 mm'))).toBe(false);
});
