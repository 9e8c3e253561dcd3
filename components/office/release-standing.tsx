import { LinkButton } from '@/components/ui/link-button';
import { Notice } from '@/components/ui/notice';
import { currentRelease } from '@/lib/inspection/pour-state';
import { roleWords } from '@/lib/inspection/roles';
import type { Hold, PourState, Sheet } from '@/lib/inspection/sheet-types';
import { holdsByRole } from './holds-by-role';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime, eveningBefore, fullTime, timeAway } from './project-time';

/** Whether concrete may come, and when: the first thing that is read at five in the morning. */
export function ReleaseStanding({
  sheet,
  holds,
  state,
  plannedAt,
  viewer,
  mayGive,
}: {
  sheet: Sheet;
  holds: readonly Hold[];
  state: PourState;
  plannedAt: string | null;
  viewer: OfficeViewer;
  /** Leads to the release, for those who give it. */
  mayGive: boolean;
}) {
  const { started, finished } = sheet.placing;
  if (started) {
    return (
      <div className="grid gap-3">
        {state === 'placed-without-release' && (
          <Notice tone="hold" role="note" title="Concrete was placed without a release">
            <p>This is on record. No release can be dated after placing.</p>
          </Notice>
        )}
        <p>
          Placing started {fullTime(started.body.at, viewer.timeZone)}
          {finished && `, finished ${fullTime(finished.body.at, viewer.timeZone)}`}.
        </p>
        <ConditionsAhead sheet={sheet} />
      </div>
    );
  }
  return (
    <div className="grid gap-3">
      <HoldsAgainst {...{ holds, viewer }} />
      <Planned {...{ sheet, holds, plannedAt, viewer }} />
      {mayGive && (
        <div className="print:hidden">
          <LinkButton
            href={`/pours/${sheet.pourId}/release`}
            variant={holds.length === 0 && state !== 'released' ? 'primary' : 'secondary'}
          >
            {holds.length === 0 && state !== 'released' ? 'Go to the release' : 'Look at the release'}
          </LinkButton>
        </div>
      )}
    </div>
  );
}

/** How many holds stand and who clears them, each name leading to its own. */
function HoldsAgainst({ holds, viewer }: { holds: readonly Hold[]; viewer: OfficeViewer }) {
  if (holds.length === 0)
    return <p>No hold stands against a release, at the points read and for the items checked.</p>;
  return (
    <div>
      <p className="font-label text-lead font-semibold">
        {holds.length} {holds.length === 1 ? 'hold stands' : 'holds stand'} against a release of the whole
        pour.
      </p>
      <ul className="flex flex-wrap gap-x-4">
        {holdsByRole(holds, viewer.role).map(({ role, holds: group }) => (
          <li key={role}>
            <a
              href={`#holds-${role}`}
              className="inline-flex min-h-target items-center gap-1.5 font-label font-semibold text-chalk underline underline-offset-4"
            >
              {role === viewer.role ? 'Yours' : roleWords[role]}
              <span className="font-figure text-label font-medium">{group.length}</span>
            </a>
          </li>
        ))}
      </ul>
    </div>
  );
}

/** When placing is planned, by when the holds have to be clear, and whether a release that stands lasts until then. */
function Planned({
  sheet,
  holds,
  plannedAt,
  viewer,
}: {
  sheet: Sheet;
  holds: readonly Hold[];
  plannedAt: string | null;
  viewer: OfficeViewer;
}) {
  const { now, timeZone } = viewer;
  if (!plannedAt) return <p className="text-pencil">No time is planned for placing.</p>;
  const clearBy = eveningBefore(plannedAt, timeZone);
  const release = currentRelease(sheet, now);
  const endsFirst = release !== null && release.entry.body.validUntil < plannedAt;
  return (
    <>
      <p>
        Placing is planned {dayAndTime(plannedAt, timeZone)}, {timeAway(plannedAt, now)}.
        {holds.length > 0 &&
          plannedAt > now &&
          (clearBy > now
            ? ` Holds have to be clear by ${dayAndTime(clearBy, timeZone)}, ${timeAway(clearBy, now)}.`
            : ` Holds had to be clear by ${dayAndTime(clearBy, timeZone)}.`)}
      </p>
      {endsFirst && (
        <Notice tone="watch" role="note">
          <p>
            Release {release.entry.body.number} ends {dayAndTime(release.entry.body.validUntil, timeZone)},
            before placing is planned to start. It will need a new one.
          </p>
        </Notice>
      )}
    </>
  );
}

/** Conditions that still have to be verified once concrete is coming or has come. */
function ConditionsAhead({ sheet }: { sheet: Sheet }) {
  const open = sheet.conditions.filter(({ verified }) => verified?.body.outcome !== 'met');
  if (open.length === 0) return null;
  return (
    <p>
      <a href="#conditions" className="font-label font-semibold text-chalk underline underline-offset-4">
        {open.length} {open.length === 1 ? 'condition is' : 'conditions are'} still to be verified
      </a>
      {open.some(({ condition }) => condition.stage === 'after-pour') &&
        ', and the final report waits for those after the pour'}
      .
    </p>
  );
}
