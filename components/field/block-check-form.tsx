'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import { formatLength, parseLength, type LengthUnit } from '@/lib/concrete/length';
import { blockCheckPasses } from '@/lib/inspection/instruments';
import type { InstrumentState } from '@/lib/inspection/sheet-types';
import { ChoiceList } from './choice-list';
import { FormProblem } from './form-problem';
import type { OpenSheet } from './open-sheet';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

const shifts = [
  { value: 'start', label: 'Start of shift' },
  { value: 'middle', label: 'Middle' },
  { value: 'end', label: 'End' },
] as const;

const asMm = (text: string, unit: LengthUnit): number | null => {
  const parsed = parseLength(text, unit);
  return parsed.ok ? parsed.length.mm : null;
};

const SHIFT_MS = 14 * 3_600_000;

/** A shift has one start: what was checked within the last hours is in its middle by now. */
function nextCheck(state: InstrumentState): 'start' | 'middle' {
  const last = state.blockChecks.at(-1)?.body;
  return last && last.when !== 'end' && Date.now() - Date.parse(last.at) < SHIFT_MS ? 'middle' : 'start';
}

/** A reading on a known block, at the start, in the middle and at the end of a shift. */
export function BlockCheckForm({
  open,
  state,
  onKept,
}: {
  open: OpenSheet;
  state: InstrumentState;
  onKept: () => void;
}) {
  const unit = open.sheet.plan.units;
  const again = useRefusedAgain('block-check', (body) => body.instrumentId === state.instrumentId);
  const last = again?.body ?? state.blockChecks.at(-1)?.body;
  const [when, setWhen] = useState<'start' | 'middle' | 'end'>(again?.body.when ?? nextCheck(state));
  const [block, setBlock] = useState(last ? formatLength(last.blockMm, unit) : '');
  const [tolerance, setTolerance] = useState(
    last ? formatLength(last.toleranceMm, unit) : unit === 'mm' ? '1' : '1/16',
  );
  const [read, setRead] = useState(again ? formatLength(again.body.readMm, unit) : '');
  const [missing, setMissing] = useState<Record<string, string>>({});
  const { busy, problems, record } = useRecord(open, again);

  const values = { blockMm: asMm(block, unit), readMm: asMm(read, unit), toleranceMm: asMm(tolerance, unit) };
  const complete = values.blockMm !== null && values.readMm !== null && values.toleranceMm !== null;
  const passes =
    values.blockMm !== null && values.readMm !== null && values.toleranceMm !== null
      ? blockCheckPasses({
          instrumentId: state.instrumentId,
          at: '',
          when,
          blockMm: values.blockMm,
          readMm: values.readMm,
          toleranceMm: values.toleranceMm,
        })
      : null;

  const keep = async () => {
    const absent = Object.fromEntries(
      Object.entries(values)
        .filter(([, mm]) => mm === null)
        .map(([name]) => [
          name,
          unit === 'mm' ? 'Write a length, as in 40.' : 'Write a length, as in 1 1/2.',
        ]),
    );
    setMissing(absent);
    if (values.blockMm === null || values.readMm === null || values.toleranceMm === null) return;
    const entry = await record('block-check', {
      instrumentId: state.instrumentId,
      at: new Date().toISOString(),
      when,
      blockMm: values.blockMm,
      readMm: values.readMm,
      toleranceMm: values.toleranceMm,
    });
    if (entry) onKept();
  };
  const errors = { ...problems, ...missing };
  return (
    <form
      noValidate
      className="grid gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void keep();
      }}
    >
      <ChoiceList
        legend="When"
        value={when}
        choices={shifts}
        onChoose={(value) => setWhen(shifts.find((shift) => shift.value === value)?.value ?? 'start')}
      />
      <TextInput
        label="Block"
        unit={unit}
        figure
        inputMode={unit === 'mm' ? 'decimal' : 'text'}
        value={block}
        error={errors.blockMm}
        onChange={(event) => setBlock(event.target.value)}
      />
      <TextInput
        label="The instrument shows"
        unit={unit}
        figure
        inputMode={unit === 'mm' ? 'decimal' : 'text'}
        value={read}
        error={errors.readMm}
        onChange={(event) => setRead(event.target.value)}
      />
      <TextInput
        label="Tolerance, plus or minus"
        unit={unit}
        figure
        inputMode={unit === 'mm' ? 'decimal' : 'text'}
        value={tolerance}
        error={errors.toleranceMm}
        onChange={(event) => setTolerance(event.target.value)}
      />
      {complete && passes === false && (
        <p role="alert" className="font-semibold text-hold">
          Outside its tolerance. Keeping this makes what was read since the last good check not verified, in
          every pour.
        </p>
      )}
      <FormProblem problems={problems} shown={['blockMm', 'readMm', 'toleranceMm']} />
      <Button
        type="submit"
        variant={passes === false ? 'hold' : 'primary'}
        wide
        busy={busy}
        className="min-h-15"
      >
        {passes === false ? 'Keep: the check fails' : 'Keep the check'}
      </Button>
    </form>
  );
}
