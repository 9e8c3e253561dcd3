import type { BodyOf, Entry, EntryOf } from './entry';
import { holds, holdsInScope } from './holds';
import { blockCheckPasses } from './instruments';
import { isMaterial } from './judge-signatures';
import { elementsOf, inScope } from './scope';
import type { ReleaseState, Sheet } from './sheet-types';

interface Cause {
  cause: string;
  reason: string;
  at: string;
  causedBy: string | null;
}

const siteEventWords: Record<BodyOf<'site-event'>['kind'], string> = {
  rain: 'Rain at or over the limit of the project, or of unknown amount.',
  'washed-soil': 'Soil was washed into the form.',
  ice: 'Ice on the steel or in the form.',
  'bar-changed': 'A bar was changed.',
  'form-changed': 'The form was changed.',
  'embed-changed': 'An embedded item was changed.',
  traffic: 'Traffic or storage on the mat.',
  'ticket-differs': 'A batch ticket names another mix.',
  'no-light': 'There was no light to inspect by.',
  other: 'Voided by a person on site.',
};

/**
 * The voids that have to be written now: for each release that stands on paper, the first cause since it was given,
 * from the cause's own time. A void is never lifted.
 */
export function voidsFollowing(sheet: Sheet, now: string): BodyOf<'release-void'>[] {
  const open = sheet.releases.filter((release) => release.voided === null && sheet.placing.finished === null);
  if (open.length === 0) return [];
  const byId = new Map(sheet.entries.map((entry) => [entry.id, entry]));
  return open.flatMap((release) => {
    const cause = causeOf(sheet, byId, release, now);
    return cause ? [{ releaseId: release.entry.id, ...cause }] : [];
  });
}

function causeOf(
  sheet: Sheet,
  byId: ReadonlyMap<string, Entry>,
  release: ReleaseState,
  now: string,
): Cause | null {
  const scope = release.entry.body.scope;
  const given = release.entry.seq ?? 0;
  const later = sheet.entries.filter(
    (entry) => (entry.seq ?? Infinity) > given && entry.type !== 'release-void',
  );
  const causing = later.find(
    (entry) => isMaterial(entry, sheet.plan) && inScope(elementsOf(entry, byId, sheet.plan), scope),
  );
  if (causing) return { ...causeWords(causing), at: timeOf(causing), causedBy: causing.id };

  const standing = holdsInScope(holds(sheet, now), scope)[0];
  const failed = later.findLast((entry) => entry.type === 'block-check' && !blockCheckPasses(entry.body));
  if (standing?.kind === 'not-verified' && failed) {
    return {
      cause: 'instrument-suspect',
      reason: 'An instrument that it rests on failed its block check.',
      at: timeOf(failed),
      causedBy: failed.id,
    };
  }
  if (standing) {
    const last = later.at(-1);
    return {
      cause: 'new-hold',
      reason: `A hold stands in its scope: ${standing.title}.`,
      at: last ? timeOf(last) : now,
      causedBy: last?.id ?? null,
    };
  }
  const started = sheet.placing.started?.body.at ?? null;
  if ((started ?? now) > release.entry.body.validUntil) {
    return {
      cause: 'validity-over',
      reason: 'Its validity ended before placing started.',
      at: release.entry.body.validUntil,
      causedBy: null,
    };
  }
  return null;
}

function causeWords(entry: Entry): { cause: string; reason: string } {
  switch (entry.type) {
    case 'site-event':
      return {
        cause: entry.body.kind,
        reason: entry.body.text
          ? `${siteEventWords[entry.body.kind]} ${entry.body.text}`
          : siteEventWords[entry.body.kind],
      };
    case 'plan-issued':
      return { cause: 'plan-revised', reason: 'A plan revision was issued that touches its scope.' };
    case 'drawing-received':
      return {
        cause: 'drawing-received',
        reason: `Drawing ${entry.body.number} rev ${entry.body.revision} was received.`,
      };
    case 'mix-changed':
      return { cause: 'mix-changed', reason: `The mix was changed to ${entry.body.name}.` };
    case 'amendment':
      return { cause: 'amended', reason: 'An entry that it rests on was amended.' };
    case 'reading':
      return { cause: 'later-reading', reason: 'A reading was recorded after it was given.' };
    default:
      return {
        cause: 'later-entry',
        reason: 'Something was recorded after it was given that it does not cover.',
      };
  }
}

/** The event's own time: when it was measured or happened, not when it arrived. */
function timeOf(entry: Entry): string {
  switch (entry.type) {
    case 'reading':
    case 'measurement':
      return entry.body.measuredAt;
    case 'site-event':
    case 'block-check':
    case 'drawing-received':
      return entry.body.at;
    default:
      return entry.recordedAt;
  }
}

/** A placement that began while no release stood for what was placed, and is not on record as such yet. */
export function placedWithoutRelease(sheet: Sheet): EntryOf<'placement'> | null {
  const started = sheet.placing.started;
  if (!started || sheet.placing.withoutRelease) return null;
  const covered = sheet.releases.some(
    ({ entry, voided }) =>
      entry.recordedAt <= started.body.at &&
      started.body.at <= entry.body.validUntil &&
      (voided === null || voided.body.at > started.body.at) &&
      (entry.body.scope.elementIds === null ||
        (started.body.elementIds?.every((id) => entry.body.scope.elementIds?.includes(id)) ?? false)),
  );
  return covered ? null : started;
}
