'use client';

import { useCallback, useState } from 'react';
import type { BodyOf, Entry } from '@/lib/inspection/entry';
import type { DeviceEntryType, OpenPour } from '@/lib/device/device-types';
import { bodyProblems } from './body-problems';
import { problemsOf, type Problems } from './problems-of';
import { useDevice } from './use-device';
import { forgetAsked } from './use-refused-again';

export interface Recording {
  busy: boolean;
  problems: Problems;
  clearProblems: () => void;
  /** Checks and keeps an entry of this pour; null where it was not kept, and then `problems` says why. */
  record: <T extends DeviceEntryType>(type: T, body: BodyOf<T>) => Promise<Entry | null>;
}

const projectTypes: readonly string[] = [
  'block-check',
  'instrument-status',
  'drawing-received',
  'mix-changed',
  'rules-changed',
];

/**
 * Keeps entries of one pour (or of its project's stream), one at a time, with the problems by field.
 * @param again the refused entry that is recorded again: it leaves the tray once its successor is kept
 */
export function useRecord(open: OpenPour, again: Entry | null = null): Recording {
  const device = useDevice();
  const [busy, setBusy] = useState(false);
  const [problems, setProblems] = useState<Problems>({});
  const projectId = open.project.id;
  const pourId = open.pour.id;

  const record = useCallback(
    async <T extends DeviceEntryType>(type: T, body: BodyOf<T>) => {
      const found = bodyProblems(type, body);
      setProblems(found);
      if (Object.keys(found).length > 0) return null;
      setBusy(true);
      try {
        const stream = projectTypes.includes(type) ? null : pourId;
        const entry = await device.record({ projectId, pourId: stream }, type, body);
        if (again?.type === type) {
          forgetAsked();
          await device.forgetRefused(again.id).catch(() => undefined);
        }
        return entry;
      } catch (error) {
        setProblems(problemsOf(error));
        return null;
      } finally {
        setBusy(false);
      }
    },
    [device, projectId, pourId, again],
  );
  const clearProblems = useCallback(() => setProblems({}), []);
  return { busy, problems, clearProblems, record };
}
