'use client';

import { useCallback, useState } from 'react';
import type { LengthUnit } from '@/lib/concrete/length';
import type { BodyOf } from '@/lib/inspection/entry';
import { otherMeasurers } from '@/lib/inspection/measurers';
import type { Face, Requirement } from '@/lib/inspection/plan';
import type { InstrumentState } from '@/lib/inspection/sheet-types';
import type { OpenSheet } from './open-sheet';
import { keepSettings, readSettings, type ReadingSettings } from './remembered';

/** Steel that has no requirement on the face: its readings are indicative only. */
export const OTHER_STEEL = 'other';

export interface ReadingSetup {
  settings: ReadingSettings;
  change: (part: Partial<ReadingSettings>) => void;
  unit: LengthUnit;
  /** Null: steel without a requirement here. */
  requirement: Requirement | null;
  steel: string;
  instrument: InstrumentState | null;
  /** Who reads, where another than the person on the device does; null: they do. */
  measurer: { id: string; name: string } | null;
  /** Everybody else of the project who may be named as having read. */
  measurers: readonly { id: string; name: string }[];
  isBlock: boolean;
  blockMm: number;
}

/**
 * Instrument, steel, unit and measurer of the next reading: chosen once, kept until changed.
 * @param first a reading that was refused: it is read with the same instrument, to the same steel, once more
 */
export function useReadingSettings(
  open: OpenSheet,
  face: Face,
  first: BodyOf<'reading'> | null = null,
): ReadingSetup {
  const projectId = open.project.id;
  const [settings, setSettings] = useState(() => {
    const kept = readSettings(projectId);
    if (!first) return kept;
    const steel = { ...kept.steel, [face.id]: first.requirementId ?? OTHER_STEEL };
    const readBy = first.measurer && { typistId: open.person.id, personId: first.measurer.personId };
    return { ...kept, steel, readBy, instrumentId: first.instrumentId ?? kept.instrumentId };
  });
  const change = useCallback(
    (part: Partial<ReadingSettings>) =>
      setSettings((before) => {
        const after = { ...before, ...part };
        keepSettings(projectId, after);
        return after;
      }),
    [projectId],
  );
  const inService = open.sheet.instruments.filter((one) => one.status?.body.inService);
  const only = inService.length === 1 ? inService[0] : undefined;
  const instrument = inService.find((one) => one.instrumentId === settings.instrumentId) ?? only ?? null;
  const measurers = otherMeasurers(open.project.people, open.person.id);
  const { readBy } = settings;
  const named = readBy?.typistId === open.person.id ? readBy.personId : null;
  const chosen = settings.steel[face.id];
  const requirement =
    chosen === OTHER_STEEL
      ? null
      : (face.requirements.find((one) => one.id === chosen) ?? face.requirements[0] ?? null);
  return {
    settings,
    change,
    unit: settings.unit ?? open.sheet.plan.units,
    requirement,
    steel: requirement?.steel ?? 'other steel',
    instrument,
    measurer: measurers.find((one) => one.id === named) ?? null,
    measurers,
    isBlock: instrument?.status?.body.kind === 'block',
    blockMm: settings.blockMm ?? requirement?.leastAcceptedMm ?? 40,
  };
}
