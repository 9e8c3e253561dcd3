'use client';

import { classNames } from '@/components/ui/class-names';
import { isAmendable } from '@/lib/inspection/amendments';
import { mayAmend, measurerOf } from '@/lib/inspection/measurers';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Entry, EntryOf } from '@/lib/inspection/entry';
import { judgedCheck, judgedMeasurement, type JudgedWords } from '@/lib/inspection/judged-words';
import { roleWords } from '@/lib/inspection/roles';
import { AmendForm } from './amend-form';
import { amendmentsOf, currentBody } from './current-body';
import { EntryNotHere } from './entry-not-here';
import { entryTitle } from './entry-title';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { JudgedBody } from './judged-body';
import { JudgedPanel } from './judged-panel';
import { LiftHold } from './lift-hold';
import { readByWords, waitsWordsOf } from './measurer-words';
import { nameOf, type OpenSheet } from './open-sheet';
import { QueryParts } from './query-parts';
import { Screen } from './screen';
import { clockOff } from './sync-words';
import { findReading } from './use-keep-reading';

function backOf(open: OpenSheet, entry: Entry) {
  const { pourId } = open.sheet;
  switch (entry.type) {
    case 'reading':
      return { href: fieldPaths.face(pourId, entry.body.faceId), words: 'the face' };
    case 'answer': {
      const item = open.sheet.plan.checklist.items.find((one) => one.id === entry.body.checkId);
      return { href: fieldPaths.checks(pourId, item?.group), words: 'the checks' };
    }
    case 'measurement':
      return { href: fieldPaths.measurements(pourId, entry.body.itemId), words: 'the measurement' };
    case 'nonconformance':
      return { href: fieldPaths.nonconformanceShown(pourId, entry.id), words: 'the nonconformance' };
    default:
      return { href: fieldPaths.pour(pourId), words: open.pour.number };
  }
}

const whoAmends = (open: OpenSheet, entry: EntryOf<'reading'>): string =>
  [...new Set([measurerOf(entry), entry.authorId])].map((id) => nameOf(open, id)).join(' and ');

/** How a measured place or a check was judged, where this entry is one. */
function judgedOf({ sheet }: OpenSheet, entry: Entry): JudgedWords | null {
  if (entry.type === 'measurement') {
    const state = sheet.measurements.find((one) => one.item.id === entry.body.itemId);
    const place = state?.places.find((one) => one.entry.id === entry.id);
    return state && place?.current ? judgedMeasurement(state.item, place, sheet.plan.units) : null;
  }
  if (entry.type === 'answer') {
    const check = sheet.checks.find((one) => one.item.id === entry.body.checkId);
    return check ? judgedCheck(check) : null;
  }
  return null;
}

/** One entry of the record: what it says, what has been said of it since, and what you may do about it. */
export function EntryScreen({ open, entryId }: { open: OpenSheet; entryId: string }) {
  const { sheet, project, person } = open;
  const entry = sheet.entries.find((one) => one.id === entryId);
  if (!entry) {
    return (
      <Screen title="Entry" back={{ href: fieldPaths.pour(sheet.pourId), words: open.pour.number }}>
        <EntryNotHere id={entryId} what="entry" />
      </Screen>
    );
  }
  const amendments = amendmentsOf(sheet, entry.id);
  const current = currentBody(sheet, entry);
  const withdrawn = current === null;
  const found = entry.type === 'reading' ? findReading(open, entry.id) : null;
  const judged = judgedOf(open, entry);
  const own = mayAmend(entry, person.id, project.role);
  const waits = found && waitsWordsOf(open, found.reading);
  const clock = clockOff(entry.clockOffsetMs);
  return (
    <Screen title="Entry" aside={open.pour.number} back={backOf(open, entry)} form>
      <div className="grid gap-5">
        <article className="grid gap-2 border border-ink bg-sheet p-3">
          <h2 className={classNames('text-heading', withdrawn && 'line-through')}>
            {entryTitle(entry, sheet)}
          </h2>
          <p className="text-label text-pencil">
            {nameOf(open, entry.authorId)}, {roleWords[entry.authorRole].toLowerCase()} ·{' '}
            {dayAndTime(entry.recordedAt, project.timeZone)}
            {entry.seq === null ? ' · not sent yet' : ` · entry ${entry.seq}`}
          </p>
          {entry.type === 'reading' && entry.body.measurer && (
            <p className="font-label text-label font-semibold">
              Read by {readByWords(open, entry)}
              {waits && <span className="text-watch"> · {waits}</span>}
            </p>
          )}
          {clock && (
            <p className="font-label text-label font-semibold text-watch">
              Recorded while the device&apos;s clock was {clock}: its times are doubtful, its order is not.
            </p>
          )}
          {amendments.map((amendment) => {
            const applied = found?.reading.amendments.find((one) => one.entry.id === amendment.id);
            return (
              <p key={amendment.id} className="border-l-4 border-rule pl-2">
                <b>{amendment.body.replacement === null ? 'Withdrawn' : 'Amended'}</b>:{' '}
                {amendment.body.reason}
                {applied?.problem && <span className="block font-semibold text-hold">{applied.problem}</span>}
                <span className="block text-label text-pencil">
                  {nameOf(open, amendment.authorId)} · {dayAndTime(amendment.recordedAt, project.timeZone)}
                </span>
              </p>
            );
          })}
        </article>
        {found && (
          <section className="border border-ink bg-sheet p-3">
            <h2 className="mb-2 text-heading">How was this judged?</h2>
            <JudgedPanel
              reading={found.reading}
              plan={sheet.plan}
              unit={sheet.plan.units}
              instrument={
                sheet.instruments.find((one) => one.instrumentId === found.reading.entry.body.instrumentId) ??
                null
              }
            />
          </section>
        )}
        {judged && (
          <section className="border border-ink bg-sheet p-3">
            <h2 className="mb-2 text-heading">How was this judged?</h2>
            <JudgedBody judged={judged} />
          </section>
        )}
        {entry.type === 'hold' && <LiftHold open={open} hold={entry} />}
        <QueryParts open={open} entry={entry} />
        {isAmendable(entry.type) && own && current && mayRecord('amendment', project.role) && (
          <AmendForm open={open} entry={entry} current={current} />
        )}
        {isAmendable(entry.type) && !own && (
          <p className="px-1 text-label text-pencil">
            Only {entry.type === 'reading' ? whoAmends(open, entry) : nameOf(open, entry.authorId)} can amend
            this. You can ask about it; it then holds until answered.
          </p>
        )}
      </div>
    </Screen>
  );
}
