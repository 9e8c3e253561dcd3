import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { readingsCalculation } from '@/components/calculations/readings/readings-calculation';
import { ReadingsSheet } from '@/components/calculations/readings/readings-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('readings').title };

/** Number of readings of a face. */
export default async function ReadingsPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <ReadingsSheet opened={openLink(readingsCalculation.fields, await searchParams)} />
    </PageMain>
  );
}
