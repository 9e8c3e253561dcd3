import { describe, expect, it } from 'vitest';
import { foldSheet } from '@/lib/inspection/sheet';
import { holds } from '@/lib/inspection/holds';
import { judgedNonconformance } from '@/lib/inspection/judged-nonconformance';
import { PourStory, smallPlan, uuid, type Person } from '../../stories/pour-story';

const conditionId = uuid(7, 1);

function raised(proposal: string) {
  const story = new PourStory().inspected();
  story.hears('inspector');
  const id = story.tells('inspector', 'nonconformance', {
    title: 'Stirrups pushed over',
    about: [{ kind: 'element', id: 'deck' }],
    where: { elementId: 'deck', faceId: null, text: 'bay 3' },
    extent: 'Four stirrups',
    description: '',
    proposal,
    neededBy: null,
  });
  const about = { kind: 'nonconformance', id } as const;
  return {
    explained: () => {
      const sheet = foldSheet(smallPlan(), story.recorded);
      const [state] = sheet.nonconformances;
      if (!state) throw new Error('There is none.');
      const { reason, notes, lines } = judgedNonconformance(state);
      const holding = holds(sheet, story.now).some(({ subjects }) =>
        subjects.some((one) => one.kind === 'nonconformance' && one.id === id),
      );
      return { reason, notes: notes.join(' '), value: lines.at(-1)?.value, holding };
    },
    decides: (decision: 'repair' | 'rework' | 'use-as-is' | 'reject', withCondition = false) =>
      story.tells('engineer', 'disposition', {
        nonconformanceId: id,
        decision,
        reason: 'By calculation',
        accepts: [],
        extent: 'Bay 3',
        licence: 'PE-0000',
        conditions: withCondition
          ? [{ id: conditionId, text: 'Tie them', criterion: 'All', stage: 'before-pour', dueAt: null }]
          : [],
      }),
    corrects: (unaware = false) =>
      story[unaware ? 'say' : 'tells']('superintendent', 'correction', {
        about: [about],
        text: 'Stirrups set upright',
        where: { elementId: null, faceId: null, text: '' },
      }),
    rechecks: (outcome: 'met' | 'not-met', who: Person = 'inspector') =>
      story.tells(who, 'recheck', { about, outcome, text: '' }),
    verifies: () => story.tells('inspector', 'condition-verified', { conditionId, outcome: 'met', text: '' }),
  };
}

describe('how a nonconformance stands, in words', () => {
  it('follows it from the report to the recheck, and says "in the way" exactly while it holds', () => {
    const one = raised('Use as is');
    const steps: [() => unknown, RegExp][] = [
      [() => undefined, /asked to decide/],
      [() => one.corrects(), /has not looked at it since/],
      [() => one.rechecks('not-met'), /asked to decide/],
      [() => one.decides('rework'), /decided on rework/],
      [() => one.corrects(), /has not looked at it since/],
      [() => one.rechecks('not-met'), /the recheck did not meet/],
      [() => one.corrects(), /has not looked at it since/],
      [() => one.rechecks('met'), /^Closed/],
    ];
    for (const [act, words] of steps) {
      act();
      const found = one.explained();
      expect(found.reason).toMatch(words);
      expect(found.value).toBe(found.holding ? 'yes' : 'no');
    }
    expect(one.explained().holding).toBe(false);
  });

  it('says that work done before the decision was known does not carry it out', () => {
    const one = raised('');
    one.decides('repair');
    one.corrects(true);
    expect(one.explained()).toMatchObject({ value: 'yes', holding: true });
    expect(one.explained().notes).toMatch(/before the decision was known/);
    one.corrects();
    expect(one.explained().notes).not.toMatch(/before the decision was known/);
  });

  it('stays in the way while a condition for before the pour is not verified', () => {
    const one = raised('Use as is');
    one.decides('use-as-is', true);
    expect(one.explained()).toMatchObject({ value: 'yes', holding: true });
    expect(one.explained().notes).toMatch(/not verified as met: 1/);
    one.verifies();
    expect(one.explained()).toMatchObject({ value: 'no', holding: false, notes: '' });
  });
});
