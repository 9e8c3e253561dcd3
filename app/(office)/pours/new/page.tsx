import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { CopyFrom } from '@/components/office/copy-from';
import { NoProject } from '@/components/office/no-project';
import { PageMain } from '@/components/office/page-main';
import { draftOfPlan, emptyPlanDraft } from '@/components/office/plan-draft';
import { PlanForm } from '@/components/office/plan-form';
import { firstOf, type SearchParams } from '@/components/office/pours-query';
import { chosenProject, PROJECT_COOKIE } from '@/components/office/project-choice';
import { readPoursList } from '@/db/read/pours-list';
import { readProjectsOfPerson } from '@/db/read/projects-of-person';
import { currentPlans, findPour } from '@/db/stores/pour-store';
import { recordId } from '@/lib/inspection/primitives';
import { withAccess } from '@/lib/server/with-access';

export const metadata: Metadata = { title: 'Plan a pour' };

/** A new pour from a form, empty or copied from an earlier one. */
export default async function NewPourPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  const { from } = firstOf(await searchParams);
  const kept = (await cookies()).get(PROJECT_COOKIE)?.value;
  const found = await withAccess(async ({ tx, person, now, require }) => {
    const project = chosenProject(await readProjectsOfPerson(tx, person), kept);
    if (!project) return null;
    require('pour.create', project.id);
    const earlier = await readPoursList(tx, { projectId: project.id, limit: 200 }, now);
    const source = recordId.safeParse(from).success && from ? await findPour(tx, from) : null;
    const inProject = source?.projectId === project.id ? source : null;
    const plan = inProject
      ? (await currentPlans(tx, project.id, [inProject.id])).get(inProject.id)
      : undefined;
    return {
      project,
      personId: person.id,
      pours: earlier.rows.filter((pour) => pour.planRevision > 0),
      source: inProject,
      plan,
    };
  });
  if (!found) return <NoProject />;
  const { project, personId, pours, source, plan } = found;
  return (
    <PageMain>
      <h1 className="text-title">Plan a pour</h1>
      <CopyFrom
        pours={pours.map((pour) => ({ id: pour.id, label: `${pour.number} ${pour.title}` }))}
        current={source?.id ?? null}
      />
      <PlanForm
        key={source?.id ?? 'empty'}
        start={
          plan && source
            ? { ...draftOfPlan(plan), title: source.title, location: source.location, reason: 'First issue' }
            : emptyPlanDraft()
        }
        projectId={project.id}
        timeZone={project.timeZone}
        personId={personId}
        revises={null}
        copiedFrom={plan && source ? `${source.number} ${source.title}` : null}
      />
    </PageMain>
  );
}
