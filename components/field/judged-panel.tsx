'use client';

import { MarkIcon } from '@/components/drawings/mark';
import { formatLength, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { isOtherBar, limitsFor, markOfReading } from '@/lib/inspection/judge-point';
import type { Plan } from '@/lib/inspection/plan';
import type { InstrumentState, ReadingState } from '@/lib/inspection/sheet-types';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import { RequirementTrail } from './requirement-trail';
import { verdictWords } from './verdict-words';

const ruleWords = (rule: Plan['decisionRule'], uncertaintyMm: number | null) => {
  if (rule.kind === 'simple')
    return 'Simple acceptance: met when it is at or inside the limit. Uncertainty is only a flag.';
  const guard = rule.guardMm ?? uncertaintyMm;
  return `Guarded acceptance: met when it is inside the limit by ${guard === null ? "the instrument's uncertainty" : `${formatLength(guard, 'mm')} mm`}.`;
};

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
  const body = bodyShown(reading);
  const { requirement, judged } = reading;
  const limits = requirement && limitsFor(requirement, body.asFoundBar);
  const otherBar = requirement !== null && isOtherBar(requirement, body.asFoundBar);
  const mm = body.value?.mm ?? null;
  const uncertainty = instrument?.status?.body.uncertaintyMm ?? null;
  return (
    <div className="grid gap-4">
      <p className="flex items-center gap-2 font-label text-lead font-semibold">
        <MarkIcon kind={markOfReading(judged)} />
        {readingText(body)}: {verdictWords(judged)}
      </p>
      <p>{judged.reason}</p>
      {otherBar && (
        <p className="font-semibold text-watch">
          Bar {body.asFoundBar} found, {requirement?.barDesignation} planned: judged by the stricter of the
          two.
        </p>
      )}
      {limits && mm !== null && (
        <table className="w-full border-collapse font-figure text-body">
          <tbody>
            <Line label="read" value={withUnit(mm, unit, limits.leastAcceptedMm)} />
            <Line label="least accepted" value={withUnit(limits.leastAcceptedMm, unit, mm)} />
            <Line label="difference" value={withUnit(mm - limits.leastAcceptedMm, unit, 0)} strong />
            {limits.mostAcceptedMm !== null && (
              <Line label="most accepted" value={withUnit(limits.mostAcceptedMm, unit, mm)} />
            )}
            {uncertainty !== null && (
              <Line label="uncertainty U (k = 2)" value={withUnit(uncertainty, 'mm')} />
            )}
          </tbody>
        </table>
      )}
      <p className="text-label text-pencil">
        {ruleWords(plan.decisionRule, uncertainty)} Compared unrounded; limits belong to what is accepted.
      </p>
      {requirement && (
        <section className="grid gap-1">
          <h3 className="font-label font-semibold">The requirement: {requirement.steel}</h3>
          {requirement.warnings.map((warning) => (
            <p key={warning} className="text-label font-semibold text-watch">
              {warning}
            </p>
          ))}
          <RequirementTrail trail={requirement.trail} />
        </section>
      )}
      {reading.depth && requirement?.depth && (
        <section className="grid gap-1">
          <h3 className="font-label font-semibold">Effective depth, judged apart from cover</h3>
          <p>{reading.depth.reason}</p>
          <RequirementTrail trail={requirement.depth.trail} />
        </section>
      )}
      <p className="text-label text-pencil">
        The contract documents and the local code govern. This is at the point read, and nothing more.
      </p>
    </div>
  );
}

function Line({ label, value, strong }: { label: string; value: string; strong?: boolean }) {
  return (
    <tr className={strong ? 'border-y border-ink font-semibold' : 'border-b border-rule'}>
      <th scope="row" className="py-1.5 text-left font-label font-medium">
        {label}
      </th>
      <td className="py-1.5 text-right whitespace-nowrap">{value}</td>
    </tr>
  );
}
