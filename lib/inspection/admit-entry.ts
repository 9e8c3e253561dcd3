import { isAmendable } from './amendments';
import { mayRecord } from './entry-access';
import { siteBodies, type SubjectRef } from './entry-bodies';
import type { Entry } from './entry';
import { mayAmend, measurerChange, measurerProblem } from './measurers';
import { roleWords, type Role } from './roles';
import type { Sheet } from './sheet-types';

export interface Refusal {
  code: 'invalid' | 'not-found' | 'not-allowed';
  sentence: string;
  field?: string;
}

const absent = (what: string, field: string): Refusal => ({
  code: 'not-found',
  sentence: `${what} is not in this pour.`,
  field,
});

/**
 * Does the entry speak of things that exist, and may its author say it? What was honestly recorded against an earlier
 * plan is taken in even where the plan has since dropped its place: the fold keeps it aside.
 * @returns null when it may go into the record
 */
export function admitEntry(entry: Entry, sheet: Sheet): Refusal | null {
  const earlier = entry.planRevision < sheet.plan.revision;
  switch (entry.type) {
    case 'answer': {
      const item = sheet.plan.checklist.items.find((one) => one.id === entry.body.checkId);
      if (!item) return earlier ? null : absent('This check', 'checkId');
      if (entry.authorRole === 'superintendent' && item.closedBy !== 'superintendent') {
        return {
          code: 'not-allowed',
          sentence: 'This check is answered by the inspector.',
          field: 'checkId',
        };
      }
      if (entry.body.answer === 'not-applicable' && !item.notApplicable) {
        return {
          code: 'invalid',
          sentence: 'This check cannot be set aside as not applicable.',
          field: 'answer',
        };
      }
      return null;
    }
    case 'reading': {
      const face = sheet.plan.elements
        .flatMap((element) => element.faces)
        .find((one) => one.id === entry.body.faceId);
      if (!face) return earlier ? null : absent('This face', 'faceId');
      const { requirementId, pointId } = entry.body;
      if (requirementId !== null && !face.requirements.some((one) => one.id === requirementId) && !earlier)
        return absent('This requirement', 'requirementId');
      if (pointId !== null && !pointExists(sheet, pointId) && !earlier)
        return absent('This reading point', 'pointId');
      const unsaid = measurerProblem(entry.body, entry.authorId);
      return unsaid ? { code: 'not-allowed', sentence: unsaid, field: 'measurer' } : null;
    }
    case 'measurement':
      return sheet.plan.measurements.some((item) => item.id === entry.body.itemId) || earlier
        ? null
        : absent('This measurement', 'itemId');
    case 'query':
      return exists(sheet, entry.body.entryId) ? null : absent('The entry asked about', 'entryId');
    case 'query-answered':
      return sheet.queries.some((query) => query.entry.id === entry.body.queryId)
        ? null
        : absent('The query', 'queryId');
    case 'nonconformance':
    case 'correction':
      return earlier
        ? null
        : (entry.body.about
            .map((about) => subjectRefusal(sheet, about, 'about'))
            .find((one) => one !== null) ?? null);
    case 'recheck':
    case 'photo':
    case 'note':
      return earlier ? null : subjectRefusal(sheet, entry.body.about, 'about');
    case 'condition-verified':
      return sheet.conditions.some((state) => state.condition.id === entry.body.conditionId)
        ? null
        : absent('The condition', 'conditionId');
    case 'hold':
      return mayRecord('hold-lifted', entry.body.clearedBy)
        ? null
        : {
            code: 'invalid',
            sentence: `The ${roleWords[entry.body.clearedBy].toLowerCase()} cannot lift a hold. Name somebody who can.`,
            field: 'clearedBy',
          };
    case 'hold-lifted': {
      const lifter = lifterOf(entry.body.holdId, sheet);
      if (!lifter) return absent('The hold', 'holdId');
      return lifter === entry.authorRole
        ? null
        : {
            code: 'not-allowed',
            sentence: `Only the ${roleWords[lifter].toLowerCase()} lifts this hold.`,
            field: 'holdId',
          };
    }
    case 'disposition':
      return dispositionRefusal(entry.body.nonconformanceId, entry.body.accepts, sheet);
    case 'signature':
      return entry.body.as === entry.authorRole
        ? null
        : { code: 'not-allowed', sentence: 'You can only sign in the role that you hold here.', field: 'as' };
    case 'amendment':
      return amendmentRefusal(entry, sheet);
    default:
      return null;
  }
}

/** Who lifts a hold that was placed by hand, or that a verbal instruction brings; null: there is no such hold. */
function lifterOf(holdId: string, sheet: Sheet): Role | null {
  const placed = sheet.manualHolds.find((one) => one.entry.id === holdId);
  if (placed) return placed.entry.body.clearedBy;
  return sheet.verbalInstructions.some((one) => one.entry.id === holdId) ? 'engineer' : null;
}

const exists = (sheet: Sheet, id: string) => sheet.entries.some((entry) => entry.id === id);

function pointExists(sheet: Sheet, key: string): boolean {
  return sheet.faces.some((face) => [...face.points, ...face.spots].some((point) => point.key === key));
}

function subjectRefusal(sheet: Sheet, about: SubjectRef, field: string): Refusal | null {
  const found = (() => {
    switch (about.kind) {
      case 'pour':
        return about.id === sheet.pourId;
      case 'element':
        return sheet.plan.elements.some((element) => element.id === about.id);
      case 'face':
        return sheet.faces.some((face) => face.faceId === about.id);
      case 'point':
        return pointExists(sheet, about.id);
      case 'check':
        return sheet.checks.some((check) => check.item.id === about.id);
      case 'measurement':
        return sheet.measurements.some((state) => state.item.id === about.id);
      case 'nonconformance':
        return sheet.nonconformances.some((state) => state.entry.id === about.id);
      case 'entry':
        return exists(sheet, about.id);
    }
  })();
  return found ? null : absent('What this is about', field);
}

function dispositionRefusal(nonconformanceId: string, accepts: string[], sheet: Sheet): Refusal | null {
  const state = sheet.nonconformances.find((one) => one.entry.id === nonconformanceId);
  if (!state) return absent('The nonconformance', 'nonconformanceId');
  if (state.withdrawn)
    return { code: 'invalid', sentence: 'This nonconformance was withdrawn.', field: 'nonconformanceId' };
  return accepts.every((id) => exists(sheet, id)) ? null : absent('One of the entries it accepts', 'accepts');
}

function amendmentRefusal(entry: Extract<Entry, { type: 'amendment' }>, sheet: Sheet): Refusal | null {
  const root = sheet.entries.find((one) => one.id === entry.body.rootId);
  if (!root) return absent('The entry to amend', 'rootId');
  if (!mayAmend(root, entry.authorId, entry.authorRole)) {
    return {
      code: 'not-allowed',
      sentence: 'Only the person who recorded it can amend it. You can raise a query.',
      field: 'rootId',
    };
  }
  if (!isAmendable(root.type))
    return {
      code: 'invalid',
      sentence: 'This kind of entry is answered by a further entry, not amended.',
      field: 'rootId',
    };
  if (entry.body.replacement === null) return null;
  const parsed = siteBodies[root.type].safeParse(entry.body.replacement);
  if (parsed.success) {
    const unsaid = measurerChange(root, parsed.data, entry.authorId);
    return unsaid ? { code: 'not-allowed', sentence: unsaid, field: 'replacement.measurer' } : null;
  }
  const issue = parsed.error.issues[0];
  return {
    code: 'invalid',
    sentence: issue?.message ?? 'The amended values cannot be read.',
    field: `replacement.${issue?.path.join('.') ?? ''}`,
  };
}
