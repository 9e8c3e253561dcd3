'use client';

import { useState } from 'react';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { roles, roleWords, type Role } from '@/lib/inspection/roles';
import { ChoiceList } from './choice-list';
import { ElementsField } from './elements-field';
import { EntryForm } from './entry-form';
import { instantOfField, localFieldText } from './field-time';
import type { OpenSheet } from './open-sheet';
import { SubjectSelect } from './subject-select';
import { subjectAt, whereOf } from './subject-words';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

const timeText = (open: OpenSheet, at: string | undefined) =>
  localFieldText(at ?? new Date().toISOString(), open.project.timeZone);

/** Placing started or finished; without a release it goes on record as that. */
export function PlacementForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('placement');
  const [event, setEvent] = useState<'started' | 'finished'>(
    again?.body.event ?? (open.sheet.placing.started ? 'finished' : 'started'),
  );
  const [at, setAt] = useState(() => timeText(open, again?.body.at));
  const [elementIds, setElementIds] = useState<string[] | null>(again?.body.elementIds ?? null);
  const { busy, problems, record } = useRecord(open, again);
  const unreleased = open.state !== 'released' && open.state !== 'placing' && event === 'started';
  return (
    <EntryForm
      label="Put it on record"
      shown={['at']}
      problems={problems}
      busy={busy}
      onKeep={async () =>
        (await record('placement', {
          event,
          at: instantOfField(at, open.project.timeZone) ?? '',
          elementIds,
        })) !== null
      }
    >
      <ChoiceList
        legend="Placing"
        value={event}
        onChoose={(value) => setEvent(value === 'finished' ? 'finished' : 'started')}
        choices={[
          { value: 'started', label: 'has started' },
          { value: 'finished', label: 'is finished' },
        ]}
      />
      {unreleased && (
        <p className="font-semibold text-hold">
          No release stands on this device. Placing now goes on record as placing without a release, and the
          engineer is told.
        </p>
      )}
      <TextInput
        label="When"
        type="datetime-local"
        value={at}
        error={problems.at}
        onChange={(change) => setAt(change.target.value)}
      />
      <ElementsField plan={open.sheet.plan} legend="Elements" value={elementIds} onChange={setElementIds} />
    </EntryForm>
  );
}

/** Notice that a pour is ready to be inspected: when and where. */
export function InspectionAskedForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('inspection-asked');
  const [readyAt, setReadyAt] = useState(() => timeText(open, again?.body.readyAt));
  const [place, setPlace] = useState(again?.body.place ?? open.pour.location);
  const [text, setText] = useState(again?.body.text ?? '');
  const { busy, problems, record } = useRecord(open, again);
  return (
    <EntryForm
      label="Ask for the inspection"
      shown={['readyAt', 'place', 'text']}
      problems={problems}
      busy={busy}
      onKeep={async () =>
        (await record('inspection-asked', {
          readyAt: instantOfField(readyAt, open.project.timeZone) ?? '',
          place,
          text,
        })) !== null
      }
    >
      <TextInput
        label="Ready at"
        type="datetime-local"
        value={readyAt}
        error={problems.readyAt}
        onChange={(event) => setReadyAt(event.target.value)}
      />
      <TextInput
        label="Where"
        value={place}
        error={problems.place}
        onChange={(event) => setPlace(event.target.value)}
      />
      <Textarea
        label="What to know"
        optional
        rows={2}
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
    </EntryForm>
  );
}

/** A hold set by hand, with who lifts it and what is needed. */
export function HoldForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('hold');
  const was = again?.body;
  const [title, setTitle] = useState(was?.title ?? '');
  const [need, setNeed] = useState(was?.need ?? '');
  const [clearedBy, setClearedBy] = useState<Role>(was?.clearedBy ?? 'superintendent');
  const [onBehalfOf, setOnBehalfOf] = useState(was?.onBehalfOf ?? '');
  const [about, setAbout] = useState<SubjectRef>(
    (was && subjectAt(was.where)) ?? { kind: 'pour', id: open.sheet.pourId },
  );
  const { busy, problems, record } = useRecord(open, again);
  const keep = async () => {
    const entry = await record('hold', {
      title,
      need,
      clearedBy,
      where: whereOf(open.sheet, about),
      onBehalfOf,
    });
    if (!entry) return false;
    setTitle('');
    setNeed('');
    setOnBehalfOf('');
    return true;
  };
  return (
    <EntryForm
      label="Set the hold"
      shown={['title', 'need', 'onBehalfOf', 'clearedBy']}
      problems={problems}
      busy={busy}
      onKeep={keep}
    >
      <TextInput
        label="Why"
        value={title}
        error={problems.title}
        onChange={(event) => setTitle(event.target.value)}
      />
      <SubjectSelect sheet={open.sheet} label="Where" value={about} onChoose={setAbout} />
      <TextInput
        label="What lifts it"
        value={need}
        error={problems.need}
        onChange={(event) => setNeed(event.target.value)}
      />
      <Select
        label="Who lifts it"
        value={clearedBy}
        error={problems.clearedBy}
        onChange={(event) =>
          setClearedBy(roles.find((role) => role === event.target.value) ?? 'superintendent')
        }
        options={roles
          .filter((role) => role !== 'viewer' && role !== 'crew')
          .map((role) => ({ value: role, label: roleWords[role] }))}
      />
      <TextInput
        label="On behalf of"
        hint="An authority or another party, if it is theirs."
        optional
        value={onBehalfOf}
        error={problems.onBehalfOf}
        onChange={(event) => setOnBehalfOf(event.target.value)}
      />
    </EntryForm>
  );
}

/** An instruction given by word of mouth: it holds until it is signed. */
export function VerbalInstructionForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('verbal-instruction');
  const [from, setFrom] = useState(again?.body.from ?? '');
  const [text, setText] = useState(again?.body.text ?? '');
  const [signedBy, setSignedBy] = useState(again?.body.signedBy ?? '');
  const { busy, problems, record } = useRecord(open, again);
  const keep = async () => {
    const entry = await record('verbal-instruction', { from, text, signedBy: signedBy.trim() || null });
    if (!entry) return false;
    setText('');
    return true;
  };
  return (
    <EntryForm
      label="Put it on record"
      shown={['from', 'text', 'signedBy']}
      problems={problems}
      busy={busy}
      onKeep={keep}
    >
      <TextInput
        label="Given by"
        value={from}
        error={problems.from}
        onChange={(event) => setFrom(event.target.value)}
      />
      <Textarea
        label="What was said"
        rows={2}
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
      <TextInput
        label="Signed by"
        hint="Left empty, it holds until the engineer confirms it in writing."
        optional
        value={signedBy}
        error={problems.signedBy}
        onChange={(event) => setSignedBy(event.target.value)}
      />
    </EntryForm>
  );
}

/** A note about the pour or a part of it. */
export function NoteForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('note');
  const [about, setAbout] = useState<SubjectRef>(
    again?.body.about ?? { kind: 'pour', id: open.sheet.pourId },
  );
  const [text, setText] = useState(again?.body.text ?? '');
  const { busy, problems, record } = useRecord(open, again);
  const keep = async () => {
    if (!(await record('note', { about, text }))) return false;
    setText('');
    return true;
  };
  return (
    <EntryForm label="Keep the note" shown={['text', 'about']} problems={problems} busy={busy} onKeep={keep}>
      <SubjectSelect
        sheet={open.sheet}
        label="About"
        value={about}
        error={problems.about}
        onChoose={setAbout}
      />
      <Textarea
        label="Note"
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
    </EntryForm>
  );
}
