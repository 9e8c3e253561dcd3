import { describe, expect, test } from 'vitest';
import { signatureWords } from '@/components/field/signature-words';
import {
  isDrawn,
  placeInBox,
  strokeBegun,
  strokeDrawn,
  type Strokes,
} from '@/components/field/signature-strokes';
import { siteBodies } from '@/lib/inspection/entry-bodies';
import { holds } from '@/lib/inspection/holds';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

const wordsOf = (story: PourStory, elementIds: string[] | null = null) => {
  const sheet = foldSheet(smallPlan(), story.recorded);
  return signatureWords({
    sheet,
    pour: { number: 'P-014', title: 'Quay deck, bay 3' },
    name: 'Imre Kovač',
    as: 'inspector',
    holds: holds(sheet, story.now),
    elementIds,
  });
};

describe('the words that are signed', () => {
  test('they name the person, the role, the plan revision, the drawing and what they do not cover', () => {
    const words = wordsOf(new PourStory().inspected());
    expect(words).toContain('Imre Kovač, inspector');
    expect(words).toContain('plan revision A');
    expect(words).toContain('S-204 rev 5');
    expect(words).toContain('At the points read and for the items checked');
    expect(words).toContain('Formwork, shoring');
  });

  test('a reading that is not met is in the figures, and so is what is open', () => {
    const story = new PourStory();
    story.reads('A1', 46);
    story.reads('A2', 31);
    const words = wordsOf(story);
    expect(words).toContain('2 of 5 points read on 1 face, 1 not met');
    expect(words).toContain('3 open');
    expect(words).toMatch(/\d+ holds stand beside the signatures/);
  });

  test('with everything met no hold stands beside the signatures', () => {
    expect(wordsOf(new PourStory().inspected())).toContain('No hold stands beside the signatures');
  });
});

test('a signature for some elements says so, and counts only what lies in them', () => {
  const story = new PourStory();
  story.reads('A2', 31);
  expect(wordsOf(story, ['deck'])).toContain('only Quay deck, bay 3, to plan revision A');
  expect(wordsOf(story, ['another'])).toContain('0 of 0 points read on 0 faces, none not met');
});

describe('the drawn signature', () => {
  test('what is kept fits the entry whatever is drawn and wherever', () => {
    let strokes: Strokes = [];
    const pad = { width: 350, height: 140 };
    for (let stroke = 0; stroke < 80; stroke += 1) {
      strokes = strokeBegun(strokes, placeInBox({ x: stroke * 9 - 40, y: -5 }, pad));
      for (let step = 0; step < 1500; step += 1)
        strokes = strokeDrawn(strokes, placeInBox({ x: (step * 7) % 400, y: (step * 13) % 160 }, pad));
    }
    const parsed = siteBodies.signature.shape.strokes.safeParse(strokes);
    expect(parsed.success).toBe(true);
  });

  test('a single touch is no signature', () => {
    const touch = strokeBegun([], placeInBox({ x: 10, y: 10 }, { width: 100, height: 40 }));
    expect(isDrawn(touch)).toBe(false);
  });
});
