import { acceptedAsSeen } from './acceptances';
import { amended } from './amendments';
import { headsOf, saw } from './causality';
import type { EntryOf } from './entry';
import { subjectKey } from './facts';
import type { JudgingContext } from './judge-point';
import type { CheckState } from './sheet-types';

const favour = { 'not-met': 0, 'not-applicable': 1, met: 2 } as const;

/** The less favourable of two answers; equal ones by id, so that order of arrival decides nothing. */
function lessFavourable(one: EntryOf<'answer'>, other: EntryOf<'answer'>): EntryOf<'answer'> {
  const difference = favour[one.body.answer] - favour[other.body.answer];
  if (difference !== 0) return difference < 0 ? one : other;
  return one.id < other.id ? one : other;
}

/** Judges every question of the checklist: what was said last, or the less favourable where people had not seen each other. */
export function judgeChecks(context: JudgingContext): CheckState[] {
  return context.plan.checklist.items.map((item) => {
    let amendmentConflict = false;
    const answers: EntryOf<'answer'>[] = [];
    for (const entry of context.facts.answersByCheck.get(item.id) ?? []) {
      const result = amended(context.facts, entry);
      amendmentConflict ||= result.conflict;
      if (result.amendments.length === 0) {
        answers.push(entry);
        continue;
      }
      const standing = result.rivals.filter((body): body is EntryOf<'answer'>['body'] => body !== null);
      const least = standing.sort((a, b) => favour[a.answer] - favour[b.answer])[0];
      if (least) answers.push({ ...entry, body: least });
    }
    const heads = headsOf(answers);
    const governing = heads.length === 0 ? null : heads.reduce(lessFavourable);
    const key = subjectKey({ kind: 'check', id: item.id });
    const corrections = context.corrections.of(key).map(({ entry }) => entry);
    const correctedSince =
      corrections.findLast((correction) => governing !== null && !saw(governing, correction)) ?? null;
    return {
      item,
      answers,
      governing,
      conflict: amendmentConflict || heads.length > 1,
      photoIds: (context.facts.photosBySubject.get(key) ?? []).map((photo) => photo.body.photoId),
      correctedSince,
      acceptedBy: governing ? acceptedAsSeen(context.facts, governing, context.accepted) : null,
    };
  });
}
