import { describe, expect, it } from 'vitest';
import { admitEntry } from '@/lib/inspection/admit-entry';
import { mayRecord } from '@/lib/inspection/entry-access';
import { holds } from '@/lib/inspection/holds';
import { roles } from '@/lib/inspection/roles';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

const sheetOf = (story: PourStory) => foldSheet(smallPlan(), story.recorded);
const entryOf = (story: PourStory, id: string) => sheetOf(story).entries.find((entry) => entry.id === id)!;
const kinds = (story: PourStory) => holds(sheetOf(story), story.now).map((hold) => hold.kind);

describe('a verbal instruction', () => {
  const instructed = () => {
    const story = new PourStory();
    const id = story.tells('inspector', 'verbal-instruction', {
      from: 'The owner’s agent',
      text: 'Leave out the drip groove',
      signedBy: null,
    });
    return { story, id };
  };

  it('holds until the engineer has it in writing', () => {
    const { story, id } = instructed();
    expect(kinds(story)).toContain('verbal-instruction');
    const lifted = story.tells('engineer', 'hold-lifted', { holdId: id, reason: 'Letter of 1 December' });
    expect(admitEntry(entryOf(story, lifted), sheetOf(story))).toBeNull();
    expect(kinds(story)).not.toContain('verbal-instruction');
  });

  it('is not lifted by anybody else', () => {
    const { story, id } = instructed();
    const tried = story.tells('superintendent', 'hold-lifted', { holdId: id, reason: 'We go on' });
    expect(admitEntry(entryOf(story, tried), sheetOf(story))).toMatchObject({ code: 'not-allowed' });
  });
});

describe('a hold placed by hand', () => {
  it.each(roles)('for the %s is taken in only where that role can lift it', (clearedBy) => {
    const story = new PourStory();
    const id = story.tells('inspector', 'hold', {
      title: 'Owner asks to see the drain',
      where: { elementId: null, faceId: null, text: '' },
      clearedBy,
      need: 'The visit is noted',
      onBehalfOf: '',
    });
    const refusal = admitEntry(entryOf(story, id), sheetOf(story));
    if (mayRecord('hold-lifted', clearedBy)) expect(refusal).toBeNull();
    else expect(refusal).toMatchObject({ code: 'invalid', field: 'clearedBy' });
  });
});
