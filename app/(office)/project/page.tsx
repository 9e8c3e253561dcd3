import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { NoProject } from '@/components/office/no-project';
import { ProjectEntry } from '@/components/office/project-entry';
import { PageMain } from '@/components/office/page-main';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { fullTime } from '@/components/office/project-time';
import { RuledTable } from '@/components/office/ruled-table';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import { readProjectPeople } from '@/db/read/project-people';
import { readProjectRegisters } from '@/db/read/project-registers';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { streamHead } from '@/db/stores/entry-store';
import { formatLength } from '@/lib/concrete/length';
import type { EntryType } from '@/lib/inspection/entry';
import { mayRecord } from '@/lib/inspection/entry-access';
import { roleWords } from '@/lib/inspection/roles';
import { withAccess } from '@/lib/server/with-access';

export const metadata: Metadata = { title: 'Project' };

/** The project's people and registers. */
export default async function ProjectPage() {
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const found = await withAccess(async ({ tx, person, now, require }) => {
    const project = chosenProject(await readProjectsOfPerson(tx, person), kept);
    if (!project) return null;
    require('project.read', project.id);
    return {
      project,
      at: {
        projectId: project.id,
        authorId: person.id,
        seenSeq: (await streamHead(tx, project.id, null)).seq,
        now,
        timeZone: project.timeZone,
      },
      people: await readProjectPeople(tx, project.id),
      registers: await readProjectRegisters(tx, project.id),
    };
  });
  if (!found) return <NoProject />;
  const { project, people, registers, at } = found;
  const may = (type: EntryType) => mayRecord(type, project.role);
  const time = (iso: string) => fullTime(iso, project.timeZone);
  return (
    <PageMain>
      <SheetFrame
        heading={project.name}
        level={1}
        titleBlock={
          <TitleBlock
            cells={[
              { label: 'Project', value: project.name, grow: 3 },
              { label: 'Place', value: project.place || 'not said', grow: 2 },
              { label: 'Time zone', value: project.timeZone.replaceAll('_', ' '), grow: 2 },
              { label: 'Your role', value: roleWords[project.role], grow: 2 },
            ]}
          />
        }
      >
        <p className="max-w-prose">
          Every time is the project&rsquo;s own. Basis, decision rule, validity and rain limit are part of
          each pour&rsquo;s plan, frozen when it is issued.
        </p>
      </SheetFrame>
      <SheetFrame heading="Members" aside={`${people.filter((one) => one.active).length} active`}>
        <RuledTable
          caption="Members"
          captionHidden
          columns={[
            { key: 'name', head: 'Name', className: 'min-w-40' },
            { key: 'role', head: 'Role' },
            { key: 'email', head: 'E-mail' },
            { key: 'papers', head: 'Licence or certification' },
          ]}
          rows={people.map((one) => ({
            key: one.id,
            className: one.active ? undefined : 'text-pencil',
            cells: {
              name: one.active ? one.name : `${one.name} (no longer a member)`,
              role: roleWords[one.role],
              email: one.email,
              papers: [one.licence, one.certification].filter(Boolean).join(', ') || '–',
            },
          }))}
        />
      </SheetFrame>
      <SheetFrame
        heading="Instruments"
        aside={
          may('instrument-status') ? (
            <ProjectEntry kind="instrument" at={at} />
          ) : (
            'block checks stand in the record'
          )
        }
      >
        <RuledTable
          caption="Instruments"
          captionHidden
          columns={[
            { key: 'name', head: 'Name' },
            { key: 'kind', head: 'Kind' },
            { key: 'serial', head: 'Serial' },
            { key: 'due', head: 'Calibration due', className: 'whitespace-nowrap' },
            { key: 'u', head: 'U (k = 2), mm', figure: true },
            { key: 'state', head: 'State' },
            ...(may('block-check') ? [{ key: 'do', head: 'Record' }] : []),
          ]}
          rows={registers.instruments.map((one) => ({
            key: one.id,
            cells: {
              name: one.name,
              kind: one.kind.replace('-', ' '),
              serial: one.serial || '–',
              due: one.calibrationDue ? time(one.calibrationDue) : 'not said',
              u: one.uncertaintyMm === null ? '–' : formatLength(one.uncertaintyMm, 'mm'),
              state: !one.inService
                ? 'out of service'
                : one.calibrationDue && one.calibrationDue < at.now
                  ? 'calibration is over'
                  : 'in service',
              do: (
                <span className="flex flex-wrap">
                  <ProjectEntry kind="block-check" instrument={one} at={at} variant="quiet" />
                  <ProjectEntry kind="instrument" instrument={one} at={at} variant="quiet" />
                </span>
              ),
            },
          }))}
          empty="No instrument is registered."
        />
      </SheetFrame>
      <SheetFrame
        heading="Drawings"
        aside={
          may('drawing-received') ? (
            <ProjectEntry kind="drawing" at={at} />
          ) : (
            'a new revision holds the pours made to the old one'
          )
        }
      >
        <RuledTable
          caption="Drawings"
          captionHidden
          columns={[
            { key: 'number', head: 'Number' },
            { key: 'revision', head: 'Revision' },
            { key: 'received', head: 'Received', className: 'whitespace-nowrap' },
          ]}
          rows={registers.drawings.map((one) => ({
            key: `${one.number} ${one.revision}`,
            cells: { number: one.number, revision: one.revision, received: time(one.receivedAt) },
          }))}
          empty="No drawing has been received."
        />
      </SheetFrame>
      <SheetFrame
        heading="Mixes"
        aside={
          may('mix-changed') && (
            <ProjectEntry kind="mix" mixes={registers.mixes.map((one) => one.name)} at={at} />
          )
        }
      >
        <RuledTable
          caption="Mixes"
          captionHidden
          columns={[
            { key: 'name', head: 'Mix' },
            { key: 'pours', head: 'Planned for' },
            { key: 'note', head: 'Note', className: 'min-w-48' },
            { key: 'changed', head: 'Changed to', className: 'whitespace-nowrap' },
          ]}
          rows={registers.mixes.map((one) => ({
            key: one.name,
            cells: {
              name: one.name,
              pours: one.pours.join(', ') || '–',
              note: one.note || '–',
              changed: one.changedAt ? time(one.changedAt) : '–',
            },
          }))}
          empty="No plan names a mix, and no change of one was recorded."
        />
      </SheetFrame>
    </PageMain>
  );
}
