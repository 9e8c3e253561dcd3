'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Textarea } from '@/components/ui/textarea';
import type { EntryOf } from '@/lib/inspection/entry';
import { roleWords } from '@/lib/inspection/roles';
import { dayAndTime } from './field-time';
import { FormProblem } from './form-problem';
import { nameOf, type OpenSheet } from './open-sheet';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** A hold set by hand: what it needs, and its lifting by the one who may. */
export function LiftHold({ open, hold }: { open: OpenSheet; hold: EntryOf<'hold'> }) {
  const state = open.sheet.manualHolds.find((one) => one.entry.id === hold.id);
  const again = useRefusedAgain('hold-lifted', (body) => body.holdId === hold.id);
  const [reason, setReason] = useState(again?.body.reason ?? '');
  const { busy, problems, record } = useRecord(open, again);
  if (state?.lifted) {
    return (
      <p className="border-l-4 border-met bg-sheet p-3">
        Lifted by {nameOf(open, state.lifted.authorId)},{' '}
        {dayAndTime(state.lifted.recordedAt, open.project.timeZone)}: {state.lifted.body.reason}
      </p>
    );
  }
  return (
    <section className="grid gap-3 border border-ink bg-sheet p-3">
      <p>
        <b>Needed:</b> {hold.body.need}
      </p>
      {hold.body.clearedBy === open.project.role ? (
        <form
          noValidate
          className="grid gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            void record('hold-lifted', { holdId: hold.id, reason });
          }}
        >
          <Textarea
            label="Why it may be lifted"
            rows={2}
            value={reason}
            error={problems.reason}
            onChange={(event) => setReason(event.target.value)}
          />
          <FormProblem problems={problems} shown={['reason']} />
          <Button type="submit" variant="primary" wide busy={busy}>
            Lift the hold
          </Button>
        </form>
      ) : (
        <p className="text-pencil">The {roleWords[hold.body.clearedBy].toLowerCase()} lifts it.</p>
      )}
    </section>
  );
}
