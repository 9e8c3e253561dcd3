import { amended } from './amendments';
import { saw } from './causality';
import type { CorrectedSubjects } from './corrections';
import type { EntryOf } from './entry';
import { listOf, subjectKey, type Facts } from './facts';
import type { ConditionState, NonconformanceState, NonconformanceStatus } from './sheet-types';

/** Ids of the nonconformances that their author withdrew. */
export function withdrawnNonconformances(facts: Facts): Set<string> {
  const withdrawn = listOf(facts, 'nonconformance').filter((entry) => amended(facts, entry).current === null);
  return new Set(withdrawn.map((entry) => entry.id));
}

/** Follows each nonconformance through its decision, correction and recheck. */
export function judgeNonconformances(
  facts: Facts,
  corrections: CorrectedSubjects[],
  withdrawn: Set<string>,
  inForce: Map<string, EntryOf<'disposition'>>,
): NonconformanceState[] {
  return listOf(facts, 'nonconformance').map((entry) => {
    const key = subjectKey({ kind: 'nonconformance', id: entry.id });
    const own = corrections.filter(({ keys }) => keys.has(key)).map((one) => one.entry);
    const rechecks = listOf(facts, 'recheck').filter((recheck) => subjectKey(recheck.body.about) === key);
    const disposition = inForce.get(entry.id) ?? null;
    const state = {
      entry: { ...entry, body: amended(facts, entry).current ?? entry.body },
      withdrawn: withdrawn.has(entry.id),
      dispositions: listOf(facts, 'disposition').filter((one) => one.body.nonconformanceId === entry.id),
      disposition,
      corrections: own,
      rechecks,
      photoIds: (facts.photosBySubject.get(key) ?? []).map((photo) => photo.body.photoId),
      conditions: disposition ? conditionsOf(facts, disposition) : [],
    };
    return { ...state, status: statusOf(state) };
  });
}

function conditionsOf(facts: Facts, disposition: EntryOf<'disposition'>): ConditionState[] {
  return disposition.body.conditions.map((condition) => ({
    condition,
    disposition,
    verified:
      listOf(facts, 'condition-verified').findLast((entry) => entry.body.conditionId === condition.id) ??
      null,
  }));
}

/**
 * The correction and the recheck that carry a nonconformance on: a correction reported in sight of the decision in
 * force, and an inspector's recheck in sight of that correction.
 */
export function countingWork(state: Pick<NonconformanceState, 'disposition' | 'corrections' | 'rechecks'>): {
  correction: EntryOf<'correction'> | null;
  recheck: EntryOf<'recheck'> | null;
} {
  const { disposition } = state;
  // Work done before the decision was known does not carry out the decision.
  const correction =
    state.corrections.findLast((one) => disposition === null || saw(one, disposition)) ?? null;
  const recheck =
    correction === null
      ? null
      : (state.rechecks.findLast((one) => one.authorRole === 'inspector' && saw(one, correction)) ?? null);
  return { correction, recheck };
}

function statusOf(state: Omit<NonconformanceState, 'status'>): NonconformanceStatus {
  if (state.withdrawn) return 'closed';
  const { correction: lastCorrection, recheck: lastRecheck } = countingWork(state);
  const closed = lastRecheck?.body.outcome === 'met';
  switch (state.disposition?.body.decision) {
    case 'use-as-is':
      return 'accepted';
    case 'repair':
      if (closed) return 'accepted';
      return lastCorrection && !lastRecheck ? 'corrected' : 'open';
    case 'rework':
      if (closed) return 'closed';
      return lastCorrection && !lastRecheck ? 'corrected' : 'open';
    case 'reject':
      if (closed) return 'closed';
      return lastCorrection && !lastRecheck ? 'corrected' : 'rejected';
    case undefined:
      if (closed) return 'closed';
      if (lastCorrection && !lastRecheck) return 'corrected';
      return state.entry.body.proposal ? 'decision-asked' : 'open';
  }
}
