import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { BringInFile } from '@/components/office/bring-in-file';
import { Fold } from '@/components/office/fold';
import { PageMain } from '@/components/office/page-main';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { fullTime } from '@/components/office/project-time';
import { RuledTable } from '@/components/office/ruled-table';
import { SessionsTable } from '@/components/office/sessions-table';
import { SignOutEverywhere } from '@/components/office/sign-out-everywhere';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { readPersonSessions } from '@/db/read/person-sessions';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { roleWords } from '@/lib/inspection/roles';
import { withAccess } from '@/lib/server/with-access';

export const metadata: Metadata = { title: 'Account' };

/** How many sessions stand in sight; the others are a press away. */
const IN_SIGHT = 8;

/** Who one is here, in which projects, and where one is signed in. */
export default async function AccountPage() {
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const {
    person,
    projects,
    sessions: open,
    devices,
  } = await withAccess(async ({ tx, person: signedIn, now }) => ({
    person: signedIn,
    projects: await readProjectsOfPerson(tx, signedIn),
    ...(await readPersonSessions(tx, signedIn.id, now)),
  }));
  const [sessions, older] = [open.slice(0, IN_SIGHT), open.slice(IN_SIGHT)];
  const current = person.sessionId;
  const timeZone = chosenProject(projects, kept)?.timeZone ?? 'UTC';
  return (
    <PageMain narrow>
      <h1 className="text-title">Account</h1>
      <SheetFrame heading={person.name}>
        <div className="grid gap-4 *:min-w-0">
          <p>
            {person.email}
            {person.licence && <span className="block">Licence {person.licence}</span>}
          </p>
          <RuledTable
            caption="Projects"
            columns={[
              { key: 'project', head: 'Project' },
              { key: 'place', head: 'Place' },
              { key: 'role', head: 'Your role' },
            ]}
            rows={projects.map((project) => ({
              key: project.id,
              cells: { project: project.name, place: project.place, role: roleWords[project.role] },
            }))}
            empty="You are not in a project yet."
          />
          <ThemeSwitch />
        </div>
      </SheetFrame>
      <SheetFrame heading="Where you are signed in" aside={`times of ${timeZone.replaceAll('_', ' ')}`}>
        <div className="grid gap-4 *:min-w-0">
          <SessionsTable caption="Sessions" {...{ sessions, current, timeZone }} />
          {older.length > 0 && (
            <Fold summary="Longer ago" aside={`${older.length} still signed in`}>
              <SessionsTable caption="Sessions not seen lately" sessions={older} {...{ current, timeZone }} />
            </Fold>
          )}
          <SignOutEverywhere />
        </div>
      </SheetFrame>
      <SheetFrame heading="Devices that have sent work">
        <RuledTable
          caption="Devices"
          captionHidden
          columns={[
            { key: 'name', head: 'Device' },
            { key: 'first', head: 'First sent', className: 'whitespace-nowrap' },
            { key: 'last', head: 'Last sent', className: 'whitespace-nowrap' },
          ]}
          rows={devices.map((device) => ({
            key: device.id,
            cells: {
              name: device.name || <span className="font-figure text-label">{device.id.slice(0, 8)}</span>,
              first: fullTime(device.firstSentAt, timeZone),
              last: fullTime(device.lastSentAt, timeZone),
            },
          }))}
          empty="No device has sent work as you yet."
        />
      </SheetFrame>
      <SheetFrame heading="Work saved to a file">
        <BringInFile personId={person.id} timeZone={timeZone} />
      </SheetFrame>
    </PageMain>
  );
}
