import type { Metadata } from 'next';
import { ChecksList } from '@/components/office/checks-list';
import { ConditionsList } from '@/components/office/conditions-list';
import { FaceSheet } from '@/components/office/face-sheet';
import { HoldsList } from '@/components/office/holds-list';
import { LivePour } from '@/components/office/live-pour';
import { MeasurementsTable } from '@/components/office/measurements-table';
import { NonconformanceRows } from '@/components/office/nonconformance-rows';
import type { OfficeViewer } from '@/components/office/office-viewer';
import { PageMain } from '@/components/office/page-main';
import { photoViews } from '@/components/office/photo-views';
import { PhotoStrip } from '@/components/office/photo-zoom';
import { PlanFacts } from '@/components/office/plan-facts';
import { PourActions } from '@/components/office/pour-actions';
import { firstOf, type SearchParams } from '@/components/office/pours-query';
import { RecordList } from '@/components/office/record-list';
import { peopleById, wordContextOf } from '@/components/office/record-lines';
import { ReleasesPanel } from '@/components/office/releases-panel';
import { RememberProject } from '@/components/office/remember-project';
import { SheetNav } from '@/components/office/sheet-nav';
import { SignaturesPanel } from '@/components/office/signatures-panel';
import { TitleOfPour } from '@/components/office/title-of-pour';
import { LinkButton } from '@/components/ui/link-button';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { allowed } from '@/lib/server/access';
import { readPourPage } from './read-pour-page';

export const metadata: Metadata = { title: 'Pour' };

/** One pour: its title block, holds, readings drawn to scale, checks, photos, releases and the whole record. */
export default async function PourPage({
  params,
  searchParams,
}: {
  params: Promise<{ pourId: string }>;
  searchParams: Promise<SearchParams>;
}) {
  const whole = firstOf(await searchParams).record === 'whole';
  const { header, sheet, holds, state, chain, viewer: read } = await readPourPage((await params).pourId);
  const viewer: OfficeViewer = {
    ...read,
    timeZone: header.project.timeZone,
    people: peopleById(header.people),
  };
  const context = wordContextOf(sheet, viewer.people, viewer.timeZone);
  const photos = photoViews(sheet, context);
  const placing = sheet.placing.finished ? 'finished' : sheet.placing.started ? 'started' : 'before';
  return (
    <PageMain>
      <RememberProject projectId={header.project.id} />
      <SheetFrame
        heading={`${header.pour.number} ${header.pour.title}`}
        level={1}
        aside={<LivePour pourId={sheet.pourId} headSeq={sheet.headSeq} />}
        titleBlock={
          <TitleOfPour
            {...header.pour}
            plan={sheet.plan}
            state={state}
            holds={holds.length}
            timeZone={viewer.timeZone}
          />
        }
      >
        <div className="grid gap-3">
          <SheetNav
            items={[
              { href: '#holds', label: 'Holds', count: holds.length },
              { href: '#faces', label: 'Cover' },
              { href: '#checks', label: 'Checks' },
              { href: '#measurements', label: 'Measurements' },
              { href: '#nonconformances', label: 'Nonconformances', count: sheet.nonconformances.length },
              { href: '#photos', label: 'Photos', count: photos.length },
              { href: '#release', label: 'Release' },
              { href: '#record', label: 'Record', count: sheet.entries.length },
            ]}
          />
          <div className="flex flex-wrap gap-2 print:hidden">
            <PourActions
              plan={sheet.plan}
              seenSeq={sheet.headSeq}
              holds={holds}
              role={viewer.role}
              now={viewer.now}
              timeZone={viewer.timeZone}
              placing={placing}
            />
            {allowed('plan.revise', viewer.role) && placing === 'before' && (
              <LinkButton href={`/pours/${sheet.pourId}/plan`}>Revise the plan</LinkButton>
            )}
            {allowed('pour.create', viewer.role) && (
              <LinkButton href={`/pours/new?from=${sheet.pourId}`} variant="quiet">
                Plan another like it
              </LinkButton>
            )}
          </div>
        </div>
      </SheetFrame>

      <SheetFrame id="holds" heading="Holds" aside="by who clears them">
        <HoldsList {...{ sheet, holds, viewer }} />
      </SheetFrame>

      <div id="faces" className="grid gap-6 *:min-w-0">
        {sheet.plan.elements.flatMap((element) =>
          element.faces.map((face) => {
            const state = sheet.faces.find((one) => one.faceId === face.id);
            return (
              state && (
                <FaceSheet
                  key={face.id}
                  {...{ sheet, element, face, state }}
                  people={viewer.people}
                  timeZone={viewer.timeZone}
                />
              )
            );
          }),
        )}
      </div>

      <SheetFrame
        id="checks"
        heading="Checks"
        aside={`${sheet.plan.checklist.template}, version ${sheet.plan.checklist.version}`}
      >
        <ChecksList sheet={sheet} viewer={viewer} />
      </SheetFrame>
      <SheetFrame id="measurements" heading="Measurements">
        <MeasurementsTable sheet={sheet} viewer={viewer} />
      </SheetFrame>
      <SheetFrame id="nonconformances" heading="Nonconformances and decisions">
        <div className="grid gap-4">
          <NonconformanceRows nonconformances={sheet.nonconformances} viewer={viewer} />
          <div>
            <h3 className="text-lead">Conditions</h3>
            <ConditionsList
              conditions={sheet.conditions}
              pourId={sheet.pourId}
              seenSeq={sheet.headSeq}
              viewer={viewer}
            />
          </div>
        </div>
      </SheetFrame>
      <SheetFrame id="photos" heading="Photos">
        <PhotoStrip photos={photos} />
      </SheetFrame>
      <SheetFrame id="release" heading="Signatures and release">
        <div className="grid gap-6 lg:grid-cols-2">
          <SignaturesPanel {...{ sheet, context, viewer }} />
          <ReleasesPanel
            {...{ sheet, holds, state, viewer }}
            releases={header.releases}
            mayGive={allowed('release.give', viewer.role)}
            mayVoid={allowed('release.void', viewer.role)}
          />
        </div>
      </SheetFrame>
      <SheetFrame id="plan" heading="Plan">
        <PlanFacts plan={sheet.plan} revisions={header.revisions} viewer={viewer} />
      </SheetFrame>
      <SheetFrame id="record" heading="The record" aside="newest first; nothing is ever taken out">
        <RecordList {...{ sheet, chain, viewer, whole }} />
      </SheetFrame>
    </PageMain>
  );
}
