'use client';

import { useState } from 'react';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import { siteEventKinds } from '@/lib/inspection/entry-bodies';
import { ElementsField } from './elements-field';
import { EntryForm } from './entry-form';
import { siteEventWords } from './entry-title';
import { instantOfField, localFieldText } from './field-time';
import type { OpenSheet } from './open-sheet';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** Rain, washed soil, a bar or form changed: each voids a release in its scope. */
export function SiteEventForm({ open }: { open: OpenSheet }) {
  const again = useRefusedAgain('site-event');
  const was = again?.body;
  const [kind, setKind] = useState<(typeof siteEventKinds)[number]>(was?.kind ?? 'rain');
  const [at, setAt] = useState(() =>
    localFieldText(was?.at ?? new Date().toISOString(), open.project.timeZone),
  );
  const [amount, setAmount] = useState(was?.amountMm == null ? '' : String(was.amountMm));
  const [text, setText] = useState(was?.text ?? '');
  const [elementIds, setElementIds] = useState<string[] | null>(was?.elementIds ?? null);
  const { busy, problems, record } = useRecord(open, again);
  const [amountProblem, setAmountProblem] = useState<string | null>(null);

  const keep = async () => {
    const amountMm = amount.trim() === '' ? null : Number(amount);
    const bad = amountMm !== null && !Number.isFinite(amountMm);
    setAmountProblem(bad ? 'Write a number of millimetres, or leave it empty.' : null);
    if (bad) return false;
    const entry = await record('site-event', {
      kind,
      at: instantOfField(at, open.project.timeZone) ?? '',
      amountMm: kind === 'rain' ? amountMm : null,
      text,
      elementIds,
    });
    if (!entry) return false;
    setText('');
    setAmount('');
    return true;
  };
  return (
    <EntryForm
      label="Put it on record"
      shown={['at', 'amountMm', 'text']}
      problems={problems}
      busy={busy}
      onKeep={keep}
    >
      <Select
        label="What happened"
        value={kind}
        onChange={(event) => setKind(siteEventKinds.find((one) => one === event.target.value) ?? 'other')}
        options={siteEventKinds.map((one) => ({ value: one, label: siteEventWords[one] }))}
      />
      <TextInput
        label="When"
        type="datetime-local"
        value={at}
        error={problems.at}
        onChange={(event) => setAt(event.target.value)}
      />
      {kind === 'rain' && (
        <TextInput
          label="Depth of rain"
          hint={`Unknown counts as over the limit of ${open.sheet.plan.rainLimitMm} mm.`}
          optional
          unit="mm"
          figure
          inputMode="decimal"
          value={amount}
          error={amountProblem ?? problems.amountMm}
          onChange={(event) => setAmount(event.target.value)}
        />
      )}
      <Textarea
        label="What and where"
        optional
        rows={2}
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
      <ElementsField plan={open.sheet.plan} legend="Concerns" value={elementIds} onChange={setElementIds} />
    </EntryForm>
  );
}
