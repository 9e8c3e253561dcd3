import type { Sheet } from '@/lib/inspection/sheet-types';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { personName } from './entry-words';
import type { OfficeViewer } from './office-viewer';
import { fullTime } from './project-time';
import { decisionRuleWords, decisionWords } from './state-words';

/** What a release of the pour would rest on, as it stands now. */
export function ReleaseRests({
  sheet,
  viewer,
  digest,
}: {
  sheet: Sheet;
  viewer: OfficeViewer;
  digest: string;
}) {
  const readings = sheet.faces.reduce(
    (sum, face) =>
      sum + [...face.points, ...face.spots].reduce((count, point) => count + point.readings.length, 0),
    0,
  );
  const drawings = [
    ...new Set(sheet.plan.elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`)),
  ];
  const standing = sheet.signatures.filter((one) => one.stands);
  const decided = sheet.nonconformances.filter((one) => one.disposition && !one.withdrawn);
  const during = sheet.conditions.filter((one) => one.condition.stage === 'during-placing');
  return (
    <dl className="grid gap-x-6 sm:grid-cols-[max-content_1fr] sm:gap-y-1">
      <Line label="Plan">rev {revisionLetter(sheet.plan.revision)}</Line>
      <Line label="Drawings">{drawings.join(', ')}</Line>
      <Line label="Mix">{sheet.plan.mix?.name ?? 'not named'}</Line>
      <Line label="Readings">
        {readings} readings, {sheet.checks.filter((check) => check.governing).length} of {sheet.checks.length}{' '}
        checks answered
      </Line>
      <Line label="Decision rule">{decisionRuleWords(sheet.plan.decisionRule)}</Line>
      <Line label="Decisions">
        {decided.length === 0
          ? 'none'
          : decided
              .map(
                (one) =>
                  `${one.entry.body.title}: ${one.disposition ? decisionWords[one.disposition.body.decision].toLowerCase() : ''}`,
              )
              .join('; ')}
      </Line>
      <Line label="Conditions during placing">
        {during.length === 0
          ? 'none'
          : during.map(({ condition }) => `${condition.text} (met when: ${condition.criterion})`).join('; ')}
      </Line>
      <Line label="Signatures">
        {standing.length === 0
          ? 'none that stands'
          : standing
              .map((one) => `${one.entry.body.as}: ${personName(one.entry.authorId, viewer.people)}`)
              .join('; ')}
      </Line>
      <Line label="Last walk">
        {sheet.lastWalk
          ? `${fullTime(sheet.lastWalk.recordedAt, viewer.timeZone)}, ${sheet.lastWalk.body.places}`
          : sheet.plan.lastWalk
            ? 'not walked, or set aside since'
            : 'not asked for by the plan'}
      </Line>
      <Line label="Validity">
        until the start of placing, at the latest {sheet.plan.validityHours} h after it is given
      </Line>
      <Line label="Digest of the sheet">
        <span className="font-figure text-label break-all">{digest}</span>
      </Line>
    </dl>
  );
}

function Line({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <>
      <dt className="font-label font-medium text-pencil max-sm:text-label">{label}</dt>
      <dd className="min-w-0 max-sm:pb-1.5">{children}</dd>
    </>
  );
}
