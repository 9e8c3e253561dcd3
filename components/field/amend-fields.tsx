'use client';

import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import type { AmendmentDraft } from './amendment-draft';
import { ChoiceList } from './choice-list';

/** The one value, choice or text that an amendment changes. */
export function AmendFields({
  draft,
  error,
  onChange,
}: {
  draft: AmendmentDraft;
  error: string | undefined;
  onChange: (draft: AmendmentDraft) => void;
}) {
  if (draft.kind === 'choice') {
    return (
      <ChoiceList
        legend={draft.label}
        value={draft.value}
        error={error}
        choices={draft.choices}
        onChoose={(value) => onChange(draft.with(value))}
      />
    );
  }
  return draft.long ? (
    <Textarea
      label={draft.label}
      value={draft.value}
      error={error}
      onChange={(event) => onChange(draft.with(event.target.value))}
    />
  ) : (
    <TextInput
      label={draft.label}
      figure
      value={draft.value}
      error={error}
      onChange={(event) => onChange(draft.with(event.target.value))}
    />
  );
}
