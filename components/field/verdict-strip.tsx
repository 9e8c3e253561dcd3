'use client';

import { MarkIcon } from '@/components/drawings/mark';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { toneText } from '@/components/ui/tone';
import type { LengthUnit } from '@/lib/concrete/length';
import { mayRecord } from '@/lib/inspection/entry-access';
import { markOfReading } from '@/lib/inspection/judge-point';
import type { ReadingState } from '@/lib/inspection/sheet-types';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { waitsWordsOf } from './measurer-words';
import type { OpenSheet } from './open-sheet';
import { markTone } from './state-tone';
import { marginWords, verdictWords } from './verdict-words';

const depthWords = { met: 'met', 'not-met': 'not met', 'not-verified': 'not verified' } as const;

/** The verdict of the reading kept last, in mark and word; what can be done where it is not met; undo while it lasts. */
export function VerdictStrip({
  open,
  reading,
  label,
  pointKey,
  governs,
  unit,
  onUndo,
  onAgain,
  onHow,
}: {
  open: OpenSheet;
  reading: ReadingState;
  label: string;
  pointKey: string;
  /** A less favourable reading of the same round that still counts; null where this one does. */
  governs: ReadingState | null;
  unit: LengthUnit;
  /** Null once ten seconds are over. */
  onUndo: (() => void) | null;
  onAgain: () => void;
  onHow: () => void;
}) {
  const { judged } = reading;
  const waits = waitsWordsOf(open, reading);
  const kind = markOfReading(judged);
  // What was typed for another is told at once, though it counts only once they confirm it.
  const typed = reading.onceConfirmed ?? judged;
  const typedKind = markOfReading(typed);
  const about = { kind: 'point', id: pointKey } as const;
  const pourId = open.sheet.pourId;
  return (
    <div className="border-t border-ink bg-sheet">
      <p role="status" className="sr-only">
        {label}: {readingText(bodyShown(reading))}, {verdictWords(typed)}
        {waits && `, ${waits}`}
      </p>
      <div className="flex min-h-target items-stretch">
        <button
          type="button"
          onClick={onHow}
          className="flex min-h-target min-w-0 flex-1 items-center gap-2 py-1 pl-3 text-left leading-tight"
        >
          <MarkIcon kind={kind} size="1.6em" />
          <span className="min-w-0">
            <span className="block font-label font-semibold">
              {label}: {readingText(bodyShown(reading))}{' '}
              <span className={toneText[markTone[typedKind]]}>{verdictWords(typed)}</span>
            </span>
            <span className="line-clamp-2 text-label text-pencil">
              {waits ?? (judged.verdict === 'not-verified' ? judged.reason : marginWords(judged, unit))}
              <span className="ml-2 text-chalk underline underline-offset-4">How judged?</span>
            </span>
          </span>
        </button>
        {onUndo && (
          <Button variant="quiet" onClick={onUndo}>
            Undo
          </Button>
        )}
      </div>
      {governs && (
        <p className="border-t border-rule px-3 py-1.5 text-label font-semibold">
          {readingText(bodyShown(governs))}, read before, still governs. A correction opens the next round.
        </p>
      )}
      {reading.depth && (
        <p className="border-t border-rule px-3 py-1.5 text-label">
          <b className={reading.depth.verdict === 'not-met' ? 'text-hold' : undefined}>
            Effective depth: {depthWords[reading.depth.verdict]}
          </b>{' '}
          {reading.depth.verdict !== 'met' && reading.depth.reason}
        </p>
      )}
      {(typed.verdict === 'not-met' || reading.depth?.verdict === 'not-met') && (
        <div className="border-t border-rule">
          <div className="grid grid-cols-3">
            <FieldLink
              href={fieldPaths.photos(pourId, about)}
              className={buttonClasses('quiet', true, 'border-r-rule text-label')}
            >
              Photo
            </FieldLink>
            {mayRecord('nonconformance', open.project.role) ? (
              <FieldLink
                href={fieldPaths.nonconformance(pourId, about)}
                className={buttonClasses('quiet', true, 'border-r-rule px-1 text-label')}
              >
                Nonconformance
              </FieldLink>
            ) : (
              <span />
            )}
            <Button variant="quiet" wide className="text-label" onClick={onAgain}>
              <span className="leading-tight">
                Read again
                <span className="block text-xs font-medium text-pencil">erases nothing</span>
              </span>
            </Button>
          </div>
        </div>
      )}
    </div>
  );
}
