'use client';

import { EmptyState } from '@/components/ui/empty-state';
import { checkGroupWords } from '@/lib/inspection/holds-work';
import { checkGroups } from '@/lib/inspection/plan';
import { CheckCard } from './check-card';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { CheckLines } from './sheet-lines';

/** The checks of one group, each answered by itself; without a group, the groups to choose from. */
export function ChecksScreen({ open, group }: { open: OpenSheet; group: string | null }) {
  const { sheet, pour } = open;
  const back = { href: fieldPaths.pour(sheet.pourId), words: pour.number };
  const known = checkGroups.find((one) => one === group);
  if (!known) {
    return (
      <Screen title={`${pour.number} checks`} back={back}>
        <CheckLines open={open} />
      </Screen>
    );
  }
  const checks = sheet.checks.filter((check) => check.item.group === known);
  const left = checks.filter((check) => check.governing === null).length;
  const groups = checkGroups.filter((one) => sheet.checks.some((check) => check.item.group === one));
  const next = groups[groups.indexOf(known) + 1];
  return (
    <Screen
      title={checkGroupWords[known]}
      aside={`${pour.number} · ${left === 0 ? 'all answered' : `${left} of ${checks.length} open`}`}
      back={back}
      form
    >
      {checks.length === 0 ? (
        <EmptyState title="No checks in this group">The plan of this pour asks for none.</EmptyState>
      ) : (
        <ol className="grid gap-4 md:grid-cols-2 md:items-start">
          {checks.map((check) => (
            <CheckCard key={check.item.id} open={open} check={check} />
          ))}
        </ol>
      )}
      {next && (
        <FieldLink
          href={fieldPaths.checks(sheet.pourId, next)}
          className="mt-4 flex min-h-target items-center justify-end font-label font-semibold text-chalk underline underline-offset-4"
        >
          Next: {checkGroupWords[next]}
        </FieldLink>
      )}
    </Screen>
  );
}
