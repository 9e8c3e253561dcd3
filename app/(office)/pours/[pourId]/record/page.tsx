import type { Metadata } from 'next';
import { ChainState } from '@/components/office/chain-state';
import { LivePour } from '@/components/office/live-pour';
import type { OfficeViewer } from '@/components/office/office-viewer';
import { PageMain } from '@/components/office/page-main';
import { firstOf, type SearchParams } from '@/components/office/pours-query';
import { PrintButton } from '@/components/office/print-button';
import { peopleById, recordLines, wordContextOf } from '@/components/office/record-lines';
import { RecordList } from '@/components/office/record-list';
import { recordHref, recordPage, recordParts, recordQuery } from '@/components/office/record-page';
import { RememberProject } from '@/components/office/remember-project';
import { TitleOfPour } from '@/components/office/title-of-pour';
import { Button } from '@/components/ui/button';
import { LinkButton } from '@/components/ui/link-button';
import { Select } from '@/components/ui/select';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { readPourPage } from '../read-pour-page';

export const metadata: Metadata = { title: 'Record' };

/** The whole record of a pour, page by page: every entry, who made it and when, and what was said of it since. */
export default async function RecordPage({
  params,
  searchParams,
}: {
  params: Promise<{ pourId: string }>;
  searchParams: Promise<SearchParams>;
}) {
  const query = recordQuery.parse(firstOf(await searchParams));
  const { header, sheet, holds, state, chain, viewer: read } = await readPourPage((await params).pourId);
  const { timeZone } = header.project;
  const viewer: OfficeViewer = { ...read, timeZone, people: peopleById(header.people) };
  const page = recordPage(recordLines(sheet, wordContextOf(sheet, viewer.people, timeZone)), query);
  const here = `/pours/${sheet.pourId}/record`;
  return (
    <PageMain>
      <RememberProject projectId={header.project.id} />
      <SheetFrame
        heading={`Record of ${header.pour.number}`}
        level={1}
        aside={<LivePour pourId={sheet.pourId} headSeq={sheet.headSeq} />}
        titleBlock={
          <TitleOfPour
            {...header.pour}
            plan={sheet.plan}
            state={state}
            holds={holds.length}
            timeZone={timeZone}
          />
        }
      >
        <div className="flex flex-wrap items-center justify-between gap-3">
          <ChainState chain={chain} />
          <div className="flex flex-wrap gap-2 print:hidden">
            <LinkButton href={`/pours/${sheet.pourId}`} variant="quiet">
              The pour
            </LinkButton>
            <PrintButton />
          </div>
        </div>
      </SheetFrame>
      <SheetFrame
        heading={query.part ? recordParts[query.part].label : 'Every entry'}
        aside="newest first; nothing is ever taken out"
      >
        <div className="grid gap-4">
          <form
            action={here}
            role="search"
            aria-label="Record"
            className="flex flex-wrap items-end gap-3 print:hidden"
          >
            <Select
              label="Show"
              name="part"
              defaultValue={query.part ?? ''}
              placeholder="Everything"
              options={Object.entries(recordParts).map(([value, { label }]) => ({ value, label }))}
              fieldClassName="w-72"
            />
            <Button type="submit">Show</Button>
          </form>
          {page.lines.length === 0 ? (
            <p className="text-pencil">Nothing of this has been recorded.</p>
          ) : (
            <RecordList sheet={sheet} lines={page.lines} viewer={viewer} />
          )}
          <nav aria-label="Pages of the record" className="flex flex-wrap items-center gap-3 print:hidden">
            {(query.before !== undefined || query.entry !== undefined) && (
              <LinkButton href={recordHref(sheet.pourId, { part: query.part })}>Latest entries</LinkButton>
            )}
            {page.earlier !== null && (
              <LinkButton href={recordHref(sheet.pourId, { part: query.part, before: page.earlier })}>
                Earlier entries
              </LinkButton>
            )}
            <p className="text-label text-pencil">
              {page.lines.length} of {page.total} {page.total === 1 ? 'entry' : 'entries'} on this page
            </p>
          </nav>
        </div>
      </SheetFrame>
    </PageMain>
  );
}
