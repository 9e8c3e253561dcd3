import { needsEditionCheck } from '@/lib/concrete/trail';
import type { TrailStep } from '@/lib/inspection/trail-step';
import { provenanceWords } from './state-words';

/** How a number was found, step by step: rule, clause and edition, value, and where it comes from. */
export function TrailSteps({ trail }: { trail: readonly TrailStep[] }) {
  return (
    <>
      <ol className="grid gap-1">
        {trail.map((step, index) => (
          <li
            key={`${index}-${step.rule}`}
            className="grid gap-x-4 border-b border-rule pb-1 sm:grid-cols-[1fr_auto]"
          >
            <span>
              {step.rule}
              <span className="block text-label text-pencil">
                {[...new Set([step.clause, step.edition, provenanceWords[step.provenance]])]
                  .filter(Boolean)
                  .join(', ')}
                {step.note ? `. ${step.note}` : ''}
              </span>
            </span>
            <span className="font-figure font-medium sm:text-right">{step.value}</span>
          </li>
        ))}
      </ol>
      {needsEditionCheck(trail) && (
        <p className="text-pencil">Verify the steps marked as from memory against your edition.</p>
      )}
    </>
  );
}
