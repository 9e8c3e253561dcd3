import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import type { Requirement } from '@/lib/inspection/plan';
import { TrailSteps } from './trail-steps';

/** How a requirement was found, step by step, with the code's minimum beside it and what to be careful about. */
export function RequirementTrail({
  requirement,
  units,
  open = false,
  onToggle,
}: {
  requirement: Requirement;
  units: LengthUnit;
  open?: boolean;
  onToggle?: (open: boolean) => void;
}) {
  return (
    <details
      open={open || undefined}
      onToggle={onToggle ? (event) => onToggle(event.currentTarget.open) : undefined}
      className="text-body print:not-open:hidden"
    >
      <summary className="min-h-6 w-fit font-label text-label font-semibold text-chalk">
        Where these limits come from
      </summary>
      <TrailBody requirement={requirement} units={units} />
    </details>
  );
}

/** The trail itself: rule, clause and edition, value, provenance. */
export function TrailBody({ requirement, units }: { requirement: Requirement; units: LengthUnit }) {
  return (
    <div className="grid gap-2 py-2">
      {requirement.warnings.map((warning) => (
        <p key={warning} className="border-l-[6px] border-watch pl-3 text-watch">
          {warning}
        </p>
      ))}
      <TrailSteps trail={requirement.trail} />
      {requirement.codeMinimumMm !== null && (
        <p className="text-pencil">
          Code minimum for comparison: {formatLength(requirement.codeMinimumMm, units)} {units}. The contract
          documents and the local code govern.
        </p>
      )}
    </div>
  );
}
