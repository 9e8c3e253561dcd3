import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { OfficeHeader, type OfficeLink } from '@/components/office/office-header';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { QueryProvider } from '@/components/office/query-provider';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { roleWords, type Role } from '@/lib/inspection/roles';
import { allowed, type Action } from '@/lib/server/access';
import { withAccess } from '@/lib/server/with-access';

const links: (OfficeLink & { action: Action })[] = [
  { href: '/pours', label: 'Pours', action: 'pours.list' },
  { href: '/nonconformances', label: 'Nonconformances', action: 'nonconformances.list' },
  { href: '/project', label: 'Project', action: 'project.read' },
  { href: '/field', label: 'Field', action: 'record.push' },
  { href: '/calculations', label: 'Calculations', action: 'project.read' },
];

const linksFor = (role: Role): OfficeLink[] =>
  links.filter(({ action }) => allowed(action, role)).map(({ href, label }) => ({ href, label }));

/** The frame of the office: project, where one can go with this role, and who is signed in. */
export default async function OfficeLayout({ children }: { children: ReactNode }) {
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const { person, projects } = await withAccess(async ({ tx, person: signedIn }) => ({
    person: { id: signedIn.id, name: signedIn.name, email: signedIn.email },
    projects: await readProjectsOfPerson(tx, signedIn),
  }));
  const current = chosenProject(projects, kept);
  return (
    <QueryProvider>
      <OfficeHeader
        projects={projects.map(({ id, name }) => ({ id, name }))}
        currentProjectId={current?.id ?? null}
        links={current ? linksFor(current.role) : []}
        person={{ ...person, roleWords: current ? roleWords[current.role] : 'Not in a project yet' }}
      />
      {children}
    </QueryProvider>
  );
}
