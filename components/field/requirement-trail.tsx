'use client';

import type { Plan } from '@/lib/inspection/plan';

const provenance = {
  contract: 'contract documents',
  seen: 'text seen',
  'partly-seen': 'text partly seen',
  memory: 'from memory',
  computed: 'computed',
  'common-practice': 'common practice',
} as const;

type Step = Plan['measurements'][number]['trail'][number];

/** How a limit came about, step by step: rule, clause, edition, number, and where it comes from. */
export function RequirementTrail({ trail }: { trail: readonly Step[] }) {
  if (trail.length === 0) return <p className="text-pencil">The plan gives no steps for this limit.</p>;
  return (
    <ol className="border-y border-rule">
      {trail.map((step, index) => (
        <li
          key={index}
          className="grid grid-cols-[1fr_auto] gap-x-3 border-b border-rule py-2 last:border-b-0"
        >
          <span className="font-label font-semibold">{step.rule}</span>
          <span className="text-right font-figure font-medium">{step.value}</span>
          <span className="col-span-2 text-label text-pencil">
            {[step.clause, step.edition, provenance[step.provenance], step.note].filter(Boolean).join(' · ')}
          </span>
        </li>
      ))}
    </ol>
  );
}
