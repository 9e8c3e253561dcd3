'use client';

import type { DevicePour } from '@/lib/device/device-types';
import { Disclosure } from './disclosure';
import { entryTitle } from './entry-title';
import { dayAndTime } from './field-time';
import { useOpenPour } from './use-device';

/** What of one pour waits to be sent, entry by entry. */
export function WaitingPour({ pour }: { pour: DevicePour }) {
  const open = useOpenPour(pour.id);
  const recorded = open?.sheet?.entries ?? open?.crew?.own ?? [];
  const waiting = recorded.filter((entry) => entry.seq === null);
  return (
    <li className="border-b border-rule px-3">
      <Disclosure summary={`${pour.number} ${pour.title}: ${pour.notSent} not sent`}>
        <ul className="pb-3">
          {waiting.map((entry) => (
            <li key={entry.id} className="border-t border-rule py-1.5">
              {entryTitle(entry, open?.sheet ?? null)}
              <span className="block text-label text-pencil">
                {open && dayAndTime(entry.recordedAt, open.project.timeZone)}
              </span>
            </li>
          ))}
          {waiting.length < pour.notSent && (
            <li className="border-t border-rule py-1.5 text-label text-pencil">
              {pour.notSent - waiting.length} more of the project or of an earlier plan.
            </li>
          )}
        </ul>
      </Disclosure>
    </li>
  );
}
