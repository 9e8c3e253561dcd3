'use client';

import { buttonClasses } from '@/components/ui/button-classes';
import { EmptyState } from '@/components/ui/empty-state';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { useSnapshot } from './use-device';

/** An entry that the sheet does not hold: refused by the server, and then why and where it is; or not fetched yet. */
export function EntryNotHere({ id, what }: { id: string; what: string }) {
  const refused = useSnapshot().refused.find((one) => one.entry.id === id);
  if (!refused)
    return (
      <EmptyState title={`This ${what} is not on this device`}>It may not have been fetched yet.</EmptyState>
    );
  return (
    <EmptyState
      title={`The server refused this ${what}`}
      action={
        <FieldLink href={fieldPaths.notSent} className={buttonClasses('primary')}>
          See what was refused
        </FieldLink>
      }
    >
      {refused.sentence} It is kept, and can be recorded again.
    </EmptyState>
  );
}
