import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { evaporationCalculation } from '@/components/calculations/evaporation/evaporation-calculation';
import { EvaporationSheet } from '@/components/calculations/evaporation/evaporation-sheet';
import { openLink } from '@/components/calculations/link';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('evaporation').title };

/** Evaporation from fresh concrete. */
export default async function EvaporationPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <EvaporationSheet opened={openLink(evaporationCalculation.fields, await searchParams)} />
    </PageMain>
  );
}
