import { describe, expect, it } from 'vitest';
import { issueProblem } from '@/components/office/issue-problem';
import {
  draftOfPlan,
  type ElementDraft,
  type FaceDraft,
  type PlanDraft,
} from '@/components/office/plan-draft';
import { planFromDraft } from '@/components/office/plan-from-draft';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { FieldProblem } from '@/lib/inspection/app-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import { issueContext, slabInput } from '../../stories/measured-slab';

/** The slab's form as typed, with something changed that cannot be right. */
function typed(change: {
  plan?: Partial<PlanDraft>;
  element?: Partial<ElementDraft>;
  face?: Partial<FaceDraft>;
  requirement?: Partial<FaceDraft['requirements'][number]>;
  layer?: Partial<ElementDraft['layers'][number]>;
}): PlanDraft {
  const draft = draftOfPlan(issuePlan(slabInput(), issueContext));
  const element = draft.elements[0]!;
  const face = element.faces[0]!;
  const requirement = { ...face.requirements[0]!, ...change.requirement };
  return {
    ...draft,
    reason: 'First issue',
    ...change.plan,
    elements: [
      {
        ...element,
        ...change.element,
        faces: [{ ...face, requirements: [requirement], ...change.face }, ...element.faces.slice(1)],
        layers: [{ ...element.layers[0]!, ...change.layer }, ...element.layers.slice(1)],
      },
    ],
  };
}

/** What the form says is wrong, field by field; as typed, nothing is. */
function problems(draft: PlanDraft): FieldProblem[] {
  const read = planFromDraft(draft);
  if (!read.ok) return read.problems;
  try {
    issuePlan(read.input, issueContext);
    return [];
  } catch (error) {
    if (error instanceof ConcreteError) return [issueProblem(error, draft)];
    throw error;
  }
}
const only = (draft: PlanDraft): [string, string] => {
  const found = problems(draft);
  expect(found).toHaveLength(1);
  return [found[0]!.path, found[0]!.message];
};

const face = 'elements.0.faces.0';
const requirement = `${face}.requirements.0`;
const layer = 'elements.0.layers.0';
const byCode = { contractSpecified: '', deviation: 'basis', contractMinus: '', contractPlus: '' } as const;

describe('what cannot be right is refused at its field', () => {
  it('nothing, where it is right', () => {
    expect(problems(typed({}))).toEqual([]);
  });

  it.each<[string, PlanDraft, string, RegExp]>([
    [
      'cover and bar thicker than the section',
      typed({ element: { thickness: '60' } }),
      'elements.0.thickness',
      /do not fit into a section of 60 mm/,
    ],
    [
      'layers thicker than the section',
      typed({ element: { thickness: '90' } }),
      'elements.0.layers.4.barDesignation',
      /need 94 mm, and the section has 90 mm/,
    ],
    [
      'bars closer than they are thick',
      typed({ layer: { spacing: '16' } }),
      `${layer}.spacing`,
      /do not fit/,
    ],
    [
      'a bar that no table knows, in a cover',
      typed({ requirement: { barDesignation: '#99' } }),
      `${requirement}.barDesignation`,
      /no bar "#99"/,
    ],
    [
      'a bar that no table knows, in a layer',
      typed({ layer: { barDesignation: '17 mm' } }),
      `${layer}.barDesignation`,
      /no bar "17 mm"/,
    ],
    [
      'a bare number as a bar where the basis has no bars of its own',
      typed({ layer: { barDesignation: '16' } }),
      `${layer}.barDesignation`,
      /Write it as/,
    ],
    [
      'an exposure that is missing',
      typed({ plan: { basis: 'en-1992' }, requirement: byCode, face: { exposure: '' } }),
      `${face}.exposure`,
      /Choose the exposure/,
    ],
    [
      'an exposure without a class that sets a cover',
      typed({ plan: { basis: 'en-1992' }, requirement: byCode, face: { exposure: 'XF2' } }),
      `${face}.exposure`,
      /sets no cover by itself/,
    ],
    [
      'a class of another code',
      typed({ plan: { basis: 'as-3600' }, requirement: byCode, face: { exposure: 'XC3' } }),
      `${face}.exposure`,
      /no class of AS 3600/,
    ],
    [
      'a strength that the code needs and nobody gave',
      typed({ plan: { basis: 'as-3600' }, requirement: byCode, face: { exposure: 'B1' } }),
      'concrete.strengthMpa',
      /missing/,
    ],
    [
      'a strength class that is none',
      typed({
        plan: {
          basis: 'en-1992',
          concrete: { ...typed({}).concrete, workingLifeYears: '50', strengthClass: '30 MPa' },
        },
        requirement: byCode,
        face: { exposure: 'XC3' },
      }),
      'concrete.strengthClass',
      /written as C30\/37/,
    ],
    ['a length below zero', typed({ element: { thickness: '-300' } }), 'elements.0.thickness', /minus sign/],
    ['a length of zero', typed({ face: { width: '0' } }), `${face}.width`, /More than zero/],
    ['a decimal comma', typed({ face: { width: '7,2 m' } }), `${face}.width`, /with a point/],
    ['a unit that is none', typed({ face: { width: '7.2 yd' } }), `${face}.width`, /not a unit known here/],
    ['a number that is none', typed({ plan: { validityHours: 'a day' } }), 'validityHours', /Write a number/],
    [
      'a minus that leaves no cover',
      typed({ requirement: { contractMinus: '50' } }),
      `${requirement}.contractMinus`,
      /leave no cover/,
    ],
    [
      'no cover typed where no code gives one',
      typed({ requirement: { contractSpecified: '' } }),
      `${requirement}.contractSpecified`,
      /Enter the cover/,
    ],
    [
      'a chosen point off the face',
      typed({ face: { chosenPoints: [{ id: 'at-1', x: '9 m', y: '1', reason: 'edge' }] } }),
      `${face}.chosenPoints`,
      /lies outside the face/,
    ],
    [
      'openings that leave no face',
      typed({
        face: {
          openings: [{ id: 'o', name: 'Opening', x: '0', y: '0', width: '7200', height: '4000', depth: '' }],
        },
      }),
      `${face}.openings`,
      /cover the whole face/,
    ],
    ['more points than there may be', typed({ face: { drawnPoints: '401' } }), `${face}.drawnPoints`, /400/],
  ])('%s', (_what, draft, path, message) => {
    const [where, why] = only(draft);
    expect(where).toBe(path);
    expect(why).toMatch(message);
  });
});
