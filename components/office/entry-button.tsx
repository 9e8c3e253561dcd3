'use client';

import type { ButtonVariant } from '@/components/ui/button-classes';
import type { EntryAction } from './entry-action';
import { ActionDialog } from './action-dialog';
import { EntryForm } from './entry-form';
import { postJson } from './post-json';

/** A button that opens the form of one action on a pour. */
export function EntryButton({
  pourId,
  seenSeq,
  action,
  variant,
  about,
}: {
  pourId: string;
  /** The head of the pour that this person has before them: what came since, they have not seen. */
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
      {(close) => (
        <EntryForm
          send={(type, body) => postJson(`/api/pours/${pourId}/entries`, { type, body, seenSeq })}
          action={action}
          onDone={close}
        />
      )}
    </ActionDialog>
  );
}
