'use client';

import { EmptyState } from '@/components/ui/empty-state';
import { classNames } from '@/components/ui/class-names';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { mayRecord } from '@/lib/inspection/entry-access';
import { roles, roleWords, type Role } from '@/lib/inspection/roles';
import type { Hold } from '@/lib/inspection/sheet-types';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { holdPath } from './hold-path';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { MarkIcon } from '@/components/drawings/mark';
import { toneText } from '@/components/ui/tone';

/** What stands between this pour and the concrete, by who clears it: your own first, each one tap from its work. */
export function HoldsScreen({ open }: { open: OpenSheet }) {
  const { holds, pour, project, sheet } = open;
  const section = (role: Role) => {
    const ofRole = holds.filter((hold) => hold.clearedBy === role);
    if (ofRole.length === 0) return null;
    return (
      <section key={role} className="grid gap-1.5">
        <h2 className="flex items-baseline justify-between px-1 text-heading">
          {role === project.role ? `You, as ${roleWords[role].toLowerCase()}` : roleWords[role]}
          <span className="font-label text-label font-medium text-pencil">{ofRole.length}</span>
        </h2>
        <ul className="border border-ink bg-sheet">
          {ofRole.map((hold) => (
            <HoldLine key={hold.id} open={open} hold={hold} />
          ))}
        </ul>
      </section>
    );
  };
  const own = section(project.role);
  const others = roles
    .filter((role) => role !== project.role)
    .map(section)
    .filter((one) => one !== null);
  return (
    <Screen
      title={`${pour.number} holds`}
      aside={holds.length === 0 ? 'none' : `${holds.length} stand`}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
    >
      {holds.length === 0 ? (
        <EmptyState title="No hold stands">
          At the points read and for the items checked. The release is still given in the office.
        </EmptyState>
      ) : (
        <div
          className={classNames('grid gap-6', own && others.length > 0 && 'md:grid-cols-2 md:items-start')}
        >
          {own}
          {others.length > 0 && <div className="grid gap-6">{others}</div>}
        </div>
      )}
    </Screen>
  );
}

const correctable: readonly Hold['kind'][] = [
  'cover-not-met',
  'effective-depth',
  'measurement-out',
  'bar-departs',
  'check-not-met',
  'nonconformance-open',
];

function HoldLine({ open, hold }: { open: OpenSheet; hold: Hold }) {
  const { sheet, project } = open;
  // A correction of a face puts right what was seen failing on it: one report for all points of the hold.
  const subject =
    hold.faceId && hold.subjects.length > 1 ? ({ kind: 'face', id: hold.faceId } as const) : hold.subjects[0];
  const report = subject && correctable.includes(hold.kind) && mayRecord('correction', project.role);
  return (
    <li className="border-b border-rule last:border-b-0">
      <FieldLink
        href={holdPath(hold, sheet)}
        className="grid min-h-target grid-cols-[1.5rem_1fr] gap-x-2 px-3 py-2.5 hover:bg-paper/60"
      >
        <HoldMark kind={hold.kind} />
        <span className="min-w-0">
          <span className="block font-label text-lead font-semibold">{hold.title}</span>
          <span className="block text-label text-pencil">
            {hold.where}
            {hold.since && ` · since ${dayAndTime(hold.since, project.timeZone)}`}
          </span>
          {hold.detail && <span className="block text-label text-pencil">{hold.detail}</span>}
          <span className="block text-label">{hold.need}</span>
        </span>
      </FieldLink>
      {report && (
        <FieldLink
          href={fieldPaths.correction(sheet.pourId, subject)}
          className="flex min-h-target items-center justify-end border-t border-rule px-3 font-label font-semibold text-chalk underline underline-offset-4"
        >
          Report the correction
        </FieldLink>
      )}
    </li>
  );
}

const wrong: readonly Hold['kind'][] = [
  ...correctable,
  'conflict',
  'superseded-drawing',
  'mix-changed',
  'manual',
  'update-needed',
];
const awaited: readonly Hold['kind'][] = [
  'disposition-awaited',
  'recheck-awaited',
  'condition-not-verified',
  'query-open',
  'verbal-instruction',
];

/** Something is wrong, somebody is waited for, or it is only not done yet: by shape, beside the words. */
function HoldMark({ kind }: { kind: Hold['kind'] }) {
  if (kind === 'not-verified') return <MarkIcon kind="not-verified" className="mt-1" />;
  const tone = wrong.includes(kind) ? 'hold' : awaited.includes(kind) ? 'watch' : 'plain';
  return <ToneGlyph tone={tone} className={`mt-1 ${toneText[tone]}`} />;
}
