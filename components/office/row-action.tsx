'use client';

import type { ButtonVariant } from '@/components/ui/button-classes';
import { answerQueryAction, conditionAction, liftAction, queryAction } from './row-actions';
import { EntryButton } from './entry-button';

/** What a row of a list can be answered with; ids only, so that a page drawn on the server can offer it. */
export type RowActionKind = 'lift' | 'query' | 'answer-query' | 'verify';

const actionOf = {
  lift: liftAction,
  query: queryAction,
  'answer-query': answerQueryAction,
  verify: conditionAction,
};

/** The button of one row, with its form. */
export function RowAction({
  kind,
  id,
  pourId,
  seenSeq,
  about,
  variant = 'quiet',
}: {
  kind: RowActionKind;
  id: string;
  pourId: string;
  seenSeq: number;
  about: string;
  variant?: ButtonVariant;
}) {
  return (
    <EntryButton
      pourId={pourId}
      seenSeq={seenSeq}
      action={actionOf[kind](id)}
      about={about}
      variant={variant}
    />
  );
}
