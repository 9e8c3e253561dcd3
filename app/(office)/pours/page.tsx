import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { DownloadCsv } from '@/components/office/download-csv';
import { NoProject } from '@/components/office/no-project';
import { PageMain } from '@/components/office/page-main';
import { poursCsv } from '@/components/office/pours-csv';
import { PoursFilters } from '@/components/office/pours-filters';
import { poursHref, readPoursQuery, type SearchParams } from '@/components/office/pours-query';
import { PoursTable, sortPours } from '@/components/office/pours-table';
import { PoursTimeline } from '@/components/office/pours-timeline';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { startOfDay } from '@/components/office/project-time';
import { LinkButton } from '@/components/ui/link-button';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { readPoursList } from '@/db/read/pours-list';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { allowed } from '@/lib/server/access';
import { withAccess } from '@/lib/server/with-access';

export const metadata: Metadata = { title: 'Pours' };

const PAGE = 100;
const TWO_WEEKS_MS = 14 * 86_400_000;

/** The pours of a project: the next two weeks against time, and all of them in a table. */
export default async function PoursPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  const query = readPoursQuery(await searchParams);
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const found = await withAccess(async ({ tx, person, now, require }) => {
    const project = chosenProject(await readProjectsOfPerson(tx, person), kept);
    if (!project) return null;
    const role = require('pours.list', project.id);
    const today = startOfDay(now, project.timeZone);
    const list = await readPoursList(
      tx,
      {
        projectId: project.id,
        states: query.state ? [query.state] : undefined,
        text: query.text || undefined,
        clearedBy: query.clears,
        cursor: query.after,
        limit: PAGE,
      },
      now,
    );
    const ahead = await readPoursList(
      tx,
      {
        projectId: project.id,
        plannedFrom: today,
        plannedBefore: new Date(Date.parse(today) + TWO_WEEKS_MS).toISOString(),
        limit: 60,
      },
      now,
    );
    return { project, list, ahead: ahead.rows, now, mayPlan: allowed('pour.create', role) };
  });
  if (!found) return <NoProject />;
  const { project, list, ahead, now, mayPlan } = found;
  return (
    <PageMain>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h1 className="text-title">Pours</h1>
        {mayPlan && (
          <LinkButton href="/pours/new" variant="primary">
            Plan a pour
          </LinkButton>
        )}
      </div>
      <SheetFrame
        heading="The next two weeks"
        aside="dotted: the evening before, when holds have to be clear"
      >
        <PoursTimeline pours={ahead} now={now} timeZone={project.timeZone} />
      </SheetFrame>
      <SheetFrame
        heading="All pours"
        aside={
          list.rows.length > 0 && (
            <DownloadCsv
              name={`pours-${now.slice(0, 10)}.csv`}
              text={poursCsv(sortPours(list.rows, query), project.timeZone)}
              label="CSV of these rows"
            />
          )
        }
      >
        <div className="grid gap-4 *:min-w-0">
          <PoursFilters query={query} />
          <PoursTable pours={list.rows} query={query} timeZone={project.timeZone} mayPlan={mayPlan} />
          {(list.next || query.after) && (
            <nav aria-label="Pages of the list" className="flex flex-wrap items-center gap-3">
              {query.after && <LinkButton href={poursHref(query, {})}>From the start</LinkButton>}
              {list.next && (
                <LinkButton href={poursHref(query, { after: list.next })}>Further pours</LinkButton>
              )}
              <p className="text-label text-pencil">By planned time; a sort is within these rows.</p>
            </nav>
          )}
        </div>
      </SheetFrame>
    </PageMain>
  );
}
