'use client';

import { MarkIcon } from '@/components/drawings/mark';
import type { LengthUnit } from '@/lib/concrete/length';
import { markOfReading } from '@/lib/inspection/judge-point';
import { judgedReading } from '@/lib/inspection/judged-words';
import type { Plan } from '@/lib/inspection/plan';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import type { InstrumentState, ReadingState } from '@/lib/inspection/sheet-types';
import { JudgedBody } from './judged-body';
import { verdictWords } from './verdict-words';

/** How one reading was judged: the arithmetic, the rule, the instrument, and the trail of the requirement. */
export function JudgedPanel({
  reading,
  plan,
  instrument,
  unit,
}: {
  reading: ReadingState;
  plan: Plan;
  instrument: InstrumentState | null;
  unit: LengthUnit;
}) {
  const { judged } = reading;
  return (
    <div className="grid gap-4">
      <p className="flex items-center gap-2 font-label text-lead font-semibold">
        <MarkIcon kind={markOfReading(judged)} />
        {readingText(bodyShown(reading))}: {verdictWords(judged)}
      </p>
      <JudgedBody judged={judgedReading(reading, plan, instrument, unit)} />
    </div>
  );
}
