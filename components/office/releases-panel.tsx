import { LinkButton } from '@/components/ui/link-button';
import { Notice } from '@/components/ui/notice';
import type { Hold, PourState, Sheet } from '@/lib/inspection/sheet-types';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime, fullTime, timeAway } from './project-time';
import { CertificateButton } from './certificate-button';
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

/** Where the release of a pour stands: what is in the way, what was given, what has become of it. */
export function ReleasesPanel({
  sheet,
  releases,
  holds,
  state,
  viewer,
  mayGive,
  mayVoid,
}: {
  sheet: Sheet;
  releases: readonly ListedRelease[];
  holds: readonly Hold[];
  state: PourState;
  viewer: OfficeViewer;
  mayGive: boolean;
  mayVoid: boolean;
}) {
  const begun = sheet.placing.started !== null;
  const scopeOf = (releaseId: string) => {
    const release = sheet.releases.find((one) => one.entry.id === releaseId);
    const ids = release?.entry.body.scope.elementIds ?? null;
    if (ids === null) return 'the whole pour';
    return ids.map((id) => sheet.plan.elements.find((one) => one.id === id)?.mark ?? id).join(', ');
  };
  return (
    <div className="grid gap-3">
      {state === 'placed-without-release' && (
        <Notice tone="hold" role="note" title="Concrete was placed without a release">
          <p>This is on record. No release can be dated after placing.</p>
        </Notice>
      )}
      {!begun && (
        <p>
          {holds.length === 0
            ? 'No hold stands against a release, at the points read and for the items checked.'
            : `${holds.length} ${holds.length === 1 ? 'hold stands' : 'holds stand'} against a release of the whole pour.`}
        </p>
      )}
      {begun && sheet.placing.started && (
        <p>
          Placing started {fullTime(sheet.placing.started.body.at, viewer.timeZone)}
          {sheet.placing.finished &&
            `, finished ${fullTime(sheet.placing.finished.body.at, viewer.timeZone)}`}
          .
        </p>
      )}
      {mayGive && !begun && (
        <div>
          <LinkButton
            href={`/pours/${sheet.pourId}/release`}
            variant={holds.length === 0 ? 'primary' : 'secondary'}
          >
            {holds.length === 0 ? 'Go to the release' : 'Look at the release'}
          </LinkButton>
        </div>
      )}
      {releases.length > 0 && (
        <ul>
          {releases.map((release) => {
            const over = !release.voidedAt && !begun && release.validUntil < viewer.now;
            return (
              <li
                key={release.releaseId}
                className="grid gap-x-4 border-t border-rule py-2 sm:grid-cols-[1fr_auto]"
              >
                <div>
                  <p className="font-label text-lead font-semibold">
                    <a
                      href={`/released/${release.token}`}
                      className="text-chalk underline underline-offset-4"
                    >
                      Release {release.number}
                    </a>{' '}
                    <span className={release.voidedAt || over ? 'text-hold' : 'text-met'}>
                      {release.voidedAt ? 'void' : over ? 'validity is over' : 'stands'}
                    </span>
                  </p>
                  <p className="text-pencil">
                    {`Given ${dayAndTime(release.releasedAt, viewer.timeZone)} for ${scopeOf(release.releaseId)}. `}
                    {release.voidedAt
                      ? `Void since ${dayAndTime(release.voidedAt, viewer.timeZone)}: ${release.voidReason ?? ''}`
                      : `Until the start of placing, at the latest ${dayAndTime(release.validUntil, viewer.timeZone)}${begun ? '' : ` (${timeAway(release.validUntil, viewer.now)})`}.`}
                  </p>
                </div>
                <div className="flex flex-wrap content-start gap-2">
                  <CertificateButton
                    pourId={sheet.pourId}
                    releaseId={release.releaseId}
                    number={release.number}
                  />
                  {mayVoid && !release.voidedAt && (
                    <VoidRelease
                      pourId={sheet.pourId}
                      releaseId={release.releaseId}
                      number={release.number}
                    />
                  )}
                </div>
              </li>
            );
          })}
        </ul>
      )}
      {sheet.refusals.length > 0 && (
        <p className="text-label text-pencil">
          {sheet.refusals.length} refused {sheet.refusals.length === 1 ? 'attempt is' : 'attempts are'} on
          record.
        </p>
      )}
    </div>
  );
}
