'use client';

import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { OpenSheet } from './open-sheet';
import { OutcomeForm } from './outcome-form';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** The inspector's look at what was put right. */
export function RecheckForm({ open, about }: { open: OpenSheet; about: SubjectRef }) {
  const again = useRefusedAgain('recheck', (body) => body.about.id === about.id);
  const { busy, problems, record } = useRecord(open, again);
  return (
    <section className="grid gap-2 border border-ink bg-sheet p-3">
      <h2 className="text-heading">Recheck</h2>
      <OutcomeForm
        legend="What you found"
        label="What you looked at"
        busy={busy}
        problems={problems}
        first={again?.body ?? null}
        onKeep={async (outcome, text) => (await record('recheck', { about, outcome, text })) !== null}
      />
    </section>
  );
}
