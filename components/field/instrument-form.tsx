'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { FormProblem } from './form-problem';
import { instantOfField, localFieldText } from './field-time';
import { instrumentKindWords } from './instrument-words';
import type { OpenSheet } from './open-sheet';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

type Kind = keyof typeof instrumentKindWords;
const kinds = Object.keys(instrumentKindWords) as Kind[];

/** Adds an instrument to the project: its name on site, kind, number, calibration and uncertainty. */
export function InstrumentForm({ open, onKept }: { open: OpenSheet; onKept: () => void }) {
  const again = useRefusedAgain('instrument-status');
  const was = again?.body;
  const [name, setName] = useState(was?.name ?? '');
  const [kind, setKind] = useState<Kind>(was?.kind ?? 'depth-gauge');
  const [serial, setSerial] = useState(was?.serial ?? '');
  const [due, setDue] = useState(() =>
    was?.calibrationDue ? localFieldText(was.calibrationDue, open.project.timeZone).slice(0, 10) : '',
  );
  const [uncertainty, setUncertainty] = useState(was?.uncertaintyMm == null ? '' : String(was.uncertaintyMm));
  const [numberProblem, setNumberProblem] = useState<string | null>(null);
  const { busy, problems, record } = useRecord(open, again);

  const keep = async () => {
    const uncertaintyMm = uncertainty.trim() === '' ? null : Number(uncertainty);
    const bad = uncertaintyMm !== null && !Number.isFinite(uncertaintyMm);
    setNumberProblem(bad ? 'Write a number of millimetres, or leave it empty.' : null);
    if (bad) return;
    const entry = await record('instrument-status', {
      instrumentId: crypto.randomUUID(),
      name,
      kind,
      serial,
      calibrationDue: due ? instantOfField(`${due}T23:59`, open.project.timeZone) : null,
      uncertaintyMm,
      inService: true,
    });
    if (entry) onKept();
  };
  return (
    <form
      noValidate
      className="grid gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void keep();
      }}
    >
      <TextInput
        label="Name on site"
        hint="What is written on it, as in DG-2."
        value={name}
        maxLength={60}
        error={problems.name}
        onChange={(event) => setName(event.target.value)}
      />
      <Select
        label="Kind"
        value={kind}
        onChange={(event) => setKind(kinds.find((one) => one === event.target.value) ?? 'tape')}
        options={kinds.map((one) => ({ value: one, label: instrumentKindWords[one] }))}
      />
      <TextInput
        label="Serial number"
        optional
        value={serial}
        maxLength={60}
        error={problems.serial}
        onChange={(event) => setSerial(event.target.value)}
      />
      <TextInput
        label="Calibration due"
        optional
        type="date"
        value={due}
        error={problems.calibrationDue}
        onChange={(event) => setDue(event.target.value)}
      />
      <TextInput
        label="Expanded uncertainty U (k = 2)"
        optional
        unit="mm"
        figure
        inputMode="decimal"
        value={uncertainty}
        error={numberProblem ?? problems.uncertaintyMm}
        onChange={(event) => setUncertainty(event.target.value)}
      />
      <FormProblem problems={problems} shown={['name', 'serial', 'calibrationDue', 'uncertaintyMm']} />
      <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
        Add it
      </Button>
    </form>
  );
}
