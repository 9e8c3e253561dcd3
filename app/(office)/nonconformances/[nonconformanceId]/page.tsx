import type { Metadata } from 'next';
import Link from 'next/link';
import { acceptableEntries, facesConcerned } from '@/components/office/acceptable-entries';
import { Caution } from '@/components/office/caution';
import { ConditionsList } from '@/components/office/conditions-list';
import { DecisionList } from '@/components/office/decision-list';
import { ExtentPart, RequirementPart } from '@/components/office/decision-parts';
import { DecisionSheet } from '@/components/office/decision-sheet';
import { personName } from '@/components/office/entry-words';
import { namedSources } from '@/components/office/judged-by-name';
import { JudgedSources } from '@/components/office/judged-sources';
import { LivePour } from '@/components/office/live-pour';
import { JudgedDetails } from '@/components/office/judged-details';
import { NonconformanceStand } from '@/components/office/nonconformance-rows';
import type { OfficeViewer } from '@/components/office/office-viewer';
import { PageMain } from '@/components/office/page-main';
import { photoViews } from '@/components/office/photo-views';
import { PhotoStrip } from '@/components/office/photo-zoom';
import { PrintButton } from '@/components/office/print-button';
import { fullTime, timeAway } from '@/components/office/project-time';
import { peopleById, wordContextOf } from '@/components/office/record-lines';
import { RememberProject } from '@/components/office/remember-project';
import { similarNonconformances } from '@/components/office/similar-nonconformances';
import { decisionRuleWords } from '@/components/office/state-words';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import { findNonconformance, readNonconformanceList } from '@/db/read/nonconformance-list';
import { AppError } from '@/lib/inspection/app-error';
import { judgedNonconformance } from '@/lib/inspection/judged-nonconformance';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { recordId } from '@/lib/inspection/primitives';
import { allowed } from '@/lib/server/access';
import { withAccess } from '@/lib/server/with-access';
import { readPour } from '../../pours/[pourId]/read-pour-page';

export const metadata: Metadata = { title: 'Decision sheet' };

/** The decision sheet: all that the engineer reads before a decision, and the decision. */
export default async function DecisionPage({ params }: { params: Promise<{ nonconformanceId: string }> }) {
  const { nonconformanceId } = await params;
  const {
    header,
    sheet,
    viewer: read,
    state,
    others,
  } = await withAccess(async (page) => {
    if (!recordId.safeParse(nonconformanceId).success) throw new AppError('not-found');
    const place = await findNonconformance(page.tx, nonconformanceId);
    if (!place) throw new AppError('not-found');
    const pour = await readPour(page, place.pourId, 'nonconformances.list');
    const found = pour.sheet.nonconformances.find((one) => one.entry.id === nonconformanceId);
    if (!found) throw new AppError('not-found');
    const list = await readNonconformanceList(page.tx, { projectId: place.projectId, limit: 200 });
    return { ...pour, state: found, others: list.rows };
  });
  const { timeZone } = header.project;
  const viewer: OfficeViewer = { ...read, timeZone, people: peopleById(header.people) };
  const context = wordContextOf(sheet, viewer.people, timeZone);
  const { body } = state.entry;
  const photos = photoViews(sheet, context, state.photoIds);
  const concerned = facesConcerned(sheet, body);
  const alike = similarNonconformances({ id: nonconformanceId, title: body.title }, others);
  const decides = allowed('disposition.sign', viewer.role) && !state.withdrawn && state.status !== 'closed';
  return (
    <PageMain>
      <RememberProject projectId={header.project.id} />
      <SheetFrame
        heading={body.title}
        level={1}
        aside={<LivePour pourId={sheet.pourId} headSeq={sheet.headSeq} />}
        titleBlock={
          <TitleBlock
            cells={[
              { label: 'Nonconformance', value: `no. ${state.entry.seq ?? '–'}`, figure: true },
              { label: 'Pour', value: `${header.pour.number} ${header.pour.title}`, grow: 3 },
              { label: 'Plan', value: `rev ${revisionLetter(sheet.plan.revision)}` },
              {
                label: 'Needed by',
                value: body.neededBy ? fullTime(body.neededBy, timeZone) : 'not said',
                grow: 2,
              },
            ]}
          />
        }
      >
        <div className="grid gap-3">
          <div className="flex flex-wrap items-center justify-between gap-3">
            {state.withdrawn ? (
              <p className="font-semibold">Withdrawn</p>
            ) : (
              <NonconformanceStand status={state.status} />
            )}
            <div className="flex flex-wrap items-center gap-3">
              <Link
                href={`/pours/${sheet.pourId}`}
                prefetch={false}
                className="inline-flex min-h-target items-center text-chalk underline underline-offset-4 print:hidden"
              >
                The pour
              </Link>
              <PrintButton />
            </div>
          </div>
          <JudgedDetails about={body.title} judged={judgedNonconformance(state)} />
          <p>
            Raised by {personName(state.entry.authorId, viewer.people)},{' '}
            {fullTime(state.entry.recordedAt, timeZone)}
            {body.neededBy &&
              !state.disposition &&
              `. A decision ${body.neededBy < viewer.now ? 'was' : 'is'} needed ${timeAway(body.neededBy, viewer.now)}`}
            .
          </p>
          {body.proposal && (
            <p>
              <span className="font-label font-semibold">Proposed:</span> {body.proposal}
            </p>
          )}
          <p className="text-pencil">Decision rule: {decisionRuleWords(sheet.plan.decisionRule)}.</p>
          <Caution />
        </div>
      </SheetFrame>

      <DecisionSheet
        requirement={
          <JudgedSources sources={namedSources(sheet.plan)}>
            <RequirementPart {...{ sheet, body, concerned }} />
          </JudgedSources>
        }
        extent={<ExtentPart {...{ sheet, body, concerned, context }} />}
        photos={<PhotoStrip photos={photos} large />}
        counts={{
          requirement:
            concerned.length > 0
              ? `${concerned.length} ${concerned.length === 1 ? 'face' : 'faces'}`
              : 'of the drawings',
          extent: body.where.text || 'in words',
          photos: `${photos.length} ${photos.length === 1 ? 'photo' : 'photos'}`,
        }}
        form={
          decides
            ? {
                nonconformanceId,
                pourId: sheet.pourId,
                seenSeq: sheet.headSeq,
                timeZone,
                licence: read.licence,
                extent: body.extent,
                acceptable: acceptableEntries(sheet, body.about),
                replaces: state.disposition !== null,
              }
            : null
        }
      />

      <SheetFrame heading="Decisions so far">
        <div className="grid gap-4">
          <DecisionList {...{ state, context, viewer }} pourId={sheet.pourId} />
          {state.conditions.length > 0 && (
            <div>
              <h3 className="text-lead">Conditions</h3>
              <ConditionsList
                conditions={state.conditions}
                pourId={sheet.pourId}
                seenSeq={sheet.headSeq}
                viewer={viewer}
              />
            </div>
          )}
          {[...state.corrections, ...state.rechecks].map((entry) => (
            <p key={entry.id}>
              {entry.type === 'correction'
                ? `Correction: ${entry.body.text}`
                : `Recheck ${entry.body.outcome === 'met' ? 'met' : 'not met'}${entry.body.text ? `: ${entry.body.text}` : ''}`}
              <span className="text-label text-pencil">
                {' '}
                {personName(entry.authorId, viewer.people)}, {fullTime(entry.recordedAt, timeZone)}
              </span>
            </p>
          ))}
          {!decides && !state.withdrawn && state.status !== 'closed' && (
            <p className="text-pencil">The engineer of record decides.</p>
          )}
        </div>
      </SheetFrame>
      {alike.length > 0 && (
        <SheetFrame heading="Earlier ones like it">
          <ul>
            {alike.map((one) => (
              <li
                key={one.id}
                className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-rule py-1.5"
              >
                <Link
                  href={`/nonconformances/${one.id}`}
                  prefetch={false}
                  className="inline-block min-h-6 text-chalk underline underline-offset-4"
                >
                  {one.pour.number}: {one.title}
                </Link>
                <NonconformanceStand status={one.status} />
              </li>
            ))}
          </ul>
        </SheetFrame>
      )}
    </PageMain>
  );
}
