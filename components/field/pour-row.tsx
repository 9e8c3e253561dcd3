'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText } from '@/components/ui/tone';
import type { DevicePour } from '@/lib/device/device-types';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { pourStateWords } from '@/lib/inspection/pour-state';
import { problemsOf } from './problems-of';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime, timeAway } from './field-time';
import { pourStateTone } from './state-tone';
import { useDevice, useSnapshot } from './use-device';
import { useNow } from './use-now';

/** One pour of the list: what it is, when it is planned, how it stands, what waits, and whether it is kept here. */
export function PourRow({
  pour,
  choosing,
  timeZone,
}: {
  pour: DevicePour;
  /** The person chooses what is kept on the device. */
  choosing: boolean;
  timeZone: string;
}) {
  const device = useDevice();
  const { sync } = useSnapshot();
  const now = useNow();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const tone = pourStateTone[pour.state];
  const newer = pour.kept && pour.serverPlanRevision > pour.planRevision;

  const change = async (how: (pourId: string) => Promise<void>) => {
    setBusy(true);
    setProblem(null);
    try {
      await how(pour.id);
    } catch (error) {
      setProblem(problemsOf(error)[''] ?? 'That did not work. Try again.');
    } finally {
      setBusy(false);
    }
  };

  const facts = (
    <>
      <span className="flex flex-wrap items-baseline justify-between gap-x-3">
        <span className="font-label text-lead font-semibold">
          {pour.number} {pour.title}
        </span>
        <span className={`inline-flex items-center gap-1.5 font-label font-semibold ${toneText[tone]}`}>
          <ToneGlyph tone={tone} />
          {pourStateWords[pour.state]}
          {pour.holds > 0 && ` · ${pour.holds}`}
        </span>
      </span>
      <span className="block text-label text-pencil">{pour.location}</span>
      <span className="block font-label text-label font-medium">
        {pour.plannedAt
          ? `${dayAndTime(pour.plannedAt, timeZone)} · ${timeAway(pour.plannedAt, now)}`
          : 'No time planned yet'}
        {pour.notSent > 0 && <span className="font-semibold"> · {pour.notSent} not sent</span>}
      </span>
    </>
  );
  return (
    <li className="border-b border-rule last:border-b-0">
      {pour.kept ? (
        <FieldLink href={fieldPaths.pour(pour.id)} className="block min-h-target px-3 py-3 hover:bg-paper/60">
          {facts}
        </FieldLink>
      ) : (
        <div className="px-3 pt-3">{facts}</div>
      )}
      {newer && (
        <p className="flex items-start gap-2 px-3 pb-2 font-label text-label font-semibold text-watch">
          <ToneGlyph tone="watch" className="mt-0.5 shrink-0" />
          Plan rev {revisionLetter(pour.serverPlanRevision)} is on the server; this device has{' '}
          {pour.planRevision === 0 ? 'none yet' : `rev ${revisionLetter(pour.planRevision)}`}.{' '}
          {sync.phase === 'fetching' ? 'It is being fetched.' : 'It is fetched when there is a network.'}
        </p>
      )}
      {problem && (
        <p role="alert" className="px-3 pb-2 font-label text-label font-semibold text-hold">
          {problem}
        </p>
      )}
      {choosing && (
        <div className="flex justify-end px-1">
          {pour.kept ? (
            <Button
              variant="quiet"
              busy={busy}
              disabled={pour.notSent > 0}
              title={pour.notSent > 0 ? 'It holds entries that are not sent yet.' : undefined}
              onClick={() => change((id) => device.dropPour(id))}
            >
              {pour.notSent > 0 ? 'Stays here until all is sent' : 'Take off this device'}
            </Button>
          ) : (
            <Button variant="quiet" busy={busy} onClick={() => change((id) => device.keepPour(id))}>
              Keep on this device
            </Button>
          )}
        </div>
      )}
    </li>
  );
}
