import type { Metadata } from 'next';
import { PageMain } from '@/components/office/page-main';
import { draftOfPlan } from '@/components/office/plan-draft';
import { PlanForm } from '@/components/office/plan-form';
import { localFieldText } from '@/components/office/project-time';
import { TitleOfPour } from '@/components/office/title-of-pour';
import { Notice } from '@/components/ui/notice';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { LinkButton } from '@/components/ui/link-button';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { readPourPage } from '../read-pour-page';

export const metadata: Metadata = { title: 'Revise the plan' };

/** The plan in force as a form; issuing it makes a new revision, by which everything is judged anew. */
export default async function RevisePlanPage({ params }: { params: Promise<{ pourId: string }> }) {
  const { header, sheet, holds, state, viewer } = await readPourPage((await params).pourId, 'plan.revise');
  const { timeZone } = header.project;
  const begun = sheet.placing.started !== null;
  return (
    <PageMain>
      <SheetFrame
        heading={`Revise the plan of ${header.pour.number}`}
        level={1}
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
        <p>
          A plan is never edited. Issuing makes revision {revisionLetter(sheet.plan.revision + 1)}: every
          reading is judged anew by it, and a release that it touches becomes void.
        </p>
      </SheetFrame>
      {begun ? (
        <Notice
          tone="hold"
          title="Placing has begun"
          actions={<LinkButton href={`/pours/${sheet.pourId}`}>Back to the pour</LinkButton>}
        >
          <p>The plan stays as it was when the concrete came.</p>
        </Notice>
      ) : (
        <PlanForm
          start={{
            ...draftOfPlan(sheet.plan),
            number: header.pour.number,
            title: header.pour.title,
            location: header.pour.location,
            plannedAt: header.pour.plannedAt ? localFieldText(header.pour.plannedAt, timeZone) : '',
          }}
          projectId={header.project.id}
          timeZone={timeZone}
          personId={viewer.personId}
          revises={{
            pourId: sheet.pourId,
            basedOn: sheet.plan.revision,
            letter: revisionLetter(sheet.plan.revision + 1),
          }}
          copiedFrom={null}
        />
      )}
    </PageMain>
  );
}
