'use client';

import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Textarea } from '@/components/ui/textarea';
import type { Problems } from './problems-of';
import { ChoiceList } from './choice-list';
import { FormProblem } from './form-problem';

/** Met or not met, with a word about it: for rechecks and conditions. */
export function OutcomeForm({
  legend,
  label,
  busy,
  problems,
  first = null,
  onKeep,
}: {
  legend: ReactNode;
  label: string;
  busy: boolean;
  problems: Problems;
  /** What the form begins with: an answer that was refused. */
  first?: { outcome: 'met' | 'not-met'; text: string } | null;
  onKeep: (outcome: 'met' | 'not-met', text: string) => Promise<boolean>;
}) {
  const [outcome, setOutcome] = useState<'met' | 'not-met' | ''>(first?.outcome ?? '');
  const [text, setText] = useState(first?.text ?? '');
  const [asked, setAsked] = useState(false);
  const choose = (value: string) => setOutcome(value === 'met' ? 'met' : 'not-met');
  return (
    <form
      noValidate
      className="grid gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        setAsked(true);
        if (!outcome) return;
        void onKeep(outcome, text.trim()).then((kept) => {
          if (!kept) return;
          setOutcome('');
          setText('');
          setAsked(false);
        });
      }}
    >
      <ChoiceList
        legend={legend}
        value={outcome}
        onChoose={choose}
        error={asked && !outcome ? 'Say which.' : null}
        choices={[
          { value: 'met', label: 'Met' },
          { value: 'not-met', label: 'Not met' },
        ]}
      />
      <Textarea
        label={label}
        optional
        rows={2}
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
      <FormProblem problems={problems} shown={['text']} />
      <Button type="submit" variant="primary" wide busy={busy}>
        Keep
      </Button>
    </form>
  );
}
