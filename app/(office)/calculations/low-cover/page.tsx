import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { lowCoverFields } from '@/components/calculations/low-cover/low-cover-fields';
import { LowCoverSheet } from '@/components/calculations/low-cover/low-cover-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('low-cover').title };

/** What cover that is not as specified costs. */
export default async function LowCoverPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <LowCoverSheet opened={openLink(lowCoverFields, await searchParams)} />
    </PageMain>
  );
}
