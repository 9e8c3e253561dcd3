import { describe, expect, it } from 'vitest';
import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { decideRelease } from '@/lib/inspection/release-decision';
import { foldSheet } from '@/lib/inspection/sheet';
import type { Plan } from '@/lib/inspection/plan';
import { gauge, people, PourStory, smallPlan, uuid } from '../../stories/pour-story';

const everything = { elementIds: null, limits: '' };
const kinds = (story: PourStory, plan: Plan = smallPlan()) =>
  holds(foldSheet(plan, story.recorded), story.now).map((hold) => hold.kind);
const point = (story: PourStory, label: string, plan: Plan = smallPlan()) =>
  foldSheet(plan, story.recorded).faces[0]!.points.find((state) => state.label === label)!;

describe('a pour from the first reading to the release', () => {
  it('holds for everything that is not done yet', () => {
    const story = new PourStory();
    expect(new Set(kinds(story))).toEqual(
      new Set(['readings-missing', 'check-open', 'last-walk-missing', 'signature-missing']),
    );
    const sheet = foldSheet(smallPlan(), story.recorded);
    expect(pourState(sheet, holds(sheet, story.now), story.now)).toBe('not-read');
  });

  it('is released once read, checked, walked and signed by two people', () => {
    const story = new PourStory().inspected().signed();
    const sheet = foldSheet(smallPlan(), story.recorded);
    expect(holds(sheet, story.now)).toEqual([]);
    const decision = decideRelease(sheet, everything, story.now);
    expect(decision.kind).toBe('granted');
    expect(decision.kind === 'granted' && decision.rests.readings).toBe(5);
    expect(decision.kind === 'granted' && decision.rests.drawings).toEqual(['S-204 rev 5']);
  });

  it('does not take one person’s signatures for both roles', () => {
    const story = new PourStory().inspected();
    story.signs('inspector');
    expect(kinds(story)).toEqual(['signature-missing']);
  });

  it('does not count a signature before its author confirmed it', () => {
    const story = new PourStory().inspected();
    story.signs('inspector');
    story.tells('superintendent', 'signature', {
      as: 'superintendent',
      elementIds: null,
      words: 'Ready',
      strokes: [],
      sheetDigest: 'b'.repeat(64),
    });
    expect(kinds(story)).toEqual(['signature-missing']);
  });
});

describe('reading again', () => {
  it('does not erase: the least favourable reading of a round governs', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    story.reads('A3', 31);
    story.reads('A3', 45);
    expect(point(story, 'A3').mark).toBe('not-met-low');
    expect(kinds(story)).toContain('cover-not-met');
  });

  it('supersedes after a correction that the reader had seen, and asks for the neighbours', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    story.reads('A3', 31);
    story.tells('superintendent', 'correction', {
      about: [{ kind: 'point', id: 'soffit.A3' }],
      text: 'Chair reset',
      where: { elementId: 'deck', faceId: 'soffit', text: 'A3' },
    });
    expect(kinds(story)).toContain('recheck-awaited');
    story.hears('inspector');
    story.reads('A3', 44);
    expect(point(story, 'A3').mark).toBe('met');
    expect(point(story, 'A2').recheck).toBe('neighbour');
    expect(kinds(story)).toContain('recheck-awaited');
    story.reads('A2', 44);
    story.reads('B1', 44);
    story.reads('B2', 44);
    story.tells('inspector', 'last-walk', { outcome: 'met', places: 'Around A3', elementIds: null });
    expect(kinds(story)).toEqual(['signature-missing', 'signature-missing']);
  });

  it('stays in the old round where the reader had not seen the correction', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    story.reads('A3', 31);
    story.tells('superintendent', 'correction', {
      about: [{ kind: 'point', id: 'soffit.A3' }],
      text: 'Reset',
      where: { elementId: null, faceId: null, text: '' },
    });
    story.reads('A3', 44);
    expect(point(story, 'A3').mark).toBe('not-met-low');
  });

  it('a failure found in rework is a new hold of its own round', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    story.reads('A3', 31);
    const first = holds(foldSheet(smallPlan(), story.recorded), story.now).find(
      (hold) => hold.kind === 'cover-not-met',
    )!;
    story.tells('superintendent', 'correction', {
      about: [{ kind: 'point', id: 'soffit.A3' }],
      text: 'Reset',
      where: { elementId: null, faceId: null, text: '' },
    });
    story.hears('inspector');
    story.reads('A3', 33);
    const second = holds(foldSheet(smallPlan(), story.recorded), story.now).find(
      (hold) => hold.kind === 'cover-not-met',
    )!;
    expect(second.id).not.toBe(first.id);
  });
});

describe('amendments', () => {
  it('take a reading from not met to met only with the photo that shows it', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    const id = story.reads('A3', 31);
    const replacement = story.readingBody('A3', 51) as unknown as Record<string, never>;
    story.say('inspector', 'amendment', {
      rootId: id,
      sawAmendmentId: null,
      reason: 'recording error',
      replacement,
      photoId: null,
    });
    expect(point(story, 'A3').mark).toBe('not-met-low');

    const photoId = uuid(8, 500);
    story.say('inspector', 'photo', {
      photoId,
      sha256: 'c'.repeat(64),
      bytes: 10,
      contentType: 'image/jpeg',
      takenAt: story.now,
      about: { kind: 'point', id: 'soffit.A3' },
      shot: 'close',
      caption: '',
    });
    story.say('inspector', 'amendment', {
      rootId: id,
      sawAmendmentId: null,
      reason: 'recording error',
      replacement,
      photoId,
    });
    expect(point(story, 'A3').mark).toBe('met');
    const reading = point(story, 'A3').readings.find((one) => one.entry.id === id)!;
    expect(reading.entry.body.value?.mm).toBe(31);
    expect(reading.amendments.map((one) => one.counts)).toEqual([false, true]);
  });

  it('are only the measurer’s', () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    const id = story.reads('A3', 31);
    story.tells('secondInspector', 'amendment', {
      rootId: id,
      sawAmendmentId: null,
      reason: 'mine',
      replacement: null,
      photoId: null,
    });
    expect(point(story, 'A3').mark).toBe('not-met-low');
  });

  it('withdrawing the only reading leaves the point to be read', () => {
    const story = new PourStory();
    const id = story.reads('A3', 31);
    story.say('inspector', 'amendment', {
      rootId: id,
      sawAmendmentId: null,
      reason: 'undone',
      replacement: null,
      photoId: null,
    });
    expect(point(story, 'A3').mark).toBe('unread');
    expect(kinds(story)).toContain('readings-missing');
  });
});

describe('people who had not seen each other', () => {
  it('both readings are kept, the less favourable governs, and a conflict holds until read in sight of both', () => {
    const story = new PourStory().inspected();
    story.hears('inspector', 'secondInspector');
    story.reads('A1', 45, 'inspector');
    story.reads('A1', 33, 'secondInspector');
    expect(point(story, 'A1').readings).toHaveLength(3);
    expect(point(story, 'A1').mark).toBe('not-met-low');
    expect(kinds(story)).toEqual(expect.arrayContaining(['conflict', 'cover-not-met']));
    story.hears('inspector');
    story.reads('A1', 45, 'inspector');
    expect(kinds(story)).not.toContain('conflict');
    expect(point(story, 'A1').mark).toBe('not-met-low');
  });

  it('two answers to one check conflict, and not met governs', () => {
    const story = new PourStory().inspected();
    story.say('inspector', 'answer', { checkId: 'debris', answer: 'met' });
    story.say('superintendent', 'answer', { checkId: 'debris', answer: 'not-met' });
    expect(kinds(story)).toEqual(expect.arrayContaining(['conflict', 'check-not-met']));
  });
});

describe('instruments', () => {
  it('a failed block check makes every reading since the last good one suspect, by measuring time', () => {
    const story = new PourStory();
    const block = (readMm: number) => ({
      instrumentId: gauge,
      at: story.now,
      when: 'middle' as const,
      blockMm: 50,
      readMm,
      toleranceMm: 1,
    });
    story.tells('coordinator', 'block-check', block(50));
    const before = story.now;
    story.pass(5).reads('A1', 46);
    story.pass(5);
    story.tells('coordinator', 'block-check', block(54));
    story.pass(5);
    story.tells('coordinator', 'block-check', block(50));
    story.pass(5).reads('A2', 46);
    story.reads('A3', 46, 'inspector', { measuredAt: new Date(Date.parse(before) - 60_000).toISOString() });
    expect(point(story, 'A1').mark).toBe('not-verified');
    expect(point(story, 'A2').mark).toBe('met');
    expect(point(story, 'A3').mark).toBe('met');
    expect(kinds(story)).toContain('not-verified');
  });

  it('a doubtful clock widens the window', () => {
    const story = new PourStory();
    story.tells('coordinator', 'block-check', {
      instrumentId: gauge,
      at: story.now,
      when: 'start',
      blockMm: 50,
      readMm: 54,
      toleranceMm: 1,
    });
    story.pass(30);
    story.tells('coordinator', 'block-check', {
      instrumentId: gauge,
      at: story.now,
      when: 'middle',
      blockMm: 50,
      readMm: 50,
      toleranceMm: 1,
    });
    story.pass(10).reads('A1', 46);
    expect(point(story, 'A1').mark).toBe('met');
    const skewed = new PourStory();
    skewed.recorded.push(...story.recorded.slice(1).map((entry) => ({ ...entry, clockOffsetMs: 3_600_000 })));
    expect(point(skewed, 'A1').mark).toBe('not-verified');
  });
});

describe('decisions', () => {
  const failing = () => {
    const story = new PourStory().inspected();
    story.hears('inspector');
    const readingId = story.reads('B2', 33);
    const nonconformanceId = story.tells('inspector', 'nonconformance', {
      title: 'Low cover at B2',
      about: [{ kind: 'point', id: 'soffit.B2' }],
      where: { elementId: 'deck', faceId: 'soffit', text: 'B2' },
      extent: 'One bar, 600 mm',
      description: '',
      proposal: 'Use as is with a coating',
      neededBy: null,
    });
    return { story, readingId, nonconformanceId };
  };
  const conditionId = uuid(7, 1);
  const decide = (story: PourStory, nonconformanceId: string, accepts: string[]) =>
    story.tells('engineer', 'disposition', {
      nonconformanceId,
      decision: 'use-as-is',
      reason: 'Checked by calculation',
      accepts,
      extent: 'B2 only',
      licence: 'PE-0000',
      conditions: [
        {
          id: conditionId,
          text: 'Seal the soffit',
          criterion: 'Two coats',
          stage: 'before-pour',
          dueAt: null,
        },
      ],
    });

  it('a failing reading waits for the engineer and clears only by the readings the decision names', () => {
    const { story, readingId, nonconformanceId } = failing();
    expect(kinds(story)).toEqual(expect.arrayContaining(['cover-not-met', 'disposition-awaited']));
    decide(story, nonconformanceId, [readingId]);
    expect(kinds(story)).not.toContain('cover-not-met');
    expect(kinds(story)).toContain('condition-not-verified');
    story.tells('inspector', 'condition-verified', { conditionId, outcome: 'met', text: '' });
    expect(kinds(story)).not.toContain('condition-not-verified');
    expect(point(story, 'B2').mark).toBe('not-met-low');
  });

  it('anything worse than what was decided is a new hold', () => {
    const { story, readingId, nonconformanceId } = failing();
    decide(story, nonconformanceId, [readingId]);
    story.hears('inspector');
    story.reads('B2', 25);
    expect(kinds(story)).toContain('cover-not-met');
  });

  it('accepts nothing that it does not name', () => {
    const { story, nonconformanceId } = failing();
    decide(story, nonconformanceId, []);
    expect(kinds(story)).toContain('cover-not-met');
  });

  it('rework closes with an inspector’s recheck and not with the report of it', () => {
    const { story, nonconformanceId } = failing();
    story.tells('superintendent', 'correction', {
      about: [{ kind: 'nonconformance', id: nonconformanceId }],
      text: 'Chairs added',
      where: { elementId: null, faceId: null, text: '' },
    });
    expect(kinds(story)).toContain('recheck-awaited');
    story.hears('inspector');
    story.reads('B2', 45);
    story.tells('inspector', 'recheck', {
      about: { kind: 'nonconformance', id: nonconformanceId },
      outcome: 'met',
      text: '',
    });
    expect(foldSheet(smallPlan(), story.recorded).nonconformances[0]!.status).toBe('closed');
  });
});

describe('signatures', () => {
  it('are set aside by any later material entry, and by a plan revision', () => {
    const story = new PourStory().inspected().signed();
    story.hears('inspector');
    story.reads('A1', 47);
    expect(kinds(story)).toEqual(['signature-missing', 'signature-missing']);
    const revised = new PourStory().inspected().signed();
    revised.tells('engineer', 'plan-issued', { revision: 2, digest: 'd'.repeat(64), reason: 'Cover raised' });
    expect(kinds(revised, smallPlan({ revision: 2 }))).toEqual(['plan-revised', 'plan-revised']);
  });

  it('are not set aside by a photo, a note or a passed walk', () => {
    const story = new PourStory().inspected().signed();
    story.tells('inspector', 'note', {
      about: { kind: 'pour', id: smallPlan().pourId },
      text: 'Gate code changed',
    });
    story.tells('inspector', 'last-walk', { outcome: 'met', places: 'All', elementIds: null });
    expect(kinds(story)).toEqual([]);
  });
});

describe('what cannot be read', () => {
  it('an entry of a newer version holds the pour instead of being passed over', () => {
    const story = new PourStory().inspected().signed();
    const last = story.recorded.at(-1)!;
    story.recorded.push({
      ...last,
      id: uuid(9, 999),
      type: 'reading',
      v: 99,
      body: { colour: 'blue' },
      seq: last.seq! + 1,
    });
    expect(kinds(story)).toContain('update-needed');
  });

  it('a reading without a unit is kept and not verified', () => {
    const story = new PourStory();
    story.reads('A1', 46, 'inspector', { value: { text: '46', unit: null, mm: null } });
    expect(point(story, 'A1').mark).toBe('not-verified');
  });

  it('a reading with an instrument nobody registered is not verified', () => {
    const story = new PourStory();
    story.reads('A1', 46, 'inspector', { instrumentId: people.engineer });
    expect(point(story, 'A1').mark).toBe('not-verified');
  });
});
