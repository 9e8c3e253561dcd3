'use client';

import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { Problems } from './problems-of';
import { FormProblem } from './form-problem';

/** The frame of a small form: its problem, its button, and a word once it is kept. */
export function EntryForm({
  label,
  shown,
  problems,
  busy,
  onKeep,
  children,
}: {
  label: string;
  /** Field paths whose problems stand at their fields. */
  shown: readonly string[];
  problems: Problems;
  busy: boolean;
  onKeep: () => Promise<boolean>;
  children: ReactNode;
}) {
  const [kept, setKept] = useState(false);
  return (
    <form
      noValidate
      className="grid gap-4"
      onChange={() => setKept(false)}
      onSubmit={(event) => {
        event.preventDefault();
        // A glove that bounces on the key must not write it twice; whatever is changed can be kept anew.
        if (!kept) void onKeep().then(setKept);
      }}
    >
      {children}
      <FormProblem problems={problems} shown={shown} />
      <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
        {label}
      </Button>
      <p role="status" className="min-h-[1.45em] text-center font-label font-semibold text-met">
        {kept && 'Kept on this device.'}
      </p>
    </form>
  );
}
