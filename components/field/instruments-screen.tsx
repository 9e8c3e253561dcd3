'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText } from '@/components/ui/tone';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { InstrumentState } from '@/lib/inspection/sheet-types';
import { BlockCheckForm } from './block-check-form';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { InstrumentForm } from './instrument-form';
import { instrumentKindWords, instrumentStanding } from './instrument-words';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { useSnapshot } from './use-device';
import { useNow } from './use-now';
import { useRefusedAgain } from './use-refused-again';
import { blockCheckPasses } from '@/lib/inspection/instruments';
import { formatInstant } from '@/components/ui/format-instant';

/** The instruments of the project: how each stands, its block checks, and a new one. */
export function InstrumentsScreen({ open }: { open: OpenSheet }) {
  const { sheet, pour, project } = open;
  const { sync } = useSnapshot();
  const nowMs = useNow();
  const again = { check: useRefusedAgain('block-check'), added: useRefusedAgain('instrument-status') };
  const [adding, setAdding] = useState(again.added !== null);
  const [checking, setChecking] = useState<InstrumentState | null>(
    () => sheet.instruments.find((one) => one.instrumentId === again.check?.body.instrumentId) ?? null,
  );
  const at = {
    now: new Date(nowMs).toISOString(),
    timeZone: project.timeZone,
    clockOffsetMs: sync.clockOffsetMs,
  };
  return (
    <Screen
      title="Instruments"
      aside={project.name}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
      form
    >
      <div className="grid gap-4 md:grid-cols-2 md:items-start">
        {sheet.instruments.length === 0 && (
          <EmptyState title="No instrument yet">
            Add the tape or gauge in your hand. Readings without a known instrument are not verified.
          </EmptyState>
        )}
        {sheet.instruments.map((state) => (
          <InstrumentCard
            key={state.instrumentId}
            state={state}
            standing={instrumentStanding(state, at)}
            timeZone={project.timeZone}
            onCheck={mayRecord('block-check', project.role) ? () => setChecking(state) : null}
          />
        ))}
        {mayRecord('instrument-status', project.role) && (
          <Button wide className="min-h-15 md:col-span-2" onClick={() => setAdding(true)}>
            Add an instrument
          </Button>
        )}
      </div>
      <Dialog open={adding} title="Add an instrument" onClose={() => setAdding(false)}>
        <InstrumentForm open={open} onKept={() => setAdding(false)} />
      </Dialog>
      <Dialog
        open={checking !== null}
        title={`Block check of ${checking?.name ?? ''}`}
        onClose={() => setChecking(null)}
      >
        {checking && <BlockCheckForm open={open} state={checking} onKept={() => setChecking(null)} />}
      </Dialog>
    </Screen>
  );
}

function InstrumentCard({
  state,
  standing,
  timeZone,
  onCheck,
}: {
  state: InstrumentState;
  standing: ReturnType<typeof instrumentStanding>;
  timeZone: string;
  onCheck: (() => void) | null;
}) {
  const body = state.status?.body;
  return (
    <article className="grid gap-2 border border-ink bg-sheet p-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-3">
        <h2 className="text-lead">{state.name}</h2>
        <p className={`inline-flex items-center gap-1.5 font-label font-semibold ${toneText[standing.tone]}`}>
          <ToneGlyph tone={standing.tone} /> {standing.words}
        </p>
      </div>
      {body && (
        <p className="text-label text-pencil">
          {[
            instrumentKindWords[body.kind],
            body.serial ? `no. ${body.serial}` : '',
            body.calibrationDue
              ? `calibration due ${formatInstant(body.calibrationDue, timeZone, 'date')}`
              : '',
            body.uncertaintyMm !== null ? `U = ${body.uncertaintyMm} mm (k = 2)` : 'uncertainty not known',
          ]
            .filter(Boolean)
            .join(' · ')}
        </p>
      )}
      {state.suspect.some((window) => window.to === null) && (
        <p className="font-semibold text-hold">
          Readings since its last good check are not verified, in every pour. Read them again with another
          instrument.
        </p>
      )}
      {state.blockChecks.length > 0 && (
        <ul className="border-y border-rule text-label">
          {state.blockChecks
            .toReversed()
            .slice(0, 4)
            .map((check) => (
              <li
                key={check.id}
                className="flex justify-between gap-2 border-b border-rule py-1 last:border-b-0"
              >
                <span>
                  {dayAndTime(check.body.at, timeZone)}, {check.body.when} of shift
                </span>
                <span
                  className={`font-figure ${blockCheckPasses(check.body) ? '' : 'font-semibold text-hold'}`}
                >
                  {check.body.readMm} on {check.body.blockMm} mm
                </span>
              </li>
            ))}
        </ul>
      )}
      {onCheck && body?.kind !== 'block' && <Button onClick={onCheck}>Block check</Button>}
    </article>
  );
}
