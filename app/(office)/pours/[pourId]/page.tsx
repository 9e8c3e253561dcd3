import type { Metadata } from 'next';
import { ChainState } from '@/components/office/chain-state';
import { ChecksList } from '@/components/office/checks-list';
import { ConditionsList } from '@/components/office/conditions-list';
import { FaceSheet } from '@/components/office/face-sheet';
import { HoldsList } from '@/components/office/holds-list';
import { namedSources } from '@/components/office/judged-by-name';
import { JudgedSources } from '@/components/office/judged-sources';
import { LivePour } from '@/components/office/live-pour';
import { MeasurementsTable } from '@/components/office/measurements-table';
import { NonconformanceRows } from '@/components/office/nonconformance-rows';
import type { OfficeViewer } from '@/components/office/office-viewer';
import { PageMain } from '@/components/office/page-main';
import { photoViews } from '@/components/office/photo-views';
import { PhotoStrip } from '@/components/office/photo-zoom';
import { PlanFacts } from '@/components/office/plan-facts';
import { PourActions } from '@/components/office/pour-actions';
import { QueriesList } from '@/components/office/queries-list';
import { peopleById, recordLines, wordContextOf } from '@/components/office/record-lines';
import { RecordList } from '@/components/office/record-list';
import { recordPage } from '@/components/office/record-page';
import { ReleaseStanding } from '@/components/office/release-standing';
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

/** How much of the record stands here; the rest has a page of its own. */
const LATEST = 6;

/** One pour: first whether concrete may come and what holds it, then what was read, checked, decided and recorded. */
export default async function PourPage({ params }: { params: Promise<{ pourId: string }> }) {
  const { header, sheet, holds, state, chain, viewer: read } = await readPourPage((await params).pourId);
  const viewer: OfficeViewer = {
    ...read,
    timeZone: header.project.timeZone,
    people: peopleById(header.people),
  };
  const context = wordContextOf(sheet, viewer.people, viewer.timeZone);
  const photos = photoViews(sheet, context);
  const placing = sheet.placing.finished ? 'finished' : sheet.placing.started ? 'started' : 'before';
  const lines = recordLines(sheet, context);
  const here = `/pours/${sheet.pourId}`;
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
      />
      <SheetNav
        items={[
          { href: '#release', label: 'Release' },
          { href: '#holds', label: 'Holds', count: holds.length },
          { href: '#nonconformances', label: 'Nonconformances', count: sheet.nonconformances.length },
          { href: '#faces', label: 'Cover' },
          { href: '#checks', label: 'Checks' },
          { href: '#measurements', label: 'Measurements' },
          { href: '#photos', label: 'Photos', count: photos.length },
          { href: '#signatures', label: 'Signatures', count: sheet.signatures.length },
          { href: '#plan', label: 'Plan' },
          { href: '#record', label: 'Record', count: lines.length },
        ]}
      />

      <div className="grid items-start gap-6 *:min-w-0 lg:grid-cols-[21rem_minmax(0,1fr)]">
        <SheetFrame id="release" heading="Release" className="lg:sticky lg:top-12">
          <div className="grid gap-4">
            <ReleaseStanding
              {...{ sheet, holds, state, viewer }}
              plannedAt={header.pour.plannedAt}
              mayGive={allowed('release.give', viewer.role)}
            />
            <ReleasesPanel
              {...{ sheet, viewer }}
              releases={header.releases}
              mayVoid={allowed('release.void', viewer.role)}
            />
            <PourActions
              plan={sheet.plan}
              seenSeq={sheet.headSeq}
              holds={holds}
              role={viewer.role}
              now={viewer.now}
              timeZone={viewer.timeZone}
              placing={placing}
            />
          </div>
        </SheetFrame>
        <div className="grid gap-6 *:min-w-0">
          <SheetFrame id="holds" heading="Holds" aside="by who clears them">
            <HoldsList {...{ sheet, holds, viewer }} />
          </SheetFrame>
          <SheetFrame id="nonconformances" heading="Nonconformances and decisions">
            <div className="grid gap-4">
              <NonconformanceRows nonconformances={sheet.nonconformances} viewer={viewer} />
              <div id="conditions">
                <h3 className="text-lead">Conditions</h3>
                <ConditionsList
                  conditions={sheet.conditions}
                  pourId={sheet.pourId}
                  seenSeq={sheet.headSeq}
                  viewer={viewer}
                />
              </div>
              {sheet.queries.length > 0 && (
                <div id="queries">
                  <h3 className="text-lead">Queries</h3>
                  <QueriesList {...{ sheet, context, viewer }} />
                </div>
              )}
            </div>
          </SheetFrame>
        </div>
      </div>

      <JudgedSources sources={namedSources(sheet.plan)}>
        <div id="faces" className="grid gap-6 *:min-w-0">
          {sheet.plan.elements.flatMap((element) =>
            element.faces.map((face) => {
              const faceState = sheet.faces.find((one) => one.faceId === face.id);
              return (
                faceState && (
                  <FaceSheet
                    key={face.id}
                    {...{ sheet, element, face }}
                    state={faceState}
                    people={viewer.people}
                    timeZone={viewer.timeZone}
                  />
                )
              );
            }),
          )}
        </div>
      </JudgedSources>

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
      <SheetFrame id="photos" heading="Photos">
        <PhotoStrip photos={photos} />
      </SheetFrame>
      <SheetFrame id="signatures" heading="Signatures" aside="two different persons">
        <SignaturesPanel {...{ sheet, context, viewer }} />
      </SheetFrame>
      <SheetFrame
        id="plan"
        heading="Plan"

        aside={
          <span className="flex flex-wrap gap-2 print:hidden">
            {allowed('plan.revise', viewer.role) && placing === 'before' && (
              <LinkButton href={`${here}/plan`}>Revise the plan</LinkButton>
            )}
            {allowed('pour.create', viewer.role) && (
              <LinkButton href={`/pours/new?from=${sheet.pourId}`} variant="quiet">
                Plan another like it
              </LinkButton>
            )}
          </span>
        }
      >
        <PlanFacts plan={sheet.plan} revisions={header.revisions} viewer={viewer} />
      </SheetFrame>
      <SheetFrame id="record" heading="The record" aside="the latest; nothing is ever taken out">
        <div className="grid gap-3">
          <ChainState chain={chain} />
          <RecordList {...{ sheet, viewer }} lines={recordPage(lines, {}, LATEST).lines} />
          <div className="print:hidden">
            <LinkButton href={`${here}/record`}>The whole record, {lines.length} entries</LinkButton>
          </div>
        </div>
      </SheetFrame>
    </PageMain>
  );
}
