import { ToneGlyph } from '@/components/ui/tone-glyph';
import { needsEditionCheck, stepSource } from '@/lib/concrete/trail';
import type { TrailStep } from '@/lib/inspection/trail-step';

/** How a number was found, step by step: rule, clause and edition, value, and where it comes from. */
export function TrailSteps({ trail }: { trail: readonly TrailStep[] }) {
  return (
    <>
      <ol className="grid gap-1">
        {trail.map((step, index) => (
          <li
            key={`${index}-${step.rule}`}
            className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-rule pb-1"
          >
            <span className="min-w-0 flex-1 basis-48">
              {step.rule}
              <span className="block text-label text-pencil">{stepSource(step)}</span>
            </span>
            <span className="ml-auto min-w-0 text-right font-figure font-medium">{step.value}</span>
          </li>
        ))}
      </ol>
      {needsEditionCheck(trail) && (
        <p className="flex items-baseline gap-1.5 font-label text-label font-semibold text-watch">
          <ToneGlyph tone="watch" className="shrink-0 translate-y-0.5" />
          Verify against your edition: steps marked as from memory.
        </p>
      )}
    </>
  );
}
