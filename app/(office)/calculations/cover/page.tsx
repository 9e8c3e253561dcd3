import type { Metadata } from 'next';
import { calculationOf } from '@/components/calculations/calculation-list';
import { openLink } from '@/components/calculations/link';
import { coverFields } from '@/components/calculations/cover/cover-fields';
import { CoverSheet } from '@/components/calculations/cover/cover-sheet';
import { PageMain } from '@/components/office/page-main';
import type { SearchParams } from '@/components/office/pours-query';
import { requireMember } from '../require-member';

export const metadata: Metadata = { title: calculationOf('cover').title };

/** Required cover by each basis. */
export default async function CoverPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  await requireMember();
  return (
    <PageMain>
      <CoverSheet opened={openLink(coverFields, await searchParams)} />
    </PageMain>
  );
}
