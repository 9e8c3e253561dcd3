import { describe, expect, it } from 'vitest';
import { holds } from '@/lib/inspection/holds';
import { foldSheet } from '@/lib/inspection/sheet';
import { PourStory, smallPlan } from '../../stories/pour-story';

const mixHolds = (story: PourStory, plan = smallPlan()) =>
  holds(foldSheet(plan, story.recorded), story.now).filter(({ kind }) => kind === 'mix-changed');
const change = (over: object = {}) => ({
  pourId: null,
  name: 'Marine 45/10',
  replaces: '',
  text: 'The quarry is closed',
  ...over,
});

describe('a change of mix', () => {
  it('holds a pour whose plan names another mix, until its plan is revised', () => {
    const story = new PourStory().inspected();
    expect(mixHolds(story)).toEqual([]);
    story.tells('coordinator', 'mix-changed', change());
    expect(mixHolds(story)).toMatchObject([
      { title: 'Mix changed to Marine 45/10; the plan names Marine 40/20', clearedBy: 'engineer' },
    ]);
    const revised = smallPlan({ revision: 2, mix: { id: 'mix', name: 'Marine 45/10', aggregateMm: 10 } });
    story.tells('engineer', 'plan-issued', { revision: 2, digest: 'd'.repeat(64), reason: 'New mix' });
    expect(mixHolds(story, revised)).toEqual([]);
    // The engineer has seen it, whatever the revision names.
    expect(mixHolds(story, smallPlan({ revision: 2 }))).toEqual([]);
  });

  it('concerns only the pours that name the mix it replaces', () => {
    const story = new PourStory().inspected().signed();
    story.tells('coordinator', 'mix-changed', change({ replaces: 'Stair mix' }));
    story.tells('coordinator', 'mix-changed', change({ name: ' marine 40/20 ' }));
    expect(holds(foldSheet(smallPlan(), story.recorded), story.now)).toEqual([]);
    story.tells('coordinator', 'mix-changed', change({ replaces: 'MARINE 40/20' }));
    const found = holds(foldSheet(smallPlan(), story.recorded), story.now).map(({ kind }) => kind);
    expect(found).toEqual(['mix-changed', 'signature-missing', 'signature-missing']);
  });

  it('is answered by a change back', () => {
    const story = new PourStory().inspected();
    story.tells('coordinator', 'mix-changed', change());
    // Another mix gives way to the planned one: that says nothing of this pour.
    story.tells('coordinator', 'mix-changed', change({ name: 'Marine 40/20', replaces: 'Stair mix' }));
    expect(mixHolds(story)).toHaveLength(1);
    story.tells('coordinator', 'mix-changed', change({ name: 'Marine 40/20', replaces: 'Marine 45/10' }));
    expect(mixHolds(story)).toEqual([]);
  });

  it('is followed from mix to mix', () => {
    const story = new PourStory().inspected();
    story.tells('coordinator', 'mix-changed', change({ replaces: 'Marine 40/20' }));
    story.tells('coordinator', 'mix-changed', change({ name: 'Marine 50/10', replaces: 'Marine 45/10' }));
    expect(mixHolds(story)).toMatchObject([
      { title: 'Mix changed to Marine 50/10; the plan names Marine 40/20' },
    ]);
  });

  it('holds nothing where the plan names no mix', () => {
    const story = new PourStory().inspected();
    story.tells('coordinator', 'mix-changed', change());
    expect(mixHolds(story, smallPlan({ mix: null }))).toEqual([]);
  });
});
