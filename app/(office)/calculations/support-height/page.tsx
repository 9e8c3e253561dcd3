import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { supportHeightCalculation } from '@/components/calculations/support-height/support-height-calculation';
import { SupportHeightSheet } from '@/components/calculations/support-height/support-height-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('support-height').title };

/** Height of supports under a top mat. */
export default async function SupportHeightPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <SupportHeightSheet opened={openLink(supportHeightCalculation.fields, await searchParams)} />
    </PageMain>
  );
}
