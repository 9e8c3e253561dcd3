import { standingReleases } from '@/lib/inspection/pour-state';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { CertificateButton } from './certificate-button';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime, timeAway } from './project-time';
import { VoidRelease } from './void-release';

/** A release as the register knows it. */
export interface ListedRelease {
  number: number;
  releaseId: string;
  token: string;
  releasedAt: string;
  validUntil: string;
  voidedAt: string | null;
  voidReason: string | null;
}

/** The releases of a pour, what has become of each, and the attempts that were refused. */
export function ReleasesPanel({
  sheet,
  releases,
  viewer,
  mayVoid,
}: {
  sheet: Sheet;
  releases: readonly ListedRelease[];
  viewer: OfficeViewer;
  mayVoid: boolean;
}) {
  if (releases.length === 0 && sheet.refusals.length === 0) return null;
  const begun = sheet.placing.started !== null;
  const standing = new Set(standingReleases(sheet, viewer.now).map(({ entry }) => entry.id));
  const scopeOf = (releaseId: string) => {
    const release = sheet.releases.find((one) => one.entry.id === releaseId);
    const ids = release?.entry.body.scope.elementIds ?? null;
    if (ids === null) return 'the whole pour';
    return ids.map((id) => sheet.plan.elements.find((one) => one.id === id)?.mark ?? id).join(', ');
  };
  return (
    <div className="grid gap-2">
      <ul>
        {releases.map((release) => {
          const stands = standing.has(release.releaseId);
          const word = release.voidedAt
            ? 'void'
            : !stands
              ? 'validity is over'
              : begun
                ? 'placing began under it'
                : 'stands';
          return (
            <li key={release.releaseId} className="grid gap-1 border-t border-rule py-2">
              <p className="font-label text-lead font-semibold">
                <a href={`/released/${release.token}`} className="text-chalk underline underline-offset-4">
                  Release {release.number}
                </a>
                {', '}
                <span className={stands ? 'text-met' : 'text-hold'}>{word}</span>
              </p>
              <p className="text-pencil">
                {`Given ${dayAndTime(release.releasedAt, viewer.timeZone)} for ${scopeOf(release.releaseId)}. `}
                {release.voidedAt
                  ? `Void since ${dayAndTime(release.voidedAt, viewer.timeZone)}: ${release.voidReason ?? ''}`
                  : `Until the start of placing, at the latest ${dayAndTime(release.validUntil, viewer.timeZone)}${begun ? '' : ` (${timeAway(release.validUntil, viewer.now)})`}.`}
              </p>
              <div className="flex flex-wrap gap-2 print:hidden">
                <CertificateButton
                  pourId={sheet.pourId}
                  releaseId={release.releaseId}
                  number={release.number}
                />
                {mayVoid && stands && (
                  <VoidRelease pourId={sheet.pourId} releaseId={release.releaseId} number={release.number} />
                )}
              </div>
            </li>
          );
        })}
      </ul>
      {sheet.refusals.length > 0 && (
        <p className="text-label text-pencil">
          {sheet.refusals.length} refused {sheet.refusals.length === 1 ? 'attempt is' : 'attempts are'} on
          record, the last by {viewer.people.get(sheet.refusals.at(-1)?.authorId ?? '') ?? 'somebody'},{' '}
          {dayAndTime(sheet.refusals.at(-1)?.recordedAt ?? viewer.now, viewer.timeZone)}.
        </p>
      )}
    </div>
  );
}
