'use client';

import { TextInput } from '@/components/ui/text-input';
import type { LengthUnit } from '@/lib/concrete/length';
import { datumWords, marksWords, pulledWords } from '@/lib/inspection/measured-words';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { ChoiceList } from './choice-list';
import { LengthKeys } from './length-keys';
import type { Measure } from './measure-draft';

type Of<Q extends Measure['quantity']> = Extract<Measure, { quantity: Q }>;
interface Props<Q extends Measure['quantity']> {
  measure: Of<Q>;
  onChange: (measure: Of<Q>) => void;
}

const choicesOf = <K extends string>(words: Record<K, string>, keys: readonly K[]) =>
  keys.map((value) => ({ value, label: words[value].charAt(0).toUpperCase() + words[value].slice(1) }));

/** Bars lapped in one section, of all bars there. */
export function PartInput({ measure, onChange }: Props<'part'>) {
  return (
    <div className="grid grid-cols-2 gap-3">
      <TextInput
        label="Bars lapped here"
        figure
        inputMode="numeric"
        value={measure.count}
        onChange={(event) => onChange({ ...measure, count: event.target.value })}
      />
      <TextInput
        label="Of all bars"
        figure
        inputMode="numeric"
        value={measure.of}
        onChange={(event) => onChange({ ...measure, of: event.target.value })}
      />
    </div>
  );
}

/** A starter: how deep it sits, and what it did when somebody pulled it. */
export function StarterInput({ measure, unit, onChange }: Props<'starter'> & { unit: LengthUnit }) {
  const choices = choicesOf(pulledWords, ['held', 'moved', 'not-pulled']);
  return (
    <div className="grid gap-3">
      <ChoiceList
        legend="Pull it"
        choices={choices}
        value={measure.pulled}
        onChoose={(value) =>
          onChange({ ...measure, pulled: choices.find((one) => one.value === value)?.value ?? '' })
        }
      />
      <LengthKeys
        presses={measure.presses}
        unit={unit}
        onChange={(presses) => onChange({ ...measure, presses })}
      />
    </div>
  );
}

/** A coupler: what it says on it, both bars in to their marks, and threads left in sight. */
export function CouplerInput({ item, measure, onChange }: Props<'coupler'> & { item: MeasurementItem }) {
  const choices = choicesOf(marksWords, ['both-in', 'one-short', 'not-marked']);
  const planned = item.against?.by === 'coupler' ? item.against : null;
  return (
    <div className="grid gap-3">
      <TextInput
        label="Type on the coupler"
        hint={planned ? `Planned: ${planned.type}.` : undefined}
        maxLength={60}
        value={measure.type}
        onChange={(event) => onChange({ ...measure, type: event.target.value })}
      />
      <ChoiceList
        legend="Witness marks"
        choices={choices}
        value={measure.marks}
        onChoose={(value) =>
          onChange({ ...measure, marks: choices.find((one) => one.value === value)?.value ?? '' })
        }
      />
      {planned?.mostThreads != null && (
        <TextInput
          label="Threads in sight"
          figure
          inputMode="numeric"
          value={measure.threads}
          onChange={(event) => onChange({ ...measure, threads: event.target.value })}
        />
      )}
    </div>
  );
}

/** A tendon's height, with the surface it is taken from and the part of the tendon it goes to. */
export function TendonInput({ measure, unit, onChange }: Props<'height'> & { unit: LengthUnit }) {
  const from = choicesOf(datumWords, ['soffit', 'top']);
  const to = choicesOf(datumWords, ['underside', 'centre', 'topside']);
  return (
    <div className="grid gap-3">
      <div className="grid gap-3 sm:grid-cols-2">
        <ChoiceList
          legend="Taken from"
          choices={from}
          value={measure.from}
          onChoose={(value) =>
            onChange({ ...measure, from: from.find((one) => one.value === value)?.value ?? measure.from })
          }
        />
        <ChoiceList
          legend="To this part of the tendon"
          choices={to}
          value={measure.to}
          onChoose={(value) =>
            onChange({ ...measure, to: to.find((one) => one.value === value)?.value ?? measure.to })
          }
        />
      </div>
      <LengthKeys
        presses={measure.presses}
        unit={unit}
        onChange={(presses) => onChange({ ...measure, presses })}
      />
    </div>
  );
}

/** What the batch ticket says of its fibres. */
export function TicketInput({ item, measure, onChange }: Props<'ticket'> & { item: MeasurementItem }) {
  const planned = item.against?.by === 'fibre' ? `Planned: ${item.against.type}.` : undefined;
  return (
    <div className="grid gap-3">
      <TextInput
        label="Number of the ticket"
        optional
        maxLength={60}
        value={measure.ticket}
        onChange={(event) => onChange({ ...measure, ticket: event.target.value })}
      />
      <TextInput
        label="Fibre on the ticket"
        hint={[planned, 'Left empty: the ticket does not name it.'].filter(Boolean).join(' ')}
        maxLength={60}
        value={measure.fibreType}
        onChange={(event) => onChange({ ...measure, fibreType: event.target.value })}
      />
      <TextInput
        label="Dosage on the ticket"
        hint="Left empty: the ticket does not give it."
        unit="kg/m³"
        figure
        inputMode="decimal"
        value={measure.dosage}
        onChange={(event) => onChange({ ...measure, dosage: event.target.value })}
      />
    </div>
  );
}
