import { describe, expect, it } from 'vitest';
import { correctionAction } from '@/components/office/entry-actions';
import type { BodyOf } from '@/lib/inspection/entry';
import { siteBodies } from '@/lib/inspection/entry-bodies';
import { fixList } from '@/lib/inspection/fix-list';
import { holds } from '@/lib/inspection/holds';
import { judgeMeasured } from '@/lib/inspection/judge-measured';
import { measuredText } from '@/lib/inspection/measured-words';
import { measuredValue, type MeasuredValue } from '@/lib/inspection/measured-value';
import { measurementKinds, quantities } from '@/lib/inspection/measurement-kind';
import { measurementRule, type MeasurementRule, type RuleOf } from '@/lib/inspection/measurement-rule';
import { foldSheet } from '@/lib/inspection/sheet';
import type { Hold } from '@/lib/inspection/sheet-types';
import { planMeasuring } from '../../stories/measured-slab';
import { PourStory } from '../../stories/pour-story';

const length = (mm: number | null): MeasuredValue => ({
  quantity: 'length',
  length: { text: String(mm ?? 40), unit: mm === null ? null : 'mm', mm },
});
const spot = (areaMm2: number) => ({ kind: 'damaged' as const, fromMm: 100, lengthMm: 40, areaMm2 });
const damage = (over: Partial<Extract<MeasuredValue, { quantity: 'damage' }>> = {}): MeasuredValue => ({
  quantity: 'damage',
  spots: [],
  barLengthMm: null,
  bareCutEnds: 0,
  flameCutEnds: 0,
  ...over,
});
/** Damage that no bar can have: a spot larger than the surface under it. */
const impossibleDamage = damage({ spots: [spot(9_000)] });

interface Case {
  rule: MeasurementRule;
  good: MeasuredValue;
  bad: MeasuredValue;
  worse: MeasuredValue;
  /** What counts neither way. */
  open: MeasuredValue;
  hold: Hold['kind'];
  clearedBy: Hold['clearedBy'];
}
const out = { hold: 'measurement-out', clearedBy: 'superintendent' } as const;
const wrongKind: MeasuredValue = { quantity: 'designation', designation: '16 mm' };
const lap = { tolerance: 'none', ownMinusMm: null } as const;

/** One case for each way in which a plan can ask for a measurement; a new way without one is an error of types. */
const cases: { [R in MeasurementRule['rule']]: Case & { rule: RuleOf<R> } } = {
  typed: {
    rule: { rule: 'typed', kind: 'bar-spacing', quantity: 'length', least: 1450, most: 1550, expected: null },
    good: length(1500),
    bad: length(1580),
    worse: length(1700),
    open: length(null),
    ...out,
  },
  'bar-size': {
    rule: { rule: 'bar-size', layerId: 'b1' },
    good: { quantity: 'designation', designation: 'Ø16' },
    bad: { quantity: 'designation', designation: '20 mm' },
    worse: { quantity: 'designation', designation: '12 mm' },
    open: length(16),
    hold: 'bar-departs',
    clearedBy: 'engineer',
  },
  'bar-count': {
    rule: { rule: 'bar-count', layerId: 'b2', bay: null },
    good: { quantity: 'count', count: 27 },
    bad: { quantity: 'count', count: 26 },
    worse: { quantity: 'count', count: 20 },
    open: wrongKind,
    ...out,
  },
  'bar-spacing': {
    rule: {
      rule: 'bar-spacing',
      layerId: 'b1',
      gaps: 10,
      ownMm: { minus: 50, plus: 50 },
      steel: 'slab-or-wall',
      use: null,
    },
    good: length(1550),
    bad: length(1551),
    worse: length(1600),
    open: length(null),
    ...out,
  },
  'greatest-spacing': {
    rule: { rule: 'greatest-spacing', layerId: 'b1', use: 'slab-principal' },
    good: length(400),
    bad: length(401),
    worse: length(450),
    open: length(null),
    ...out,
  },
  'clear-distance': {
    rule: { rule: 'clear-distance', layerId: 'b1', place: 'layer', code: 'en-1992-1-1' },
    good: length(25),
    bad: length(24.9),
    worse: length(10),
    open: length(null),
    ...out,
  },
  'support-height': {
    rule: {
      rule: 'support-height',
      faceId: 'top',
      carriedLayerIds: ['t1', 't2'],
      standsOn: { faceId: 'soffit', layerIds: ['b1', 'b2'], otherMm: 0 },
      ownMinusMm: 10,
    },
    good: length(150),
    bad: length(133),
    worse: length(120),
    open: length(null),
    ...out,
  },
  'support-spacing': {
    rule: { rule: 'support-spacing', layerId: 't2', by: 'bs-7973-2-bars', planMm: null },
    good: length(600),
    bad: length(601),
    worse: length(900),
    open: length(null),
    ...out,
  },
  'tie-share': {
    rule: { rule: 'tie-share', layerId: 't1', otherLayerId: 't2', pattern: 'alternate', sharePercent: null },
    good: { quantity: 'share', of: 49, tied: 25, atEdge: true },
    bad: { quantity: 'share', of: 49, tied: 24, atEdge: true },
    worse: { quantity: 'share', of: 49, tied: 3, atEdge: true },
    open: wrongKind,
    ...out,
  },
  'lap-length': {
    rule: { rule: 'lap-length', layerId: 't1', ...lap, length: { by: 'typed', lengthMm: 860 } },
    good: length(860),
    bad: length(859),
    worse: length(600),
    open: length(null),
    ...out,
  },
  'lap-stagger': {
    rule: { rule: 'lap-stagger', lapMm: 860, leastMm: 258 },
    good: length(258),
    bad: length(200),
    worse: length(0),
    open: length(null),
    ...out,
  },
  'share-lapped': {
    rule: { rule: 'share-lapped', lapMm: 860, code: 'en-1992-1-1', mostPercent: 50 },
    good: { quantity: 'part', count: 10, of: 20 },
    bad: { quantity: 'part', count: 11, of: 20 },
    worse: { quantity: 'part', count: 20, of: 20 },
    open: wrongKind,
    ...out,
  },
  coupler: {
    rule: { rule: 'coupler', type: 'Threaded 16', mostThreads: 2 },
    good: { quantity: 'coupler', type: 'threaded 16', marks: 'both-in', threads: 2 },
    bad: { quantity: 'coupler', type: 'threaded 16', marks: 'one-short', threads: 2 },
    worse: { quantity: 'coupler', type: 'pressed 16', marks: 'one-short', threads: 9 },
    open: { quantity: 'coupler', type: 'threaded 16', marks: 'both-in', threads: null },
    ...out,
  },
  embedment: {
    rule: { rule: 'embedment', layerId: 'b1', ...lap, lengthMm: 620, starter: true },
    good: { quantity: 'starter', length: { text: '620', unit: 'mm', mm: 620 }, pulled: 'held' },
    bad: { quantity: 'starter', length: { text: '700', unit: 'mm', mm: 700 }, pulled: 'moved' },
    worse: { quantity: 'starter', length: { text: '300', unit: 'mm', mm: 300 }, pulled: 'moved' },
    open: { quantity: 'starter', length: { text: '700', unit: 'mm', mm: 700 }, pulled: 'not-pulled' },
    ...out,
  },
  'bend-diameter': {
    rule: { rule: 'bend-diameter', layerId: 'b1', code: 'en-1992-1-1', use: 'main' },
    good: length(64),
    bad: length(63),
    worse: length(30),
    open: length(null),
    ...out,
  },
  'hook-extension': {
    rule: { rule: 'hook-extension', layerId: 'b1', use: 'main', angle: 90 },
    good: length(192),
    bad: length(191),
    worse: length(100),
    open: length(null),
    ...out,
  },
  'coating-damage': {
    rule: { rule: 'coating-damage', layerId: 'epoxy', damagedMostPercent: null, patchedMostPercent: null },
    good: damage({ spots: [{ ...spot(300), kind: 'patched' }] }),
    bad: damage({ spots: [spot(50)] }),
    worse: damage({ spots: [spot(400)], flameCutEnds: 1 }),
    open: impossibleDamage,
    ...out,
  },
  'frp-damage': {
    rule: { rule: 'frp-damage', layerId: 'frp', mostPercent: null },
    good: damage({ spots: [spot(900)] }),
    bad: damage({ spots: [spot(1100)] }),
    worse: damage({ spots: [spot(1900)] }),
    open: impossibleDamage,
    ...out,
  },
  'stainless-contact': {
    rule: { rule: 'stainless-contact', layerId: 'stainless' },
    good: { quantity: 'count', count: 0 },
    bad: { quantity: 'count', count: 1 },
    worse: { quantity: 'count', count: 9 },
    open: wrongKind,
    ...out,
  },
  'tendon-height': {
    rule: {
      rule: 'tendon-height',
      heightMm: 220,
      from: 'soffit',
      to: 'centre',
      band: 'as-3600',
      ownMm: null,
    },
    good: { quantity: 'height', length: { text: '225', unit: 'mm', mm: 225 }, from: 'soffit', to: 'centre' },
    bad: { quantity: 'height', length: { text: '226', unit: 'mm', mm: 226 }, from: 'soffit', to: 'centre' },
    worse: { quantity: 'height', length: { text: '260', unit: 'mm', mm: 260 }, from: 'soffit', to: 'centre' },
    open: { quantity: 'height', length: { text: '220', unit: 'mm', mm: 220 }, from: 'soffit', to: 'topside' },
    ...out,
  },
  'fibre-dosage': {
    rule: { rule: 'fibre-dosage', fibreType: 'steel hooked 60', kgPerM3: 30, minusPercent: 10 },
    good: { quantity: 'ticket', ticket: '4711', fibreType: 'Steel hooked 60', kgPerM3: 27 },
    bad: { quantity: 'ticket', ticket: '4712', fibreType: 'Steel hooked 60', kgPerM3: 26.9 },
    worse: { quantity: 'ticket', ticket: '4713', fibreType: 'polymer', kgPerM3: 5 },
    open: { quantity: 'ticket', ticket: '4714', fibreType: 'Steel hooked 60', kgPerM3: null },
    ...out,
  },
};
const rules = measurementRule.options.map((option) => option.shape.rule.value);

/** A pour with one thing to measure, and what stands against it because of that. */
function pourOf(one: Case) {
  const { plan, item } = planMeasuring(one.rule);
  const story = new PourStory();
  const measures = (value: MeasuredValue, place = 'grid 3') =>
    story.tells('inspector', 'measurement', {
      itemId: item.id,
      place,
      stage: 'single',
      value,
      measuredAt: story.now,
    } satisfies BodyOf<'measurement'>);
  const standing = () =>
    holds(foldSheet(plan, story.recorded), story.now)
      .filter((hold) => hold.subjects.some((subject) => subject.kind === 'measurement'))
      .map(({ kind, clearedBy, elementId }) => ({ kind, clearedBy, elementId }));
  const corrects = () =>
    story.tells('superintendent', 'correction', {
      about: [{ kind: 'measurement', id: item.id }],
      text: 'Put right',
      where: { elementId: 'slab', faceId: null, text: '' },
    });
  const accepts = (entryId: string) => {
    const nonconformanceId = story.tells('inspector', 'nonconformance', {
      title: 'Out of limits',
      about: [{ kind: 'measurement', id: item.id }],
      where: { elementId: 'slab', faceId: null, text: '' },
      extent: 'grid 3',
      description: '',
      proposal: 'Use as is',
      neededBy: null,
    });
    story.tells('engineer', 'disposition', {
      nonconformanceId,
      decision: 'use-as-is',
      reason: 'Checked by calculation',
      accepts: [entryId],
      extent: 'grid 3',
      conditions: [],
      licence: 'PE-0000',
    });
  };
  return { plan, item, measures, standing, corrects, accepts };
}

const at = (kind: Hold['kind'], clearedBy: Hold['clearedBy']) => ({ kind, clearedBy, elementId: 'slab' });

describe('every measurement that a plan can ask for', () => {
  it('has a case here, and every kind, quantity and value of the record is among them', () => {
    expect(Object.keys(cases).sort()).toEqual([...rules].sort());
    const issued = rules.map((rule) => planMeasuring(cases[rule].rule).item);
    expect(new Set(issued.map((item) => item.kind))).toEqual(new Set(measurementKinds));
    expect(new Set(issued.map((item) => item.quantity))).toEqual(new Set(quantities));
    const values = measuredValue.options.map((option) => option.shape.quantity.value);
    expect([...values].sort()).toEqual([...quantities].sort());
  });

  describe.each(rules)('%s', (rule) => {
    const one: Case = cases[rule];

    it('is asked for until it is measured, and its limits have a trail', () => {
      const { item, standing } = pourOf(one);
      expect(standing()).toEqual([at('measurement-missing', 'inspector')]);
      expect(item.trail.length).toBeGreaterThan(0);
    });

    it('holds where it fails, is sent back once corrected, and clears by a recheck that meets', () => {
      const { measures, standing, corrects } = pourOf(one);
      measures(one.bad);
      expect(standing()).toEqual([at(one.hold, one.clearedBy)]);
      corrects();
      expect(standing()).toEqual([at('recheck-awaited', 'inspector')]);
      measures(one.bad);
      expect(standing()).toEqual([at(one.hold, one.clearedBy)]);
      corrects();
      measures(one.good);
      expect(standing()).toEqual([]);
    });

    it('clears by a decision that names it, and nothing worse or elsewhere rides on that decision', () => {
      const { measures, standing, accepts } = pourOf(one);
      accepts(measures(one.bad));
      expect(standing()).toEqual([]);
      measures(one.bad, 'grid 4');
      expect(standing().map((hold) => hold.kind)).toEqual([one.hold]);
      const again = pourOf(one);
      again.accepts(again.measures(one.bad));
      again.measures(one.worse);
      expect(again.standing().map((hold) => hold.kind)).toEqual([one.hold]);
    });

    it('a better value at the same place erases nothing', () => {
      const { measures, standing } = pourOf(one);
      measures(one.bad);
      measures(one.good);
      expect(standing()).toEqual([at(one.hold, one.clearedBy)]);
    });

    it('counts neither way where it is not verified, and says so', () => {
      const { measures, standing } = pourOf(one);
      measures(one.open);
      expect(standing()).toEqual([at('not-verified', 'inspector'), at('measurement-missing', 'inspector')]);
      measures(one.good);
      expect(standing()).toEqual([]);
    });

    it('is a body that a device may record, and has words', () => {
      for (const value of [one.good, one.bad, one.worse, one.open]) {
        const body = {
          itemId: 'item',
          place: '',
          stage: 'single',
          value,
          measuredAt: '2026-12-01T06:00:00.000Z',
        };
        expect(siteBodies.measurement.safeParse(body).error).toBeUndefined();
        expect(measuredText(value)).not.toMatch(/NaN|undefined|null/);
      }
    });
  });
});

describe('what is out of limits', () => {
  it.each(rules)('%s: is on the fix list, and its correction can be reported from the office', (rule) => {
    const { plan, item } = planMeasuring(cases[rule].rule);
    const story = new PourStory();
    story.tells('inspector', 'measurement', {
      itemId: item.id,
      place: 'grid 3',
      stage: 'single',
      value: cases[rule].bad,
      measuredAt: story.now,
    });
    const sheet = foldSheet(plan, story.recorded);
    const standing = holds(sheet, story.now);
    expect(fixList(sheet, standing).map((one) => one.about)).toContainEqual({
      kind: 'measurement',
      id: item.id,
    });
    expect(correctionAction(standing, plan)).not.toBeNull();
  });
});

describe('measurements with more to them', () => {
  it('a bay is measured before, under and after load, and fails by any of the three', () => {
    const { plan, item } = planMeasuring(cases['support-height'].rule, { loaded: true });
    const story = new PourStory();
    const measures = (stage: 'before' | 'under' | 'after', mm: number) =>
      story.tells('inspector', 'measurement', {
        itemId: item.id,
        place: 'bay 1',
        stage,
        value: length(mm),
        measuredAt: story.now,
      });
    const kinds = () =>
      holds(foldSheet(plan, story.recorded), story.now)
        .filter((hold) => hold.subjects.some((subject) => subject.kind === 'measurement'))
        .map((hold) => hold.kind);
    measures('before', 146);
    expect(kinds()).toEqual(['measurement-missing']);
    measures('under', 128);
    expect(kinds()).toEqual(['measurement-out', 'measurement-missing']);
    measures('after', 146);
    expect(kinds()).toEqual(['measurement-out']);
  });

  it('one of the squares of ties has to lie at an edge', () => {
    const { plan, item } = planMeasuring(cases['tie-share'].rule, { required: 2 });
    const story = new PourStory();
    const counts = (place: string, atEdge: boolean) =>
      story.tells('inspector', 'measurement', {
        itemId: item.id,
        place,
        stage: 'single',
        value: { quantity: 'share', of: 49, tied: 30, atEdge },
        measuredAt: story.now,
      });
    const standing = () =>
      holds(foldSheet(plan, story.recorded), story.now).find((hold) => hold.kind === 'measurement-missing');
    counts('grid 3', false);
    counts('grid 4', false);
    expect(standing()?.title).toContain('at an edge');
    counts('edge', true);
    expect(standing()).toBeUndefined();
  });

  it('a perimeter of its own asks for every tie on it, and for every other one inside', () => {
    const { plan, item } = planMeasuring({ ...cases['tie-share'].rule, pattern: 'perimeter-every' });
    const verdict = (tied: number) => {
      const story = new PourStory();
      story.tells('inspector', 'measurement', {
        itemId: item.id,
        place: 'edge',
        stage: 'single',
        // 7 on the perimeter, 42 inside: 7 + 21.
        value: { quantity: 'share', of: 49, tied, onPerimeter: 7, atEdge: true },
        measuredAt: story.now,
      });
      return foldSheet(plan, story.recorded).measurements[0]?.governing[0]?.verdict;
    };
    expect([27, 28].map(verdict)).toEqual(['not-met', 'met']);
    const unsaid = judgeMeasured(item, { quantity: 'share', of: 49, tied: 49, atEdge: true }, plan);
    expect(unsaid.verdict).toBe('not-verified');
  });

  it('coating damage over its limit is the engineer’s, and under it the superintendent’s', () => {
    const over = pourOf({ ...cases['coating-damage'], bad: cases['coating-damage'].worse });
    over.measures(cases['coating-damage'].worse);
    expect(over.standing()).toEqual([at('measurement-out', 'engineer')]);
  });
});
