import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { lapFields } from '@/components/calculations/lap/lap-fields';
import { LapSheet } from '@/components/calculations/lap/lap-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('lap').title };

/** Lap length by ACI 318 and EN 1992. */
export default async function LapPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <LapSheet opened={openLink(lapFields, await searchParams)} />
    </PageMain>
  );
}
