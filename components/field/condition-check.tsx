'use client';

import { mayRecord } from '@/lib/inspection/entry-access';
import type { ConditionState } from '@/lib/inspection/sheet-types';
import { dayAndTime } from './field-time';
import { nameOf, type OpenSheet } from './open-sheet';
import { OutcomeForm } from './outcome-form';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

const stageWords = {
  'before-pour': 'before the pour',
  'during-placing': 'during placing',
  'after-pour': 'after the pour',
} as const;

/** A condition of a decision, and the inspector's word that it is met. */
export function ConditionCheck({ open, state }: { open: OpenSheet; state: ConditionState }) {
  const { condition, verified } = state;
  const again = useRefusedAgain('condition-verified', (body) => body.conditionId === condition.id);
  const { busy, problems, record } = useRecord(open, again);
  return (
    <section className="grid gap-2 border-t border-rule pt-2">
      <h3 className="font-label font-semibold">
        Condition {stageWords[condition.stage]}: {condition.text}
      </h3>
      <p className="text-label text-pencil">
        Met when: {condition.criterion}
        {condition.dueAt && ` · due ${dayAndTime(condition.dueAt, open.project.timeZone)}`}
      </p>
      {verified && (
        <p className={verified.body.outcome === 'met' ? 'font-semibold text-met' : 'font-semibold text-hold'}>
          Found {verified.body.outcome === 'met' ? 'met' : 'not met'} by {nameOf(open, verified.authorId)},{' '}
          {dayAndTime(verified.recordedAt, open.project.timeZone)}
          {verified.body.text && `: ${verified.body.text}`}
        </p>
      )}
      {verified?.body.outcome !== 'met' && mayRecord('condition-verified', open.project.role) && (
        <OutcomeForm
          legend="What you found"
          label="What you looked at"
          busy={busy}
          problems={problems}
          first={again?.body ?? null}
          onKeep={async (outcome, text) =>
            (await record('condition-verified', { conditionId: condition.id, outcome, text })) !== null
          }
        />
      )}
    </section>
  );
}
