import type { Metadata } from 'next';
import { Caution } from '@/components/office/caution';
import { LivePour } from '@/components/office/live-pour';
import type { OfficeViewer } from '@/components/office/office-viewer';
import { PageMain } from '@/components/office/page-main';
import { dayAndTime } from '@/components/office/project-time';
import { peopleById, wordContextOf } from '@/components/office/record-lines';
import { ReleaseForm } from '@/components/office/release-form';
import { ReleaseRests } from '@/components/office/release-rests';
import { ReleasesPanel } from '@/components/office/releases-panel';
import { RememberProject } from '@/components/office/remember-project';
import { SignaturesPanel } from '@/components/office/signatures-panel';
import { TitleOfPour } from '@/components/office/title-of-pour';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { standingReleases } from '@/lib/inspection/pour-state';
import { sheetStatement } from '@/lib/inspection/sheet-statement';
import { allowed } from '@/lib/server/access';
import { sha256 } from '@/lib/server/entry-hash';
import { readPourPage } from '../read-pour-page';

export const metadata: Metadata = { title: 'Release' };

/** What a release rests on, its scope, and the release itself, or what stands in the way. */
export default async function ReleasePage({ params }: { params: Promise<{ pourId: string }> }) {
  const {
    header,
    sheet,
    holds,
    state,
    viewer: read,
  } = await readPourPage((await params).pourId, 'release.give');
  const { timeZone } = header.project;
  const viewer: OfficeViewer = { ...read, timeZone, people: peopleById(header.people) };
  const begun = sheet.placing.started !== null;
  const validUntil = new Date(Date.parse(viewer.now) + sheet.plan.validityHours * 3_600_000).toISOString();
  const { plannedAt } = header.pour;
  const endsEarly =
    plannedAt !== null && validUntil < plannedAt
      ? `Given now, it would end ${dayAndTime(validUntil, timeZone)}, before placing is planned to start, ${dayAndTime(plannedAt, timeZone)}.`
      : null;
  return (
    <PageMain>
      <RememberProject projectId={header.project.id} />
      <SheetFrame
        heading={`Release of ${header.pour.number}`}
        level={1}
        aside={<LivePour pourId={sheet.pourId} headSeq={sheet.headSeq} />}
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
        <Caution>
          A release says that nothing stands in the way at the points read and for the items checked.
          Formwork, shoring and the authority&rsquo;s own inspection are not covered unless signed for.
        </Caution>
      </SheetFrame>
      <SheetFrame heading="What it rests on" aside="as it stands now">
        <ReleaseRests sheet={sheet} viewer={viewer} digest={sha256(sheetStatement(sheet))} />
      </SheetFrame>
      <SheetFrame heading="Signatures" aside="two different persons">
        <SignaturesPanel
          sheet={sheet}
          context={wordContextOf(sheet, viewer.people, timeZone)}
          viewer={viewer}
        />
      </SheetFrame>
      <SheetFrame heading="The release">
        {begun ? (
          <p>Placing has begun. No release can be dated after it.</p>
        ) : (
          <ReleaseForm
            pourId={sheet.pourId}
            holds={holds}
            endsEarly={endsEarly}
            standing={standingReleases(sheet, viewer.now).map(({ entry }) => ({
              number: entry.body.number,
              elementIds: entry.body.scope.elementIds,
            }))}
            elements={sheet.plan.elements.map((element) => ({
              id: element.id,
              name: `${element.mark}, ${element.location}`,
            }))}
          />
        )}
      </SheetFrame>
      {header.releases.length > 0 && (
        <SheetFrame heading="Releases given">
          <ReleasesPanel
            {...{ sheet, viewer }}
            releases={header.releases}
            mayVoid={allowed('release.void', viewer.role)}
          />
        </SheetFrame>
      )}
    </PageMain>
  );
}
