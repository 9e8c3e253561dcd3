'use client';

import { useEffect, useState } from 'react';
import type { BodyOf, Entry } from '@/lib/inspection/entry';
import type { PointState, ReadingState } from '@/lib/inspection/sheet-types';
import { problemsOf } from './problems-of';
import type { OpenSheet } from './open-sheet';
import { signalVerdict } from './signal-verdict';
import { useDevice } from './use-device';
import { forgetAsked } from './use-refused-again';

const UNDO_MS = 10_000;
export const UNDO_REASON = 'undone within ten seconds';

export interface Kept {
  entryId: string;
  /** Still within ten seconds. */
  undoable: boolean;
}

/** Finds a reading, with its place, by the id of its entry. */
export function findReading(
  open: Pick<OpenSheet, 'sheet'>,
  entryId: string,
): { point: PointState; reading: ReadingState } | null {
  for (const face of open.sheet.faces) {
    for (const point of [...face.points, ...face.spots]) {
      const reading = point.readings.find((one) => one.entry.id === entryId);
      if (reading) return { point, reading };
    }
  }
  return null;
}

/**
 * Keeps readings one by one, says their verdict, and takes the last one back within ten seconds.
 * @param again the refused reading that the first one kept stands for: it leaves the tray with it
 */
export function useKeepReading(open: OpenSheet, sound: boolean, again: Entry | null = null) {
  const device = useDevice();
  const [standsFor, setStandsFor] = useState(again);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const [kept, setKept] = useState<Kept | null>(null);
  const at = { projectId: open.project.id, pourId: open.sheet.pourId };

  useEffect(() => {
    if (!kept?.undoable) return;
    const timer = setTimeout(() => setKept({ ...kept, undoable: false }), UNDO_MS);
    return () => clearTimeout(timer);
  }, [kept]);

  const keep = async (body: BodyOf<'reading'>): Promise<boolean> => {
    setBusy(true);
    setProblem(null);
    try {
      const entry = await device.record(at, 'reading', body);
      if (standsFor) {
        setStandsFor(null);
        forgetAsked();
        await device.forgetRefused(standsFor.id).catch(() => undefined);
      }
      setKept({ entryId: entry.id, undoable: true });
      const sheet = device.pour(at.pourId)?.sheet;
      const found = sheet ? findReading({ sheet }, entry.id) : null;
      if (found) {
        const depthLow = found.reading.depth?.verdict === 'not-met';
        const { judged, onceConfirmed } = found.reading;
        signalVerdict(depthLow ? 'not-met' : (onceConfirmed ?? judged).verdict, sound);
      }
      return true;
    } catch (error) {
      const problems = problemsOf(error);
      setProblem(Object.values(problems)[0] ?? null);
      return false;
    } finally {
      setBusy(false);
    }
  };

  const undo = async (): Promise<PointState | null> => {
    const found = kept ? findReading(open, kept.entryId) : null;
    if (!kept || !found) return null;
    setBusy(true);
    try {
      await device.record(at, 'amendment', {
        rootId: kept.entryId,
        sawAmendmentId: found.reading.amendments.at(-1)?.entry.id ?? null,
        reason: UNDO_REASON,
        replacement: null,
        photoId: null,
      });
      setKept(null);
      return found.point;
    } catch (error) {
      setProblem(Object.values(problemsOf(error))[0] ?? null);
      return null;
    } finally {
      setBusy(false);
    }
  };

  return { busy, problem, kept, keep, undo, say: setProblem };
}
