import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { RecordedEntry } from '@/lib/inspection/facts';
import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { decideRelease } from '@/lib/inspection/release-decision';
import { foldSheet, newFoldMemo } from '@/lib/inspection/sheet';
import { sheetStatement } from '@/lib/inspection/sheet-statement';
import { headsOf, saw, type Placed } from '@/lib/inspection/causality';
import { gauge, PourStory, smallPlan, uuid, type Person } from '../../stories/pour-story';

const everything = { elementIds: null, limits: '' };
const labels = ['A1', 'A2', 'A3', 'B1', 'B2'] as const;

/** Acts of people on site, in any order; each says whether its author had fetched first. */
const act = fc.oneof(
  fc.record({
    act: fc.constant('read' as const),
    who: fc.constantFrom<Person>('inspector', 'secondInspector'),
    label: fc.constantFrom(...labels),
    mm: fc.integer({ min: 10, max: 70 }),
    hears: fc.boolean(),
  }),
  fc.record({
    act: fc.constant('answer' as const),
    who: fc.constantFrom<Person>('inspector', 'secondInspector'),
    checkId: fc.constantFrom('drawings-current', 'chairs-stand'),
    met: fc.boolean(),
    hears: fc.boolean(),
  }),
  fc.record({ act: fc.constant('correct' as const), label: fc.constantFrom(...labels), hears: fc.boolean() }),
  fc.record({ act: fc.constant('correct-face' as const), hears: fc.boolean() }),
  fc.record({
    act: fc.constant('amend' as const),
    label: fc.constantFrom(...labels),
    mm: fc.option(fc.integer({ min: 10, max: 70 })),
    /** The photograph that shows it is taken before the amendment, after it, or never. */
    photo: fc.constantFrom('before', 'after', 'never'),
  }),
  fc.record({
    act: fc.constant('decide' as const),
    label: fc.constantFrom(...labels),
    decision: fc.constantFrom('use-as-is', 'repair', 'rework'),
    withdrawn: fc.boolean(),
  }),
  fc.record({ act: fc.constant('block' as const), readMm: fc.constantFrom(50, 53) }),
  fc.record({ act: fc.constant('walk' as const), met: fc.boolean() }),
  fc.record({
    act: fc.constant('sign' as const),
    who: fc.constantFrom<'inspector' | 'superintendent'>('inspector', 'superintendent'),
  }),
  fc.record({ act: fc.constant('inspect' as const) }),
);
type Act = typeof act extends fc.Arbitrary<infer A> ? A : never;

function perform(story: PourStory, step: Act): void {
  switch (step.act) {
    case 'read':
      if (step.hears) story.hears(step.who);
      story.reads(step.label, step.mm, step.who);
      break;
    case 'answer':
      if (step.hears) story.hears(step.who);
      story.say(step.who, 'answer', { checkId: step.checkId, answer: step.met ? 'met' : 'not-met' });
      break;
    case 'correct':
      if (step.hears) story.hears('superintendent');
      story.say('superintendent', 'correction', {
        about: [{ kind: 'point', id: `soffit.${step.label}` }],
        text: 'Reset',
        where: { elementId: null, faceId: null, text: '' },
      });
      break;
    case 'correct-face':
      if (step.hears) story.hears('superintendent');
      story.say('superintendent', 'correction', {
        about: [{ kind: 'face', id: 'soffit' }],
        text: 'Chairs added',
        where: { elementId: null, faceId: null, text: '' },
      });
      break;
    case 'amend':
      amend(story, step);
      break;
    case 'decide':
      decide(story, step);
      break;
    case 'block':
      story.tells('coordinator', 'block-check', {
        instrumentId: gauge,
        at: story.now,
        when: 'middle',
        blockMm: 50,
        readMm: step.readMm,
        toleranceMm: 1,
      });
      break;
    case 'walk':
      story.tells('inspector', 'last-walk', {
        outcome: step.met ? 'met' : 'not-met',
        places: 'All',
        elementIds: null,
      });
      break;
    case 'sign':
      story.signs(step.who);
      break;
    case 'inspect':
      story.inspected();
      break;
  }
}

const lastReadingAt = (story: PourStory, label: string) =>
  story.recorded.findLast((entry) => entry.type === 'reading' && entry.body.pointId === `soffit.${label}`);

function amend(story: PourStory, step: Extract<Act, { act: 'amend' }>): void {
  const reading = lastReadingAt(story, step.label);
  if (!reading) return;
  const photoId = uuid(8, 100_000 + story.head);
  const takePhoto = () =>
    story.say('inspector', 'photo', {
      photoId,
      sha256: 'c'.repeat(64),
      bytes: 10,
      contentType: 'image/jpeg',
      takenAt: story.now,
      about: { kind: 'point', id: `soffit.${step.label}` },
      shot: 'close',
      caption: '',
    });
  if (step.photo === 'before') takePhoto();
  story.say('inspector', 'amendment', {
    rootId: reading.id,
    sawAmendmentId: null,
    reason: 'recording error',
    replacement:
      step.mm === null ? null : { ...story.readingBody(step.label, step.mm), measuredAt: story.now },
    photoId: step.photo === 'never' ? null : photoId,
  });
  if (step.photo === 'after') takePhoto();
}

function decide(story: PourStory, step: Extract<Act, { act: 'decide' }>): void {
  const reading = lastReadingAt(story, step.label);
  const nonconformanceId = story.tells('inspector', 'nonconformance', {
    title: `Low cover at ${step.label}`,
    about: [{ kind: 'point', id: `soffit.${step.label}` }],
    where: { elementId: 'deck', faceId: 'soffit', text: step.label },
    extent: 'One bar',
    description: '',
    proposal: '',
    neededBy: null,
  });
  story.tells('engineer', 'disposition', {
    nonconformanceId,
    decision: step.decision,
    reason: 'Checked by calculation',
    accepts: reading ? [reading.id] : [],
    extent: step.label,
    conditions: [],
    licence: 'PE-0000',
  });
  if (!step.withdrawn) return;
  story.say('inspector', 'amendment', {
    rootId: nonconformanceId,
    sawAmendmentId: null,
    reason: 'raised in error',
    replacement: null,
    photoId: null,
  });
}

const told = (steps: Act[]): PourStory => {
  const story = new PourStory();
  for (const step of steps) perform(story, step);
  return story;
};

/** What people act on: the judged facts, and which holds stand. */
const view = (recorded: readonly RecordedEntry[], now: string) => {
  const sheet = foldSheet(smallPlan(), recorded);
  return {
    statement: sheetStatement(sheet),
    holds: holds(sheet, now)
      .map((hold) => hold.id)
      .sort(),
  };
};

describe('the fold', () => {
  it('gives the same sheet whatever the order in which the entries are handed over, and however often', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 25 }), fc.infiniteStream(fc.nat()), (steps, order) => {
        const story = told(steps);
        const shuffled = [...story.recorded, ...story.recorded]
          .map((entry) => ({ entry, key: order.next().value as number }))
          .sort((a, b) => a.key - b.key)
          .map(({ entry }) => entry);
        expect(view(shuffled, story.now)).toEqual(view(story.recorded, story.now));
      }),
    );
  });

  it('gives the same sheet when entries of people who had not heard each other arrive in another order', () => {
    const offline = fc.array(
      fc.record({
        who: fc.constantFrom<Person>('inspector', 'secondInspector'),
        label: fc.constantFrom(...labels),
        mm: fc.integer({ min: 10, max: 70 }),
      }),
      { minLength: 1, maxLength: 12 },
    );
    fc.assert(
      fc.property(offline, fc.infiniteStream(fc.boolean()), (readings, coin) => {
        const story = new PourStory();
        story.hears('inspector', 'secondInspector');
        const base = story.recorded.length;
        for (const one of readings) story.reads(one.label, one.mm, one.who);
        const made = story.recorded.slice(base);
        // Merge the two devices' batches in another way; each device's own order stays.
        const queues = [
          made.filter((entry) => entry.authorId === made[0]!.authorId),
          made.filter((entry) => entry.authorId !== made[0]!.authorId),
        ];
        const merged: RecordedEntry[] = [];
        while (queues.some((queue) => queue.length > 0)) {
          const queue = queues[coin.next().value ? 0 : 1]!;
          const next = (queue.length > 0 ? queue : queues.find((other) => other.length > 0)!).shift()!;
          merged.push({ ...next, seq: base + merged.length + 1 });
        }
        const again = [...story.recorded.slice(0, base), ...merged];
        expect(view(again, story.now)).toEqual(view(story.recorded, story.now));
      }),
    );
  });

  it('extended entry by entry equals the fold of the whole', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 20 }), (steps) => {
        const story = told(steps);
        const memo = newFoldMemo();
        for (let length = 1; length < story.recorded.length; length += 1)
          foldSheet(smallPlan(), story.recorded.slice(0, length), memo);
        const stepwise = foldSheet(smallPlan(), story.recorded, memo);
        const whole = foldSheet(smallPlan(), story.recorded);
        expect(sheetStatement(stepwise)).toBe(sheetStatement(whole));
        expect(holds(stepwise, story.now)).toEqual(holds(whole, story.now));
      }),
    );
  });
});

describe('the facts that nobody spoke in sight of', () => {
  it('are those of the definition: no other fact had seen them', () => {
    const fact = fc.record({
      authorId: fc.constantFrom('a', 'b'),
      deviceId: fc.constantFrom('1', '2'),
      deviceSeq: fc.nat(6),
      seq: fc.option(fc.integer({ min: 1, max: 8 })),
      seenSeq: fc.nat(9),
    });
    fc.assert(
      fc.property(fc.array(fact, { maxLength: 9 }), (made) => {
        const facts: Placed[] = made.map((one, index) => ({ ...one, id: String(index) }));
        const defined = facts.filter((one) => !facts.some((other) => saw(other, one)));
        expect(headsOf(facts)).toEqual(defined);
      }),
    );
  });
});

describe('caution', () => {
  it('an unfavourable reading never makes a pour releasable', () => {
    fc.assert(
      fc.property(
        fc.array(act, { maxLength: 25 }),
        fc.constantFrom(...labels),
        fc.integer({ min: 1, max: 37 }),
        fc.boolean(),
        (steps, label, mm, hears) => {
          const story = told(steps);
          if (hears) story.hears('inspector');
          story.reads(label, mm, 'inspector');
          expect(decideRelease(foldSheet(smallPlan(), story.recorded), everything, story.now).kind).not.toBe(
            'granted',
          );
        },
      ),
    );
  });

  it('no sequence of acts on site makes a pour released: only the server’s release entry does', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 25 }), (steps) => {
        const story = told(steps);
        const sheet = foldSheet(smallPlan(), story.recorded);
        expect(pourState(sheet, holds(sheet, story.now), story.now)).not.toBe('released');
      }),
    );
  });

  it('a pour that is inspected and signed in order can be released: the two properties above are not empty', () => {
    const story = told([
      { act: 'inspect' },
      { act: 'sign', who: 'inspector' },
      { act: 'sign', who: 'superintendent' },
    ]);
    expect(decideRelease(foldSheet(smallPlan(), story.recorded), everything, story.now).kind).toBe('granted');
  });
});
