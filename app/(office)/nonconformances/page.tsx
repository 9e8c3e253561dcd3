import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import Link from 'next/link';
import { z } from 'zod';
import { DownloadCsv } from '@/components/office/download-csv';
import { csvText } from '@/components/office/csv-text';
import { NoProject } from '@/components/office/no-project';
import { NonconformanceStand } from '@/components/office/nonconformance-rows';
import { PageMain } from '@/components/office/page-main';
import { firstOf, type SearchParams } from '@/components/office/pours-query';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { RuledTable } from '@/components/office/ruled-table';
import { nonconformanceWords } from '@/components/office/state-words';
import { localFieldText } from '@/components/office/project-time';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { LinkButton } from '@/components/ui/link-button';
import { Select } from '@/components/ui/select';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { Time } from '@/components/ui/time';
import { readNonconformanceList, type NonconformanceListFilter } from '@/db/read/nonconformance-list';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { withAccess } from '@/lib/server/with-access';

export const metadata: Metadata = { title: 'Nonconformances' };

const groups = {
  open: { label: 'Not closed', filter: { statuses: ['open', 'decision-asked', 'corrected', 'rejected'] } },
  asked: { label: 'A decision is asked', filter: { statuses: ['decision-asked'] } },
  corrected: { label: 'Corrected, recheck awaited', filter: { statuses: ['corrected'] } },
  conditions: { label: 'Conditions to be verified', filter: { conditionsOpen: true } },
  done: { label: 'Accepted or closed', filter: { statuses: ['accepted', 'closed'] } },
} as const satisfies Record<
  string,
  { label: string; filter: Pick<NonconformanceListFilter, 'statuses' | 'conditionsOpen'> }
>;

const listQuery = z.object({
  show: z.enum(['open', 'asked', 'corrected', 'conditions', 'done']).optional().catch(undefined),
  after: z.string().max(300).optional().catch(undefined),
});

/** The nonconformances of a project, newest first. */
export default async function NonconformancesPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  const query = listQuery.parse(firstOf(await searchParams));
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const found = await withAccess(async ({ tx, person, now, require }) => {
    const project = chosenProject(await readProjectsOfPerson(tx, person), kept);
    if (!project) return null;
    require('nonconformances.list', project.id);
    const list = await readNonconformanceList(tx, {
      projectId: project.id,
      ...(query.show ? groups[query.show].filter : {}),
      cursor: query.after,
      limit: 100,
    });
    return { project, list, now };
  });
  if (!found) return <NoProject />;
  const { project, list, now } = found;
  const { timeZone } = project;
  const csv = csvText([
    [
      'Pour',
      'Title',
      'State',
      'Where',
      'Extent',
      `Needed by (${timeZone})`,
      'Raised by',
      `Raised (${timeZone})`,
    ],
    ...list.rows.map((row) => [
      row.pour.number,
      row.title,
      nonconformanceWords[row.status].word,
      row.where,
      row.extent,
      row.neededBy ? localFieldText(row.neededBy, timeZone).replace('T', ' ') : '',
      row.raisedByName,
      localFieldText(row.raisedAt, timeZone).replace('T', ' '),
    ]),
  ]);
  return (
    <PageMain>
      <h1 className="text-title">Nonconformances</h1>
      <SheetFrame
        heading="What was found and what was decided"
        aside={
          list.rows.length > 0 && (
            <DownloadCsv
              name={`nonconformances-${now.slice(0, 10)}.csv`}
              text={csv}
              label="CSV of these rows"
            />
          )
        }
      >
        <div className="grid gap-4 *:min-w-0">
          <form
            action="/nonconformances"
            role="search"
            aria-label="Nonconformances"
            className="flex flex-wrap items-end gap-3"
          >
            <Select
              label="Show"
              name="show"
              defaultValue={query.show ?? ''}
              placeholder="All"
              options={Object.entries(groups).map(([value, { label }]) => ({ value, label }))}
              fieldClassName="w-64"
            />
            <Button type="submit">Show</Button>
          </form>
          <RuledTable
            caption="Nonconformances"
            captionHidden
            columns={[
              { key: 'title', head: 'What', className: 'min-w-56' },
              { key: 'pour', head: 'Pour', className: 'whitespace-nowrap' },
              { key: 'state', head: 'State', className: 'min-w-40' },
              { key: 'needed', head: 'Needed by', className: 'whitespace-nowrap' },
              { key: 'raised', head: 'Raised', className: 'whitespace-nowrap' },
              { key: 'photos', head: 'Photos', figure: true },
              { key: 'conditions', head: 'Conditions open', figure: true },
            ]}
            rows={list.rows.map((row) => ({
              key: row.id,
              cells: {
                title: (
                  <>
                    <Link
                      prefetch={false}
                      href={`/nonconformances/${row.id}`}
                      className="inline-block min-h-6 font-label font-semibold text-chalk underline underline-offset-4"
                    >
                      {row.title}
                    </Link>
                    <span className="block text-label text-pencil">
                      {[row.where, row.extent].filter(Boolean).join('. ')}
                    </span>
                  </>
                ),
                pour: (
                  <Link
                    prefetch={false}
                    href={`/pours/${row.pour.id}`}
                    className="inline-block min-h-6 text-chalk underline underline-offset-4"
                  >
                    {row.pour.number}
                  </Link>
                ),
                state: <NonconformanceStand status={row.status} />,
                needed: row.neededBy ? <Time instant={row.neededBy} timeZone={timeZone} /> : '–',
                raised: (
                  <>
                    <Time instant={row.raisedAt} timeZone={timeZone} />
                    <span className="block text-label text-pencil">{row.raisedByName}</span>
                  </>
                ),
                photos: row.photos,
                conditions: row.conditionsOpen,
              },
            }))}
            empty={
              <EmptyState title={query.show ? 'None of these' : 'None has been raised'}>
                Inspectors raise them on site, from a reading or a check that is not met.
              </EmptyState>
            }
          />
          {(list.next || query.after) && (
            <nav aria-label="Pages of the list" className="flex flex-wrap gap-3">
              {query.after && (
                <LinkButton href={`/nonconformances${query.show ? `?show=${query.show}` : ''}`}>
                  Latest ones
                </LinkButton>
              )}
              {list.next && (
                <LinkButton
                  href={`/nonconformances?${new URLSearchParams({ ...(query.show ? { show: query.show } : {}), after: list.next }).toString()}`}
                >
                  Earlier ones
                </LinkButton>
              )}
            </nav>
          )}
        </div>
      </SheetFrame>
    </PageMain>
  );
}
