'use client';

import type { ReactNode } from 'react';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Entry, EntryType } from '@/lib/inspection/entry';
import { entryTitle } from './entry-title';
import { HoldForm, InspectionAskedForm, NoteForm, PlacementForm, VerbalInstructionForm } from './event-forms';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { nameOf, type OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { SiteEventForm } from './site-event-form';
import { Disclosure } from './disclosure';
import { useRefusedType } from './use-refused-again';

const shownTypes: readonly EntryType[] = [
  'site-event',
  'hold',
  'hold-lifted',
  'note',
  'verbal-instruction',
  'inspection-asked',
  'placement',
];

/** What happens on site beside the sheet: rain and changes, placing, holds by hand, instructions, notes. */
export function EventsScreen({ open }: { open: OpenSheet }) {
  const { sheet, pour, project } = open;
  const { role } = project;
  const asked = useRefusedType();
  const shown = sheet.entries.filter((entry) => shownTypes.includes(entry.type)).toReversed();
  const forms: { type: EntryType; title: string; form: ReactNode }[] = [
    { type: 'site-event', title: 'Rain, or something changed', form: <SiteEventForm open={open} /> },
    { type: 'placement', title: 'Placing started or finished', form: <PlacementForm open={open} /> },
    { type: 'inspection-asked', title: 'Ask for the inspection', form: <InspectionAskedForm open={open} /> },
    { type: 'hold', title: 'Set a hold by hand', form: <HoldForm open={open} /> },
    { type: 'verbal-instruction', title: 'Verbal instruction', form: <VerbalInstructionForm open={open} /> },
    { type: 'note', title: 'Note', form: <NoteForm open={open} /> },
  ];
  return (
    <Screen
      title="On site"
      aside={pour.number}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
      form
    >
      <div className="grid gap-5">
        <div className="border border-ink bg-sheet">
          {forms
            .filter(({ type }) => mayRecord(type, role))
            .map(({ type, title, form }) => (
              <Disclosure
                key={type}
                className="border-b border-rule px-3 last:border-b-0"
                summary={title}
                startOpen={type === asked}
              >
                <div className="pb-4">{form}</div>
              </Disclosure>
            ))}
        </div>
        {shown.length > 0 && (
          <section className="grid gap-1.5">
            <h2 className="px-1 text-heading">On record</h2>
            <ul className="border border-ink bg-sheet">
              {shown.map((entry) => (
                <RecordLine key={entry.id} open={open} entry={entry} />
              ))}
            </ul>
          </section>
        )}
      </div>
    </Screen>
  );
}

function RecordLine({ open, entry }: { open: OpenSheet; entry: Entry }) {
  return (
    <li className="border-b border-rule last:border-b-0">
      <FieldLink
        href={fieldPaths.entry(open.sheet.pourId, entry.id)}
        className="block min-h-target px-3 py-2 hover:bg-paper/60"
      >
        <span className="block font-label font-semibold">{entryTitle(entry, open.sheet)}</span>
        <span className="block text-label text-pencil">
          {nameOf(open, entry.authorId)} · {dayAndTime(entry.recordedAt, open.project.timeZone)}
          {entry.seq === null && ' · not sent yet'}
        </span>
      </FieldLink>
    </li>
  );
}
