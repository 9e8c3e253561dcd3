import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { allowed } from '@/lib/server/access';
import { withAccess } from '@/lib/server/with-access';

/** The start: inspectors and crew begin on the sheet of the field, everybody else at the list of pours. */
export default async function StartPage() {
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const role = await withAccess(
    async ({ tx, person }) => chosenProject(await readProjectsOfPerson(tx, person), kept)?.role ?? null,
  );
  redirect(role === 'inspector' || (role !== null && !allowed('pours.list', role)) ? '/field' : '/pours');
}
