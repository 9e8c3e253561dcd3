'use client';

import type { ButtonVariant } from '@/components/ui/button-classes';
import type { EntryAction } from './entry-action';
import { ActionDialog } from './action-dialog';
import { EntryForm } from './entry-form';

/** A button that opens the form of one action. */
export function EntryButton({
  pourId,
  seenSeq,
  action,
  variant,
  about,
}: {
  pourId: string;
  seenSeq: number;
  action: EntryAction;
  variant?: ButtonVariant;
  /** What it is about, for the names of buttons that are repeated. */
  about?: string;
}) {
  return (
    <ActionDialog
      label={action.label}
      accessibleLabel={about ? `${action.label}: ${about}` : undefined}
      title={action.title}
      variant={variant}
    >
      {(close) => <EntryForm pourId={pourId} seenSeq={seenSeq} action={action} onDone={close} />}
    </ActionDialog>
  );
}
