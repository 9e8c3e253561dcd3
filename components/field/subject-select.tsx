'use client';

import { Select } from '@/components/ui/select';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { subjectChoices, subjectValue } from './subject-words';

/** Chooses what an entry is about, from the plan; for screens that were not opened from a place. */
export function SubjectSelect({
  sheet,
  label,
  value,
  error,
  onChoose,
}: {
  sheet: Sheet;
  label: string;
  value: SubjectRef;
  error?: string | null;
  onChoose: (subject: SubjectRef) => void;
}) {
  const choices = subjectChoices(sheet);
  return (
    <Select
      label={label}
      value={subjectValue(value)}
      error={error}
      onChange={(event) => {
        const found = choices.find((choice) => subjectValue(choice.subject) === event.target.value);
        if (found) onChoose(found.subject);
      }}
      options={choices.map((choice) => ({ value: subjectValue(choice.subject), label: choice.words }))}
    />
  );
}
