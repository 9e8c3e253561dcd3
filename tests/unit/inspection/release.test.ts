import { describe, expect, it } from 'vitest';
import type { BodyOf } from '@/lib/inspection/entry';
import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { decideRelease } from '@/lib/inspection/release-decision';
import { placedWithoutRelease, voidsFollowing } from '@/lib/inspection/release-voids';
import { foldSheet } from '@/lib/inspection/sheet';
import { gauge, PourStory, smallPlan } from '../../stories/pour-story';

const everything = { elementIds: null, limits: '' };

function released(): PourStory {
  const story = new PourStory().inspected().signed();
  const decision = decideRelease(foldSheet(smallPlan(), story.recorded), everything, story.now);
  if (decision.kind !== 'granted') throw new Error(`not granted: ${JSON.stringify(decision)}`);
  story.tells('superintendent', 'release', {
    ...decision.rests,
    number: 1,
    sheetDigest: 'e'.repeat(64),
    headSeq: story.head,
    headHash: null,
  });
  return story;
}
const voids = (story: PourStory) => voidsFollowing(foldSheet(smallPlan(), story.recorded), story.now);
const state = (story: PourStory) => {
  const sheet = foldSheet(smallPlan(), story.recorded);
  return pourState(sheet, holds(sheet, story.now), story.now);
};

describe('a release', () => {
  it('stands until something happens', () => {
    const story = released();
    expect(voids(story)).toEqual([]);
    expect(state(story)).toBe('released');
  });

  it('is refused with the holds in its scope', () => {
    const decision = decideRelease(
      foldSheet(smallPlan(), new PourStory().recorded),
      everything,
      '2026-12-01T06:00:00.000Z',
    );
    expect(decision.kind).toBe('refused');
    expect(decision.kind === 'refused' && decision.holds.length).toBeGreaterThan(3);
  });

  it('cannot be given after placing has begun', () => {
    const story = new PourStory().inspected().signed();
    story.tells('superintendent', 'placement', { event: 'started', at: story.now, elementIds: null });
    expect(decideRelease(foldSheet(smallPlan(), story.recorded), everything, story.now).kind).toBe(
      'impossible',
    );
    expect(placedWithoutRelease(foldSheet(smallPlan(), story.recorded))).not.toBeNull();
  });

  it('of a part has to say where it ends', () => {
    const plan = smallPlan();
    const deck = plan.elements[0]!;
    const two = smallPlan({
      elements: [
        deck,
        { ...deck, id: 'ramp', faces: deck.faces.map((face) => ({ ...face, id: 'ramp-top', points: [] })) },
      ],
    });
    const story = new PourStory().inspected().signed();
    const sheet = foldSheet(two, story.recorded);
    expect(decideRelease(sheet, { elementIds: ['deck'], limits: '' }, story.now).kind).toBe('impossible');
    expect(decideRelease(sheet, { elementIds: ['deck'], limits: 'Bulkhead at grid D' }, story.now).kind).toBe(
      'granted',
    );
    expect(decideRelease(sheet, everything, story.now).kind).toBe('refused');
  });

  it.each<[string, Partial<BodyOf<'site-event'>>, boolean]>([
    ['rain over the limit', { kind: 'rain', amountMm: 8 }, true],
    ['rain at the limit', { kind: 'rain', amountMm: 5 }, true],
    ['rain of unknown amount', { kind: 'rain', amountMm: null }, true],
    ['rain below the limit', { kind: 'rain', amountMm: 2 }, false],
    ['washed soil', { kind: 'washed-soil', amountMm: null }, true],
    ['traffic on the mat', { kind: 'traffic', amountMm: null }, true],
    ['no light', { kind: 'no-light', amountMm: null }, true],
  ])('after %s: void %#', (_name, event, expected) => {
    const story = released();
    const at = story.now;
    story.tells('inspector', 'site-event', {
      kind: 'rain',
      at,
      amountMm: null,
      text: '',
      elementIds: null,
      ...event,
    });
    const found = voids(story);
    expect(found.length === 1).toBe(expected);
    if (expected) expect(found[0]!.at).toBe(at);
  });

  it('is void by a later reading that is not met, by a failed block check, by an amendment and by a query', () => {
    const byReading = released();
    byReading.hears('inspector');
    byReading.reads('A1', 30);
    expect(voids(byReading)[0]?.cause).toBe('later-reading');

    const byBlock = released();
    byBlock.tells('coordinator', 'block-check', {
      instrumentId: gauge,
      at: byBlock.now,
      when: 'end',
      blockMm: 50,
      readMm: 55,
      toleranceMm: 1,
    });
    expect(voids(byBlock)[0]?.cause).toBe('instrument-suspect');

    const byQuery = released();
    const reading = byQuery.recorded.find((entry) => entry.type === 'reading')!;
    byQuery.tells('engineer', 'query', { entryId: reading.id, text: 'Which bar was this?' });
    expect(voids(byQuery)[0]?.cause).toBe('new-hold');
  });

  it('stands when another instrument fails its block check', () => {
    const story = released();
    const other = '00000003-0000-7000-8000-000000000077';
    story.tells('coordinator', 'block-check', {
      instrumentId: other,
      at: story.now,
      when: 'end',
      blockMm: 50,
      readMm: 55,
      toleranceMm: 1,
    });
    expect(voids(story)).toEqual([]);
    expect(state(story)).toBe('released');
  });

  it('runs out at the end of its validity, judged whenever it is read', () => {
    const story = released().pass(25 * 60);
    expect(state(story)).not.toBe('released');
    expect(voids(story)[0]?.cause).toBe('validity-over');
    const started = released();
    started.tells('superintendent', 'placement', { event: 'started', at: started.now, elementIds: null });
    started.pass(25 * 60);
    expect(voids(started)).toEqual([]);
    expect(state(started)).toBe('placing');
  });

  it('once void is never lifted, and a new one needs new signatures and a new last walk', () => {
    const story = released();
    story.tells('inspector', 'site-event', {
      kind: 'rain',
      at: story.now,
      amountMm: 20,
      text: '',
      elementIds: null,
    });
    const written = voids(story)[0]!;
    story.tells('coordinator', 'release-void', written);
    expect(voids(story)).toEqual([]);
    const open = holds(foldSheet(smallPlan(), story.recorded), story.now).map((hold) => hold.kind);
    expect(open).toEqual(['last-walk-missing', 'signature-missing', 'signature-missing']);
  });
});
