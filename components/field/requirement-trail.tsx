'use client';

import { ToneGlyph } from '@/components/ui/tone-glyph';
import { needsEditionCheck, stepSource } from '@/lib/concrete/trail';
import type { TrailStep } from '@/lib/inspection/trail-step';

/** How a limit came about, step by step: rule, clause, edition, number, and where it comes from. */
export function RequirementTrail({ trail }: { trail: readonly TrailStep[] }) {
  if (trail.length === 0) return <p className="text-pencil">The plan gives no steps for this limit.</p>;
  return (
    <>
      <ol className="border-y border-rule">
        {trail.map((step, index) => (
          <li
            key={index}
            className="flex flex-wrap items-baseline justify-between gap-x-3 border-b border-rule py-2 last:border-b-0"
          >
            <span className="min-w-0 flex-1 basis-48 font-label font-semibold">{step.rule}</span>
            <span className="ml-auto min-w-0 text-right font-figure font-medium">{step.value}</span>
            <span className="w-full text-label text-pencil">{stepSource(step)}</span>
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
