import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { clearDistanceCalculation } from '@/components/calculations/clear-distance/clear-distance-calculation';
import { ClearDistanceSheet } from '@/components/calculations/clear-distance/clear-distance-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('clear-distance').title };

/** Clear distance between bars. */
export default async function ClearDistancePage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <ClearDistanceSheet opened={openLink(clearDistanceCalculation.fields, await searchParams)} />
    </PageMain>
  );
}
