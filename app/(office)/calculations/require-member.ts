import { notFound } from 'next/navigation';
import { withAccess } from '@/lib/server/with-access';

/** Calculation pages are for people signed in who are in a project; they show nothing of one. */
export async function requireMember(): Promise<void> {
  const member = await withAccess(({ person }) => Promise.resolve(person.roles.size > 0));
  if (!member) notFound();
}
