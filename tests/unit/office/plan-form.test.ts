import { describe, expect, it } from 'vitest';
import { issueProblem } from '@/components/office/issue-problem';
import { previewFace } from '@/components/office/face-preview-plan';
import { draftOfPlan, emptyPlanDraft, type PlanDraft } from '@/components/office/plan-draft';
import { draftChecklist, planFromDraft, pourFromDraft } from '@/components/office/plan-from-draft';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { issuePlan } from '@/lib/inspection/issue-plan';

const pourId = '0199a000-0000-7000-8000-000000000001';
const projectId = '0199a000-0000-7000-8000-000000000002';
const context = {
  pourId,
  revision: 1,
  issuedAt: '2026-11-30T08:00:00.000Z',
  authorId: '0199a000-0000-7000-8000-000000000003',
  reason: 'First issue',
};

/** A quay deck soffit in inches, as somebody types it. */
function typed(): PlanDraft {
  const draft = emptyPlanDraft();
  const element = draft.elements[0];
  const face = element?.faces[0];
  const requirement = face?.requirements[0];
  if (!element || !face || !requirement)
    throw new Error('An empty form has one element, one face, one cover.');
  Object.assign(requirement, {
    steel: 'outermost bar B1',
    barDesignation: '#5',
    contractSpecified: '2',
    contractMinus: '3/8"',
    contractPlus: '12.7 mm',
  });
  Object.assign(face, {
    name: 'Soffit',
    soffit: true,
    width: '23\' 7"',
    height: '120',
    drawnPoints: '9',
    chosenPoints: [{ id: 'at-1', x: '12', y: '1 1/2', reason: 'edge of opening' }],
  });
  Object.assign(element, {
    type: 'deck',
    mark: 'QD3',
    location: 'C-D/4',
    thickness: '11 13/16',
    drawing: { number: 'S-204', revision: '5' },
    faces: [face],
  });
  return {
    ...draft,
    number: 'P-014',
    title: 'Quay deck, bay 3',
    location: 'level +2.40',
    plannedAt: '2026-12-02T06:30',
    units: 'in',
    elements: [element],
  };
}

describe('the form of a plan', () => {
  it('reads lengths as people type them, in the unit that the field shows', () => {
    const read = pourFromDraft(typed(), projectId, 'America/Halifax');
    expect(read.ok && read.input.plannedAt).toBe('2026-12-02T10:30:00.000Z');
    const face = read.ok ? read.input.plan.elements[0]?.faces[0] : undefined;
    expect(face?.widthMm).toBeCloseTo(283 * 25.4, 9);
    expect(face?.requirements[0]).toMatchObject({
      contractSpecifiedMm: 50.8,
      contractMinusMm: 9.525,
      contractPlusMm: 12.7,
    });
    expect(face?.chosenPoints[0]?.yMm).toBeCloseTo(38.1, 9);
  });

  it('puts each problem beside its own field and loses nothing', () => {
    const draft = typed();
    const element = draft.elements[0];
    if (element) Object.assign(element, { thickness: '11,8', mark: '' });
    const read = pourFromDraft(
      { ...draft, number: '', plannedAt: '2026-03-08T02:30' },
      projectId,
      'America/New_York',
    );
    expect(read.ok).toBe(false);
    const problems = read.ok ? [] : read.problems;
    expect(problems.map((problem) => problem.path).sort()).toEqual([
      'elements.0.mark',
      'elements.0.thickness',
      'number',
      'plannedAt',
    ]);
  });

  it('gives an issued plan back as it was typed: issuing it again changes no requirement and no point', () => {
    const read = planFromDraft(typed());
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    const first = issuePlan(read.input, context);
    const again = planFromDraft({ ...draftOfPlan(first), reason: 'Nothing changed' });
    if (!again.ok) throw new Error(JSON.stringify(again.problems));
    const second = issuePlan(again.input, { ...context, revision: 2 });
    expect(second.elements).toEqual(first.elements);
    expect(second.checklist).toEqual(first.checklist);
    expect(second.decisionRule).toEqual(first.decisionRule);
  });

  it.each([
    ['never less', { deviation: 'never-less', contractMinus: '', contractPlus: '' }],
    [
      'the code of the basis',
      { deviation: 'basis', contractMinus: '', contractPlus: '', contractSpecified: '' },
    ],
  ] as const)('keeps "%s" over a revision', (_name, change) => {
    const draft = typed();
    const face = draft.elements[0]?.faces[0];
    Object.assign(face?.requirements[0] ?? {}, change);
    Object.assign(face ?? {}, { exposure: 'weather-or-ground' });
    const read = planFromDraft({ ...draft, basis: 'aci-318-19' });
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    const first = issuePlan(read.input, context);
    const again = planFromDraft({ ...draftOfPlan(first), reason: 'Nothing changed' });
    if (!again.ok) throw new Error(JSON.stringify(again.problems));
    expect(issuePlan(again.input, context).elements).toEqual(first.elements);
  });

  it('keeps effective depth, main bar, bundle and what the code asks of the concrete over a revision', () => {
    const draft = typed();
    const element = draft.elements[0];
    const face = element?.faces[0];
    Object.assign(element ?? {}, { effectiveDepth: '260 mm' });
    Object.assign(face ?? {}, { exposure: 'XS3' });
    Object.assign(face?.requirements[0] ?? {}, {
      barDesignation: '16 mm',
      contractSpecified: '',
      deviation: 'basis',
      contractMinus: '',
      contractPlus: '',
      mainBar: true,
      bundleOf: '2',
    });
    const read = planFromDraft({
      ...draft,
      basis: 'en-1992',
      mixName: 'C40/50 marine',
      mixAggregate: '20 mm',
      concrete: { ...draft.concrete, workingLifeYears: '100', strengthClass: 'C40/50', toleranceClass: '1' },
    });
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    const first = issuePlan(read.input, context);
    expect(first.elements[0]?.faces[0]?.requirements[0]?.depth?.plannedMm).toBeCloseTo(260, 9);
    const again = planFromDraft({ ...draftOfPlan(first), reason: 'Nothing changed' });
    if (!again.ok) throw new Error(JSON.stringify(again.problems));
    expect(issuePlan(again.input, context)).toEqual(first);
  });

  it('says where the computation found a problem', () => {
    const draft = typed();
    const element = draft.elements[0];
    const face = element?.faces[0];
    const requirement = face?.requirements[0];
    Object.assign(requirement ?? {}, { barDesignation: '#99' });
    const read = planFromDraft(draft);
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    let found: unknown;
    try {
      issuePlan(read.input, context);
    } catch (error) {
      found = error;
    }
    expect(found).toBeInstanceOf(ConcreteError);
    expect(issueProblem(found as ConcreteError, draft).path).toBe(
      'elements.0.faces.0.requirements.0.barDesignation',
    );
  });

  it('draws a face while names elsewhere are still empty, and says which numbers are missing', () => {
    const element = typed().elements[0];
    if (!element) throw new Error('no element');
    const rules = { ...emptyPlanDraft(), units: 'in', basis: 'contract' } as const;
    const drawn = previewFace({ ...element, mark: '', location: '' }, 0, rules, pourId);
    expect(drawn.kind === 'face' && drawn.face.points.filter((point) => point.kind === 'drawn')).toHaveLength(
      9,
    );
    const waiting = previewFace({ ...element, thickness: '' }, 0, rules, pourId);
    expect(waiting).toEqual({
      kind: 'waiting',
      sentences: ['Still to be given: the thickness of the element.'],
    });
  });

  it('takes the checks of all element types once, less what is left out', () => {
    const draft = typed();
    const element = draft.elements[0];
    if (!element) throw new Error('no element');
    const both = { ...draft, elements: [element, { ...element, id: 'el-2', type: 'wall' as const }] };
    const items = draftChecklist(both).items;
    expect(new Set(items.map((item) => item.id)).size).toBe(items.length);
    const first = items[0];
    expect(draftChecklist({ ...both, leftOut: [first?.id ?? ''] }).items).toHaveLength(items.length - 1);
  });
});
