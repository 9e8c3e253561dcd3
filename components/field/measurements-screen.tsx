'use client';

import { EmptyState } from '@/components/ui/empty-state';
import { classNames } from '@/components/ui/class-names';
import { MarkIcon } from '@/components/drawings/mark';
import { mayRecord } from '@/lib/inspection/entry-access';
import { placesMeasured } from '@/lib/inspection/judge-measurements';
import type { MeasurementState } from '@/lib/inspection/sheet-types';
import { limitWords, measuredText } from '@/lib/inspection/measured-words';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { MeasurementForm, stageWords } from './measurement-form';
import { nameOf, type OpenSheet } from './open-sheet';
import { RequirementTrail } from './requirement-trail';
import { Screen } from './screen';
import { MeasurementLines } from './sheet-lines';
import { Disclosure } from './disclosure';

/** One thing to measure: its limits, a form fit for standing up, and what was measured; without one, the list. */
export function MeasurementsScreen({ open, itemId }: { open: OpenSheet; itemId: string | null }) {
  const { sheet, pour } = open;
  const back = { href: fieldPaths.pour(sheet.pourId), words: pour.number };
  const state = sheet.measurements.find((one) => one.item.id === itemId);
  if (!state) {
    return (
      <Screen title={`${pour.number} measurements`} back={back}>
        {sheet.measurements.length === 0 ? (
          <EmptyState title="The plan asks for no measurements">Cover is read under the faces.</EmptyState>
        ) : (
          <MeasurementLines open={open} />
        )}
      </Screen>
    );
  }
  const { item } = state;
  const done = placesMeasured(state);
  return (
    <Screen
      title={item.title}
      aside={`${Math.min(done, item.required)} of ${item.required} ${item.required === 1 ? 'place' : 'places'}`}
      back={back}
      form
    >
      {/* A sample square takes the width of a tablet; any other form leaves half of it to what was measured. */}
      <div className={classNames('grid gap-5', item.quantity !== 'share' && 'md:grid-cols-2 md:items-start')}>
        {mayRecord('measurement', open.project.role) && (
          <MeasurementForm
            key={item.id}
            open={open}
            state={state}
            limits={limitWords(item, sheet.plan.units)}
          />
        )}
        <div className="grid gap-5">
          <Places open={open} state={state} />
          <Disclosure className="border border-ink bg-sheet px-3" summary="How is this judged?">
            <p className="pb-2">
              {limitWords(item, sheet.plan.units)}. Compared unrounded; limits belong to what is accepted.
            </p>
            <RequirementTrail trail={item.trail} />
          </Disclosure>
        </div>
      </div>
    </Screen>
  );
}

function Places({ open, state }: { open: OpenSheet; state: MeasurementState }) {
  if (state.places.length === 0) return null;
  return (
    <section className="grid gap-1.5">
      <h2 className="px-1 text-heading">Measured</h2>
      <ul className="border border-ink bg-sheet">
        {state.places.toReversed().map((place) => {
          const withdrawn = place.current === null;
          const body = place.current ?? place.entry.body;
          return (
            <li key={place.entry.id} className="border-b border-rule last:border-b-0">
              <FieldLink
                href={fieldPaths.entry(open.sheet.pourId, place.entry.id)}
                className="grid min-h-target grid-cols-[1.5rem_1fr] gap-x-2 px-3 py-2 hover:bg-paper/60"
              >
                <MarkIcon
                  kind={
                    place.verdict === 'met'
                      ? 'met'
                      : place.verdict === 'not-met'
                        ? 'not-met-low'
                        : 'not-verified'
                  }
                />
                <span>
                  <span className={`font-label font-semibold ${withdrawn ? 'line-through' : ''}`}>
                    {measuredText(body.value)}
                    {body.place && `, ${body.place}`}
                    {body.stage !== 'single' && `, ${stageWords[body.stage]}`}
                  </span>
                  <span className="block text-label">{withdrawn ? 'withdrawn' : place.reason}</span>
                  <span className="block text-label text-pencil">
                    {nameOf(open, place.entry.authorId)} ·{' '}
                    {dayAndTime(place.entry.recordedAt, open.project.timeZone)}
                    {place.entry.seq === null && ' · not sent yet'}
                    {place.acceptedBy && ' · accepted by the engineer'}
                  </span>
                </span>
              </FieldLink>
            </li>
          );
        })}
      </ul>
    </section>
  );
}
