'use client';

import { MarkIcon } from '@/components/drawings/mark';
import { buttonClasses } from '@/components/ui/button-classes';
import { classNames } from '@/components/ui/class-names';
import { mayRecord } from '@/lib/inspection/entry-access';
import { markOfReading } from '@/lib/inspection/judge-point';
import type { PointState } from '@/lib/inspection/sheet-types';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { readByWords, waitsWordsOf } from './measurer-words';
import type { OpenSheet } from './open-sheet';
import { verdictWords } from './verdict-words';

/** Every reading at a point, newest first, withdrawn ones struck through; each opens to correct it or ask about it. */
export function PointReadings({ open, point }: { open: OpenSheet; point: PointState }) {
  if (point.readings.length === 0) return <p className="text-pencil">Nothing has been read here yet.</p>;
  const governing = new Set(point.governing.map((reading) => reading.entry.id));
  return (
    <ul className="border-y border-rule">
      {point.readings.toReversed().map((reading) => {
        const withdrawn = reading.current === null;
        return (
          <li key={reading.entry.id} className="border-b border-rule last:border-b-0">
            <FieldLink
              href={fieldPaths.entry(open.sheet.pourId, reading.entry.id)}
              className="grid min-h-target grid-cols-[1.5rem_1fr] gap-x-2 py-2 hover:bg-paper/60"
            >
              <MarkIcon kind={withdrawn ? 'not-verified' : markOfReading(reading.judged)} />
              <span>
                <span className={classNames('font-label font-semibold', withdrawn && 'line-through')}>
                  {readingText(bodyShown(reading))}
                </span>{' '}
                {withdrawn ? 'withdrawn' : (waitsWordsOf(open, reading) ?? verdictWords(reading.judged))}
                {governing.has(reading.entry.id) && ' · governs'}
                {reading.acceptedBy && ' · accepted by the engineer'}
                <span className="block text-label text-pencil">
                  to {bodyShown(reading).steel} ·{' '}
                  {dayAndTime(reading.entry.body.measuredAt, open.project.timeZone)} ·{' '}
                  {readByWords(open, reading.entry)}
                  {reading.round > 1 && ` · round ${reading.round}`}
                  {reading.pending && ' · not sent yet'}
                  {reading.amendments.length > 0 && ` · amended ${reading.amendments.length} times`}
                </span>
              </span>
            </FieldLink>
          </li>
        );
      })}
    </ul>
  );
}

/** What can be done about a point: show it, raise it, or report that it was put right. */
export function PointActions({ open, point }: { open: OpenSheet; point: PointState }) {
  const about = { kind: 'point', id: point.key } as const;
  const { pourId } = open.sheet;
  const { role } = open.project;
  const failing = point.governing.some((reading) => reading.judged.verdict === 'not-met');
  const actions = [
    { may: mayRecord('photo', role), words: 'Photo', href: fieldPaths.photos(pourId, about) },
    {
      may: failing && mayRecord('nonconformance', role),
      words: 'Nonconformance',
      href: fieldPaths.nonconformance(pourId, about),
    },
    {
      may: failing && mayRecord('correction', role),
      words: 'Report the correction',
      href: fieldPaths.correction(pourId, about),
    },
  ].filter((action) => action.may);
  if (actions.length === 0) return null;
  return (
    <nav aria-label={`About ${point.label}`} className="mt-3 flex flex-wrap gap-2">
      {actions.map(({ words, href }) => (
        <FieldLink key={words} href={href} className={buttonClasses('secondary')}>
          {words}
        </FieldLink>
      ))}
    </nav>
  );
}
