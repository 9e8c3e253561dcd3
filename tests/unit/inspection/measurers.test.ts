import { describe, expect, it } from 'vitest';
import { admitEntry } from '@/lib/inspection/admit-entry';
import { readEntry, type BodyOf } from '@/lib/inspection/entry';
import { holds } from '@/lib/inspection/holds';
import { foldSheet } from '@/lib/inspection/sheet';
import { people, PourStory, smallPlan, type Person } from '../../stories/pour-story';

const typedFor = (person: Person, confirmed = false) => ({
  measurer: { personId: people[person], confirmed },
});
const sheetOf = (story: PourStory) => foldSheet(smallPlan(), story.recorded);
const pointA3 = (story: PourStory) => sheetOf(story).faces[0]!.points.find((one) => one.label === 'A3')!;
const bodyOf = (story: PourStory, id: string) =>
  story.recorded.find((one) => one.id === id)!.body as BodyOf<'reading'>;

/** What the server says to an entry that is recorded last: null where it takes it in. */
function admitted(story: PourStory, id: string) {
  const before = foldSheet(
    smallPlan(),
    story.recorded.filter((one) => one.id !== id),
  );
  const read = readEntry(story.recorded.find((one) => one.id === id)!);
  if (read.kind !== 'known') throw new Error('This entry cannot be read.');
  return admitEntry(read.entry, before);
}

function amends(story: PourStory, person: Person, id: string, over: Partial<BodyOf<'reading'>>): string {
  return story.tells(person, 'amendment', {
    rootId: id,
    sawAmendmentId: null,
    reason: 'as I read it',
    replacement: JSON.parse(JSON.stringify({ ...bodyOf(story, id), ...over })),
    photoId: null,
  });
}

describe('a reading that one person takes and another types', () => {
  it('counts neither way until who read confirms it, and says what it will be judged', () => {
    const story = new PourStory().hears('secondInspector');
    story.reads('A3', 31, 'secondInspector', typedFor('inspector'));
    expect(pointA3(story).mark).toBe('not-verified');
    expect(pointA3(story).readings[0]?.onceConfirmed?.verdict).toBe('not-met');
    const hold = holds(sheetOf(story), story.now).find((one) => one.kind === 'not-verified');
    expect(hold?.need).toContain('The person named as having read confirms the readings');
  });

  it('is confirmed by who read, and then counts with the value as typed', () => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 46, 'secondInspector', typedFor('inspector'));
    const word = amends(story, 'inspector', id, typedFor('inspector', true));
    expect(admitted(story, word)).toBeNull();
    expect(pointA3(story).mark).toBe('met');
    expect(pointA3(story).readings[0]?.onceConfirmed).toBeNull();
  });

  it('is put right by who read, and the value typed first stays in the record', () => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 64, 'secondInspector', typedFor('inspector'));
    const value = { text: '34', unit: 'mm' as const, mm: 34 };
    amends(story, 'inspector', id, { value, ...typedFor('inspector', true) });
    expect(pointA3(story).mark).toBe('not-met-low');
    expect(pointA3(story).readings[0]?.entry.body.value?.mm).toBe(64);
  });

  it.each([
    ['who typed it', 'secondInspector', 'Only the person who read can confirm the reading.'],
    ['anybody else', 'superintendent', 'Only the person who recorded it can amend it.'],
  ] as const)('is not confirmed by %s', (_, person, sentence) => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 46, 'secondInspector', typedFor('inspector'));
    const word = amends(story, person, id, typedFor('inspector', true));
    expect(pointA3(story).mark).toBe('not-verified');
    expect(pointA3(story).readings[0]?.amendments.map((one) => one.problem)).toEqual([sentence]);
    expect(admitted(story, word)?.code).toBe('not-allowed');
  });

  it('is never recorded as confirmed already by who only typed it', () => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 46, 'secondInspector', typedFor('inspector', true));
    expect(admitted(story, id)).toMatchObject({ code: 'not-allowed', field: 'measurer' });
    const own = story.reads('A3', 46, 'inspector', typedFor('inspector', true));
    expect(admitted(story, own)).toBeNull();
  });

  it('waits again once who typed it has changed it after the confirmation', () => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 46, 'secondInspector', typedFor('inspector'));
    amends(story, 'inspector', id, typedFor('inspector', true));
    const value = { text: '56', unit: 'mm' as const, mm: 56 };
    amends(story, 'secondInspector', id, { value, ...typedFor('inspector', true) });
    expect(pointA3(story).readings[0]?.current?.value?.mm).toBe(46);
    amends(story, 'secondInspector', id, { value, ...typedFor('inspector') });
    expect(pointA3(story).mark).toBe('not-verified');
  });

  it('is not handed to another reader by an amendment', () => {
    const story = new PourStory().hears('secondInspector');
    const id = story.reads('A3', 31, 'secondInspector', typedFor('inspector'));
    amends(story, 'secondInspector', id, { measurer: null });
    expect(pointA3(story).mark).toBe('not-verified');
    expect(pointA3(story).readings[0]?.amendments[0]?.counts).toBe(false);
  });
});
