'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm-dialog';
import { Textarea } from '@/components/ui/textarea';
import type { BodyOf, Entry } from '@/lib/inspection/entry';
import { AmendFields } from './amend-fields';
import { amendmentDraft, amendmentNeedsPhoto, type AmendmentDraft } from './amendment-draft';
import { amendmentsOf } from './current-body';
import { FormProblem } from './form-problem';
import type { OpenSheet } from './open-sheet';
import { PhotoForm } from './photo-form';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

type Replacement = BodyOf<'amendment'>['replacement'];

/** Corrects or withdraws an entry of your own, with a reason. What was first recorded stays, struck through. */
export function AmendForm({
  open,
  entry,
  current,
}: {
  open: OpenSheet;
  entry: Entry;
  current: Record<string, unknown>;
}) {
  const again = useRefusedAgain('amendment', (body) => body.rootId === entry.id);
  const [draft, setDraft] = useState<AmendmentDraft | null>(() =>
    amendmentDraft(entry, again?.body.replacement ?? current, open.person.id),
  );
  const [reason, setReason] = useState(again?.body.reason ?? '');
  const [photoId, setPhotoId] = useState<string | null>(null);
  const [asking, setAsking] = useState(false);
  const [own, setOwn] = useState<Record<string, string>>({});
  const { busy, problems, clearProblems, record } = useRecord(open, again);
  const all = { ...problems, ...own };

  const send = (replacement: Replacement) =>
    record('amendment', {
      rootId: entry.id,
      sawAmendmentId: amendmentsOf(open.sheet, entry.id).at(-1)?.id ?? null,
      reason,
      replacement,
      photoId,
    });

  const needsPhoto = draft !== null && amendmentNeedsPhoto(open.sheet, entry, draft);
  const amend = async () => {
    if (!draft) return;
    clearProblems();
    setOwn({});
    const made = draft.replacement();
    if (!made.ok) return setOwn({ value: made.problem });
    if (needsPhoto && !photoId)
      return setOwn({
        '': 'From not met to met needs the photo that shows it. Take it below, or read again.',
      });
    await send(made.body);
  };
  const withdraw = async () => {
    setOwn({});
    await send(null);
    setAsking(false);
  };

  return (
    <section className="grid gap-3 border border-ink bg-sheet p-3">
      <h2 className="text-heading">{draft ? 'Amend or withdraw' : 'Withdraw'}</h2>
      <form
        noValidate
        className="grid gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          void amend();
        }}
      >
        {draft && <AmendFields draft={draft} error={all.value} onChange={setDraft} />}
        <Textarea
          label="Why"
          hint="For example: recording error, the tape was read at 64."
          rows={2}
          value={reason}
          error={all.reason}
          onChange={(event) => setReason(event.target.value)}
        />
        <FormProblem problems={all} shown={['value', 'reason']} />
        {needsPhoto && entry.type === 'reading' && (
          <PhotoForm
            open={open}
            about={{ kind: 'point', id: entry.body.pointId ?? `spot:${entry.id}` }}
            shots={['close']}
            onKept={setPhotoId}
          />
        )}
        {needsPhoto && entry.type === 'measurement' && (
          <PhotoForm
            open={open}
            about={{ kind: 'measurement', id: entry.body.itemId }}
            shots={['close']}
            onKept={setPhotoId}
          />
        )}
        <div className="flex flex-wrap gap-2">
          {draft && (
            <Button type="submit" variant="primary" busy={busy} className="flex-1">
              Amend
            </Button>
          )}
          <Button variant="hold" busy={busy} onClick={() => setAsking(true)}>
            Withdraw it
          </Button>
        </div>
      </form>
      <ConfirmDialog
        open={asking}
        title="Withdraw this entry"
        confirmLabel="Withdraw it"
        tone="hold"
        busy={busy}
        onConfirm={() => void withdraw()}
        onClose={() => setAsking(false)}
      >
        <p>
          It stays in the record, struck through, with your reason. A point that was not met stays held until
          it is read again.
        </p>
        {reason.trim() === '' && <p className="mt-2 font-semibold text-hold">Write the reason first.</p>}
      </ConfirmDialog>
    </section>
  );
}
