'use client';

import { PlanText } from './plan-field';

/** What the pour is and when; of a revision only the reason. */
export function PourFields({ revises, timeZone }: { revises: boolean; timeZone: string }) {
  const reason = (
    <PlanText
      path="reason"
      label={revises ? 'Reason for the revision' : 'Reason'}
      hint={revises ? 'It stands in the record with the revision' : undefined}
      className="sm:col-span-2"
    />
  );
  if (revises) return <div className="grid gap-3 sm:grid-cols-2">{reason}</div>;
  return (
    <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
      <PlanText path="number" label="Pour number" hint="P-014" />
      <PlanText path="title" label="Title" hint="Quay deck, bay 3" />
      <PlanText path="location" label="Location" hint="Level, grid lines" />
      <PlanText
        path="plannedAt"
        label="Planned start of placing"
        hint={`Time of ${timeZone.replaceAll('_', ' ')}`}
        type="datetime-local"
        optional
      />
      {reason}
    </div>
  );
}
