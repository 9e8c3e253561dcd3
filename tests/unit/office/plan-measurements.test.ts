import { describe, expect, it } from 'vitest';
import { issueProblem } from '@/components/office/issue-problem';
import { emptyMeasurement, type MeasurementDraft } from '@/components/office/measurement-draft';
import { previewMeasurement } from '@/components/office/measurement-preview-plan';
import { measurementGroups, measurementRules } from '@/components/office/measurement-words';
import { draftOfPlan, type PlanDraft } from '@/components/office/plan-draft';
import { planFromDraft } from '@/components/office/plan-from-draft';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import { measurementRule, type MeasurementRule } from '@/lib/inspection/measurement-rule';
import { issueContext, slabInput } from '../../stories/measured-slab';

type Rule = MeasurementRule['rule'];
const rules = measurementRule.options.map((option) => option.shape.rule.value);

/** What a planner types for each rule; the rest is what the form starts with. */
const typed: Record<Rule, Partial<MeasurementDraft>> = {
  typed: { kind: 'bar-spacing', least: '1450', most: '1.55 m' },
  'bar-size': { layerId: 'b1' },
  'bar-count': { layerId: 'b1', bayWidth: '4 m', edge: '75' },
  'bar-spacing': { layerId: 'b1', gaps: '10', ownMinus: '50', ownPlus: '50', use: 'slab-principal' },
  'greatest-spacing': { layerId: 'b1', use: 'wall' },
  'clear-distance': { layerId: 'b1', place: 'column' },
  'support-height': {
    faceId: 'top',
    carriedLayerIds: ['t1', 't2'],
    standsOnFaceId: 'soffit',
    standsOnLayerIds: ['b1', 'b2'],
    other: '5',
    ownMinus: '10',
    loaded: true,
  },
  'support-spacing': { layerId: 't2', by: 'plan', plan: '1200' },
  'tie-share': { layerId: 't1', otherLayerId: 't2', pattern: 'share', sharePercent: '70' },
  'lap-length': {
    layerId: 'b1',
    lengthBy: 'aci-tension',
    fyMpa: '420',
    fcMpa: '28',
    topBar: true,
    sharePercent: '50',
    tolerance: 'aci-117-10',
  },
  'lap-stagger': { lap: '860', least: '258' },
  'share-lapped': { lap: '860', mostPercent: '50' },
  coupler: { type: 'Threaded 16', mostThreads: '2' },
  embedment: { layerId: 'b1', length: '620', tolerance: 'own', ownMinus: '20', starter: false },
  'bend-diameter': { layerId: 'b1', bendCode: 'bs-8666', barUse: 'tie' },
  'hook-extension': { layerId: 'b1', barUse: 'tie', angle: '135' },
  'coating-damage': { layerId: 'epoxy', damagedMostPercent: '1.5' },
  'frp-damage': { layerId: 'frp', mostPercent: '1' },
  'stainless-contact': { layerId: 'stainless' },
  'tendon-height': { height: '220', from: 'top', to: 'underside', band: 'own', ownMinus: '3', ownPlus: '6' },
  'fibre-dosage': { fibreType: 'steel', kgPerM3: '30', minusPercent: '10' },
};

/** The form of the slab with these measurements added. */
function form(measurements: (rule: Rule) => Partial<MeasurementDraft>, of: readonly Rule[]): PlanDraft {
  const draft = draftOfPlan(issuePlan(slabInput(), issueContext));
  return {
    ...draft,
    reason: 'First issue',
    measurements: of.map((rule) => ({
      ...emptyMeasurement(`m-${rule}`, rule, 'slab', draft.basis),
      ...measurements(rule),
    })),
  };
}

const read = (draft: PlanDraft) => {
  const found = planFromDraft(draft);
  if (!found.ok) throw new Error(JSON.stringify(found.problems));
  return found.input;
};

describe('the measurements of the plan form', () => {
  it('offer every rule once, in a group', () => {
    expect(measurementGroups.flatMap((group) => group.rules).sort()).toEqual([...rules].sort());
    expect(new Set(Object.values(measurementRules).map(({ name }) => name)).size).toBe(rules.length);
  });

  it.each(rules)('%s: issued as typed, shown while typing, and given back by a revision', (rule) => {
    const draft = form((one) => typed[one], [rule]);
    const plan = issuePlan(read(draft), issueContext);
    const preview = previewMeasurement(draft, 0);
    expect(preview).toEqual({ kind: 'item', item: plan.measurements[0] });
    const again = { ...draftOfPlan(plan), reason: 'Nothing changed' };
    expect(issuePlan(read(again), issueContext).measurements).toEqual(plan.measurements);
  });

  it.each(rules)('%s: nothing typed is refused beside a field of its own', (rule) => {
    const draft = form(() => ({}), [rule]);
    const found = planFromDraft(draft);
    const problems = found.ok ? [] : found.problems;
    const fields = Object.keys(draft.measurements[0] ?? {});
    if (found.ok) {
      // What the fields' own checks let through, the computation refuses.
      expect(() => issuePlan(found.input, issueContext)).toThrow(ConcreteError);
      return;
    }
    expect(problems.length).toBeGreaterThan(0);
    for (const { path, message } of problems) {
      const [list, at, field] = path.split('.');
      expect([list, at]).toEqual(['measurements', '0']);
      expect(fields).toContain(field);
      expect(message).not.toMatch(/NaN|Invalid input/);
    }
  });

  it('the three ways to compute a lap come back as typed too', () => {
    const ways: Partial<MeasurementDraft>[] = [
      { lengthBy: 'typed', length: '860' },
      { lengthBy: 'aci-compression', fyMpa: '420', fcMpa: '28' },
      { lengthBy: 'en', strengthClass: 'C30/37', stressMpa: '435', sharePercent: '50', goodBond: false },
    ];
    for (const way of ways) {
      const draft = form(() => ({ layerId: 'b1', tolerance: 'none', ...way }), ['lap-length']);
      const plan = issuePlan(read(draft), issueContext);
      const again = issuePlan(read({ ...draftOfPlan(plan), reason: 'Nothing changed' }), issueContext);
      expect(again.measurements).toEqual(plan.measurements);
    }
  });

  const placeOf = (over: Partial<MeasurementDraft>, rule: Rule, change: (draft: PlanDraft) => PlanDraft) => {
    const draft = change(form(() => ({ ...typed[rule], ...over }), [rule]));
    try {
      issuePlan(read(draft), issueContext);
    } catch (error) {
      if (error instanceof ConcreteError) return issueProblem(error, draft);
      throw error;
    }
    throw new Error('It was issued.');
  };
  const same = (draft: PlanDraft) => draft;

  it('what cannot be computed is said at the field that is wrong, wherever in the form it stands', () => {
    expect(placeOf({ fyMpa: '900' }, 'lap-length', same).path).toBe('measurements.0.fyMpa');
    expect(placeOf({ ownMinus: '' }, 'support-height', same).path).toBe('measurements.0.ownMinus');
    expect(placeOf({ other: '200' }, 'support-height', same).path).toBe('elements.0.thickness');
    expect(placeOf({}, 'clear-distance', (draft) => ({ ...draft, mixName: '' })).path).toBe('mixAggregate');
    expect(placeOf({ ownMinus: '', ownPlus: '' }, 'bar-spacing', same).path).toBe('measurements.0.ownPlus');
    expect(placeOf({ height: '400' }, 'tendon-height', same).path).toBe('measurements.0.height');
  });
});
