'use client';

import { useState } from 'react';
import { MarkIcon } from '@/components/drawings/mark';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { markOfReading } from '@/lib/inspection/judge-point';
import { saidBy } from '@/lib/inspection/measurers';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import { asJson } from './amendment-draft';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { FormProblem } from './form-problem';
import { nameOf, type FaceOfPlan, type OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { readingsToConfirm, type ToConfirm } from './to-confirm';
import { useRecord } from './use-record';
import { verdictWords } from './verdict-words';

/** Readings that another person typed while this one held the gauge: looked through, and confirmed face by face. */
export function ConfirmScreen({ open }: { open: OpenSheet }) {
  const faces = readingsToConfirm(open);
  return (
    <Screen
      title="Read by you, typed by others"
      aside={open.pour.number}
      back={{ href: fieldPaths.pour(open.sheet.pourId), words: open.pour.number }}
      form
    >
      {faces.length === 0 ? (
        <EmptyState title="Nothing waits for your word">
          Readings that somebody types in your name are listed here once they are on this device.
        </EmptyState>
      ) : (
        <div className="grid gap-6">
          <p>
            Look through what was typed. A reading that is not what you read: open it, and amend or withdraw
            it. Until you confirm them they count neither way.
          </p>
          {faces.map((face) => (
            <FaceToConfirm key={face.place.face.id} open={open} {...face} />
          ))}
        </div>
      )}
    </Screen>
  );
}

function FaceToConfirm({
  open,
  place,
  readings,
}: {
  open: OpenSheet;
  place: FaceOfPlan;
  readings: ToConfirm[];
}) {
  const { problems, record } = useRecord(open);
  const [busy, setBusy] = useState(false);
  const confirm = async () => {
    setBusy(true);
    for (const { reading } of readings) {
      const kept = await record('amendment', {
        rootId: reading.entry.id,
        sawAmendmentId: reading.amendments.at(-1)?.entry.id ?? null,
        reason: 'confirmed by who read it',
        replacement: asJson(saidBy(bodyShown(reading), open.person.id)),
        photoId: null,
      });
      if (!kept) break;
    }
    setBusy(false);
  };
  const count = readings.length;
  return (
    <section className="grid gap-1.5">
      <h2 className="px-1 text-heading">
        {place.element.mark}, {place.face.name}
      </h2>
      <ul className="border border-ink bg-sheet">
        {readings.map(({ point, reading }) => {
          const judged = reading.onceConfirmed ?? reading.judged;
          return (
            <li key={reading.entry.id} className="border-b border-rule last:border-b-0">
              <FieldLink
                href={fieldPaths.entry(open.sheet.pourId, reading.entry.id)}
                className="grid min-h-target grid-cols-[1.5rem_1fr] items-center gap-x-2 px-3 py-2 hover:bg-paper/60"
              >
                <MarkIcon kind={markOfReading(judged)} />
                <span>
                  <span className="font-label font-semibold">
                    {point.label}: {readingText(bodyShown(reading))}
                  </span>{' '}
                  {verdictWords(judged)}
                  <span className="block text-label text-pencil">
                    to {bodyShown(reading).steel} · typed by {nameOf(open, reading.entry.authorId)},{' '}
                    {dayAndTime(reading.entry.body.measuredAt, open.project.timeZone)}
                  </span>
                </span>
              </FieldLink>
            </li>
          );
        })}
      </ul>
      <FormProblem problems={problems} shown={[]} />
      <Button variant="primary" wide busy={busy} onClick={() => void confirm()}>
        {count === 1 ? 'Confirm: I read this' : `Confirm: I read these ${count}`}
      </Button>
    </section>
  );
}
