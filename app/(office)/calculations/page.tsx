import type { Metadata } from 'next';
import Link from 'next/link';
import { calculations } from '@/components/calculations/calculation-list';
import { Caution } from '@/components/office/caution';
import { PageMain } from '@/components/office/page-main';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { requireMember } from './require-member';

export const metadata: Metadata = { title: 'Calculations' };

/** The calculation pages, one line each. */
export default async function CalculationsPage() {
  await requireMember();
  return (
    <PageMain>
      <SheetFrame heading="Calculations" level={1} aside="with formula, clause and source">
        <ul>
          {calculations.map(({ slug, title, line, by }) => (
            <li
              key={slug}
              className="grid gap-x-6 border-b border-rule py-2.5 last:border-b-0 md:grid-cols-[15rem_minmax(0,1fr)_18rem]"
            >
              <Link
                href={`/calculations/${slug}`}
                prefetch={false}
                className="font-label text-lead font-semibold text-chalk underline underline-offset-4"
              >
                {title}
              </Link>
              <span>{line}</span>
              <span className="text-label text-pencil">{by}</span>
            </li>
          ))}
        </ul>
      </SheetFrame>
      <Caution>
        Each page opens with an example, computes in this browser, and carries its inputs in its address.
      </Caution>
    </PageMain>
  );
}
