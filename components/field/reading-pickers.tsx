'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Checkbox } from '@/components/ui/checkbox';
import { Dialog } from '@/components/ui/dialog';
import { TextInput } from '@/components/ui/text-input';
import { toneText } from '@/components/ui/tone';
import { formatLength, parseLength, withUnit } from '@/lib/concrete/length';
import type { Face } from '@/lib/inspection/plan';
import { ChoiceList } from './choice-list';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { instrumentKindWords, instrumentStanding } from './instrument-words';
import type { OpenSheet } from './open-sheet';
import type { Picker } from './reading-context-bar';
import { OTHER_STEEL, type ReadingSetup } from './use-reading-settings';

/** The sheet in which instrument, steel or unit is chosen; it stays chosen until changed. */
export function ReadingPicker({
  which,
  open,
  face,
  setup,
  asFoundBar,
  onAsFoundBar,
  standingAt,
  onClose,
}: {
  which: Picker | null;
  open: OpenSheet;
  face: Face;
  setup: ReadingSetup;
  asFoundBar: string;
  onAsFoundBar: (bar: string) => void;
  standingAt: { now: string; timeZone: string; clockOffsetMs: number | null };
  onClose: () => void;
}) {
  const titles: Record<Picker, string> = {
    instrument: 'Read with',
    steel: 'Steel touched',
    unit: 'Unit and sound',
    measurer: 'Who reads the gauge',
  };
  return (
    <Dialog
      open={which !== null}
      title={which ? titles[which] : ''}
      onClose={onClose}
      closeOutside
      footer={
        <Button variant="primary" onClick={onClose}>
          Done
        </Button>
      }
    >
      {which === 'instrument' && <InstrumentChoice {...{ open, setup, standingAt }} />}
      {which === 'steel' && <SteelChoice {...{ face, setup, asFoundBar, onAsFoundBar }} />}
      {which === 'unit' && <UnitChoice setup={setup} />}
      {which === 'measurer' && <MeasurerChoice open={open} setup={setup} />}
    </Dialog>
  );
}

function InstrumentChoice({
  open,
  setup,
  standingAt,
}: {
  open: OpenSheet;
  setup: ReadingSetup;
  standingAt: { now: string; timeZone: string; clockOffsetMs: number | null };
}) {
  const inService = open.sheet.instruments.filter((one) => one.status?.body.inService);
  return (
    <div className="grid gap-4">
      {inService.length === 0 ? (
        <p>No instrument of this project is in service. Add the one in your hand first.</p>
      ) : (
        <ChoiceList
          legend="Instruments of this project"
          value={setup.instrument?.instrumentId ?? ''}
          onChoose={(instrumentId) => setup.change({ instrumentId })}
          choices={inService.map((state) => {
            const standing = instrumentStanding(state, standingAt);
            const kind = state.status ? instrumentKindWords[state.status.body.kind] : '';
            return {
              value: state.instrumentId,
              label: state.name,
              detail: (
                <>
                  {kind} · <span className={toneText[standing.tone]}>{standing.words}</span>
                </>
              ),
            };
          })}
        />
      )}
      {setup.isBlock && <BlockSize setup={setup} />}
      <FieldLink href={fieldPaths.instruments(open.sheet.pourId)} className={buttonClasses('secondary')}>
        Block check, or another instrument
      </FieldLink>
    </div>
  );
}

function BlockSize({ setup }: { setup: ReadingSetup }) {
  const [text, setText] = useState(formatLength(setup.blockMm, setup.unit));
  const parsed = parseLength(text, setup.unit);
  const mm = parsed.ok ? parsed.length.mm : null;
  return (
    <TextInput
      label="Size of the block"
      unit={setup.unit}
      figure
      inputMode="text"
      value={text}
      error={parsed.ok ? (mm !== null && mm > 0 ? null : 'More than zero.') : parsed.problem}
      onChange={(event) => {
        setText(event.target.value);
        const next = parseLength(event.target.value, setup.unit);
        if (next.ok && next.length.mm !== null && next.length.mm > 0)
          setup.change({ blockMm: next.length.mm });
      }}
    />
  );
}

function SteelChoice({
  face,
  setup,
  asFoundBar,
  onAsFoundBar,
}: {
  face: Face;
  setup: ReadingSetup;
  asFoundBar: string;
  onAsFoundBar: (bar: string) => void;
}) {
  return (
    <div className="grid gap-4">
      <ChoiceList
        legend="A reading is judged by the requirement of the steel it touched"
        value={setup.requirement?.id ?? OTHER_STEEL}
        onChoose={(id) => setup.change({ steel: { ...setup.settings.steel, [face.id]: id } })}
        choices={[
          ...face.requirements.map((requirement) => ({
            value: requirement.id,
            label: requirement.steel,
            detail: `${requirement.barDesignation} · accepted from ${withUnit(requirement.leastAcceptedMm, setup.unit)}`,
          })),
          {
            value: OTHER_STEEL,
            label: 'Other steel',
            detail: 'No requirement here: kept as indicative, not verified',
          },
        ]}
      />
      <TextInput
        label="Bar found, if it is not the planned one"
        hint="For the next reading only. A wrong bar is a departure even if it is larger."
        optional
        maxLength={20}
        value={asFoundBar}
        onChange={(event) => onAsFoundBar(event.target.value)}
      />
    </div>
  );
}

function UnitChoice({ setup }: { setup: ReadingSetup }) {
  return (
    <div className="grid gap-4">
      <ChoiceList
        legend="Readings are entered in"
        value={setup.unit}
        onChoose={(unit) => setup.change({ unit: unit === 'in' ? 'in' : 'mm' })}
        choices={[
          { value: 'mm', label: 'Millimetres', detail: 'by digits' },
          { value: 'in', label: 'Inches', detail: 'by whole inches and fractions that add up' },
        ]}
      />
      <Checkbox
        label="Say the verdict with a sound too"
        checked={setup.settings.sound}
        onChange={(event) => setup.change({ sound: event.target.checked })}
      />
    </div>
  );
}

function MeasurerChoice({ open, setup }: { open: OpenSheet; setup: ReadingSetup }) {
  const { person } = open;
  return (
    <div className="grid gap-4">
      <ChoiceList
        legend="Readings are"
        value={setup.measurer?.id ?? person.id}
        onChoose={(id) =>
          setup.change({ readBy: id === person.id ? null : { typistId: person.id, personId: id } })
        }
        choices={[
          { value: person.id, label: `read and typed by ${person.name}`, detail: 'You hold the gauge' },
          ...setup.measurers.map(({ id, name }) => ({
            value: id,
            label: `read by ${name}, typed by you`,
            detail: `Not verified until ${name} confirms them`,
          })),
        ]}
      />
      <p className="text-label text-pencil">
        Inspectors of this project can be named. If somebody else holds the gauge for you, read it yourself:
        the reading is yours.
      </p>
    </div>
  );
}
