import { countingWork } from './judge-nonconformances';
import type { JudgedWords } from './judged-words';
import type { NonconformanceState } from './sheet-types';

const decisions = { rework: 'rework', repair: 'repair', 'use-as-is': 'use as is', reject: 'reject' } as const;
const outcomes = { met: 'met', 'not-met': 'not met' } as const;

/** How a nonconformance stands and by what: the decision in force, the work that counts, and the recheck of it. */
export function judgedNonconformance(state: NonconformanceState): JudgedWords {
  const { correction, recheck } = countingWork(state);
  const decision = state.disposition?.body.decision ?? null;
  const outcome = recheck ? outcomes[recheck.body.outcome] : null;
  const waiting = unmetBeforePour(state);
  const uncounted = state.corrections.length > 0 && correction === null;
  return {
    reason: reasonOf(state, outcome),
    notes: [
      ...(uncounted
        ? ['A correction was reported before the decision was known: it does not carry the decision out.']
        : []),
      ...(state.rechecks.some((one) => one.authorRole !== 'inspector')
        ? ['A recheck by somebody who is no inspector is kept and does not close it.']
        : []),
      ...(waiting > 0
        ? [
            `Conditions of the decision for before the pour that are not verified as met: ${waiting}. They hold it.`,
          ]
        : []),
    ],
    lines: [
      { label: 'decision in force', value: decision ? decisions[decision] : 'none' },
      { label: 'corrections that count', value: correction ? 'reported' : 'none' },
      { label: 'inspector’s recheck', value: outcome ?? 'none' },
      { label: 'stands in the way of a release', value: standsInTheWay(state) ? 'yes' : 'no', decides: true },
    ],
    rule: 'A correction counts when whoever reported it had seen the decision, a recheck when an inspector made it in sight of that correction. Only the engineer of record accepts what does not conform.',
    sources: [],
  };
}

const unmetBeforePour = ({ conditions }: NonconformanceState): number =>
  conditions.filter(
    ({ condition, verified }) => condition.stage === 'before-pour' && verified?.body.outcome !== 'met',
  ).length;

const standsInTheWay = (state: NonconformanceState): boolean =>
  (state.status !== 'accepted' && state.status !== 'closed') || unmetBeforePour(state) > 0;

function reasonOf(state: NonconformanceState, outcome: string | null): string {
  if (state.withdrawn) return 'Withdrawn by whoever raised it, with a reason that is on record.';
  const decision = state.disposition ? decisions[state.disposition.body.decision] : null;
  switch (state.status) {
    case 'accepted':
      return decision === 'repair'
        ? 'Accepted: the engineer decided on a repair, it was made, and the recheck met.'
        : 'Accepted: the engineer decided that it may stay as it is, for what the decision names and nothing else.';
    case 'closed':
      return 'Closed: it was corrected and the inspector’s recheck met.';
    case 'rejected':
      return 'Rejected: the engineer decided that it may not stay. It is taken out, corrected and rechecked.';
    case 'corrected':
      return 'Corrected: the inspector has not looked at it since.';
    case 'decision-asked':
      return 'The engineer of record is asked to decide; nobody has put it right meanwhile.';
    case 'open':
      if (outcome === 'not met') return 'Open: it was corrected, and the recheck did not meet.';
      return decision
        ? `Open: the engineer decided on ${decision}, and no correction that counts is reported.`
        : 'Open: no correction is reported and no decision is asked for.';
  }
}
