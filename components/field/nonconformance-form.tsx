'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { EmptyState } from '@/components/ui/empty-state';
import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { goBackTo } from './field-router';
import { fieldPaths } from './field-routes';
import { instantOfField, localFieldText } from './field-time';
import { FormProblem } from './form-problem';
import { failingBeside, nonconformanceDraft } from './nonconformance-draft';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { SubjectSelect } from './subject-select';
import { subjectWords, whereOf } from './subject-words';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';
import { Disclosure } from './disclosure';

/** Raises a nonconformance: what and where are filled in; extent, a proposal and a time are asked for. */
export function NonconformanceForm({ open, about: given }: { open: OpenSheet; about: SubjectRef | null }) {
  const { sheet, pour } = open;
  const again = useRefusedAgain('nonconformance');
  const [about, setAbout] = useState<SubjectRef>(given ?? { kind: 'pour', id: sheet.pourId });
  const [draft] = useState(() => again?.body ?? nonconformanceDraft(sheet, about));
  const [title, setTitle] = useState(draft.title);
  const [extent, setExtent] = useState(draft.extent);
  const [description, setDescription] = useState(again?.body.description ?? '');
  const [proposal, setProposal] = useState(again?.body.proposal ?? '');
  const [neededBy, setNeededBy] = useState(() =>
    again?.body.neededBy ? localFieldText(again.body.neededBy, open.project.timeZone) : '',
  );
  const beside = failingBeside(sheet, about);
  const [also, setAlso] = useState<readonly string[]>(() => draft.about.slice(1).map((one) => one.id));
  const { busy, problems, record } = useRecord(open, again);

  const back = given?.kind === 'point' ? whereOf(sheet, given).faceId : null;
  const from = back ? fieldPaths.face(sheet.pourId, back) : fieldPaths.pour(sheet.pourId);
  if (!mayRecord('nonconformance', open.project.role)) {
    return (
      <Screen title="Nonconformance" back={{ href: from, words: pour.number }}>
        <EmptyState title="Your role raises no nonconformance">Tell the inspector what you saw.</EmptyState>
      </Screen>
    );
  }

  const keep = async () => {
    const subjects = [
      about,
      ...beside
        .filter((point) => also.includes(point.key))
        .map((point) => ({ kind: 'point' as const, id: point.key })),
    ];
    const entry = await record('nonconformance', {
      title,
      about: subjects,
      where: whereOf(sheet, about),
      extent,
      description,
      proposal,
      neededBy: instantOfField(neededBy, open.project.timeZone),
    });
    if (entry) goBackTo(fieldPaths.nonconformanceShown(sheet.pourId, entry.id));
  };

  return (
    <Screen title="Nonconformance" aside={pour.number} back={{ href: from, words: 'where you were' }} form>
      <form
        noValidate
        className="grid gap-4 border border-ink bg-sheet p-3"
        onSubmit={(event) => {
          event.preventDefault();
          void keep();
        }}
      >
        {given ? (
          <p>
            <span className="block font-label text-label font-semibold text-pencil">About</span>
            {subjectWords(sheet, about)}
          </p>
        ) : (
          <SubjectSelect
            sheet={sheet}
            label="What it is about"
            value={about}
            error={problems.about}
            onChoose={setAbout}
          />
        )}
        {beside.length > 0 && (
          <fieldset>
            <legend className="font-label text-label font-semibold">
              Not met on this face too. The same thing?
            </legend>
            <div className="flex flex-wrap gap-x-6">
              {beside.map((point) => (
                <Checkbox
                  key={point.key}
                  label={point.label}
                  checked={also.includes(point.key)}
                  onChange={(event) =>
                    setAlso(
                      event.target.checked ? [...also, point.key] : also.filter((key) => key !== point.key),
                    )
                  }
                />
              ))}
            </div>
          </fieldset>
        )}
        <TextInput
          label="What is wrong"
          value={title}
          maxLength={160}
          error={problems.title}
          onChange={(event) => setTitle(event.target.value)}
        />
        <Textarea
          label="How far it reaches"
          hint="Which bars, from where to where, how many."
          rows={2}
          value={extent}
          error={problems.extent}
          onChange={(event) => setExtent(event.target.value)}
        />
        <Textarea
          label="Proposal"
          hint="With a proposal, the engineer is asked to decide."
          optional
          rows={2}
          value={proposal}
          error={problems.proposal}
          onChange={(event) => setProposal(event.target.value)}
        />
        <TextInput
          label="Answer needed by"
          optional
          type="datetime-local"
          value={neededBy}
          error={problems.neededBy}
          onChange={(event) => setNeededBy(event.target.value)}
        />
        <Disclosure summary="More to say">
          <Textarea
            label="Description"
            optional
            value={description}
            error={problems.description}
            onChange={(event) => setDescription(event.target.value)}
          />
        </Disclosure>
        <FormProblem
          problems={problems}
          shown={['title', 'extent', 'proposal', 'neededBy', 'description', 'about']}
        />
        <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
          Raise it
        </Button>
        <p className="text-label text-pencil">Photos come next.</p>
      </form>
    </Screen>
  );
}
