'use client';

import { useState } from 'react';
import { v7 as uuid } from 'uuid';
import type { ButtonVariant } from '@/components/ui/button-classes';
import { ActionDialog } from './action-dialog';
import { EntryForm } from './entry-form';
import {
  blockCheckAction,
  drawingReceivedAction,
  instrumentAction,
  mixChangedAction,
  type ListedInstrument,
} from './project-actions';
import { recordInProject } from './record-in-project';

export interface ProjectPlace {
  projectId: string;
  authorId: string;
  /** Head of the project's own stream when the page was drawn. */
  seenSeq: number;
  now: string;
  timeZone: string;
}

/** A button that records one thing of the project: a drawing, a mix, an instrument, a block check. */
export function ProjectEntry({
  kind,
  instrument = null,
  mixes = [],
  at,
  variant,
}: {
  kind: 'drawing' | 'mix' | 'instrument' | 'block-check';
  instrument?: ListedInstrument | null;
  /** Names of the mixes known so far, of which a new one may replace one. */
  mixes?: readonly string[];
  at: ProjectPlace;
  variant?: ButtonVariant;
}) {
  const [newId, setNewId] = useState(() => uuid());
  const action =
    kind === 'drawing'
      ? drawingReceivedAction(at.now, at.timeZone)
      : kind === 'mix'
        ? mixChangedAction(mixes)
        : kind === 'block-check' && instrument
          ? blockCheckAction(instrument, at.now, at.timeZone)
          : instrumentAction(instrument, newId, at.timeZone);
  return (
    <ActionDialog
      label={action.label}
      accessibleLabel={instrument ? `${action.label}: ${instrument.name}` : undefined}
      title={action.title}
      variant={variant}
    >
      {(close) => (
        <EntryForm
          send={(type, body) => recordInProject(at, type, body)}
          action={action}
          onDone={() => {
            setNewId(uuid());
            close();
          }}
        />
      )}
    </ActionDialog>
  );
}
