import type { Entry, EntryOf } from '@/lib/inspection/entry';
import type { ReleaseScope } from '@/lib/inspection/entry-bodies';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { roleWords, type Role } from '@/lib/inspection/roles';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import type { MailPayload } from '../jobs/enqueue-job';

const everybodyButCrew: readonly Role[] = [
  'superintendent',
  'inspector',
  'engineer',
  'coordinator',
  'viewer',
];

/** Who is told of what, by role. Whoever was told of a release is told that it is void. */
export const toldTo: Record<MailPayload['kind'], readonly Role[]> = {
  hold: ['superintendent', 'inspector'],
  'disposition-asked': ['engineer', 'superintendent'],
  decided: ['superintendent', 'inspector', 'engineer'],
  released: everybodyButCrew,
  void: everybodyButCrew,
};

export interface MailContext {
  kind: MailPayload['kind'];
  entry: Entry;
  pour: { id: string; number: string; title: string; location: string; plannedAt: string | null };
  project: { name: string; timeZone: string };
  sheet: Sheet;
  holds: Hold[];
  nameOf: (personId: string) => string;
  releaseToken: string | null;
  headHash: string | null;
  appUrl: string;
}

const inZone = (iso: string, timeZone: string): string =>
  new Intl.DateTimeFormat('en-GB', {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    hour: '2-digit',
    minute: '2-digit',
    timeZone,
  }).format(new Date(iso));

const decisions: Record<EntryOf<'disposition'>['body']['decision'], string> = {
  rework: 'rework to the drawings',
  repair: 'repair',
  'use-as-is': 'use as is',
  reject: 'reject',
};

/** Subject and text of a mail about one event of a pour: plain words, what is needed and from whom, and where to look. */
export function composeMail(context: MailContext): { subject: string; text: string } {
  const { pour, project, sheet, holds } = context;
  const { headline, lines, link } = eventOf(context);
  const standing = holds
    .slice(0, 12)
    .map((hold) => `- ${hold.title} (${hold.where}). ${roleWords[hold.clearedBy]}: ${hold.need}`);
  const planned = pour.plannedAt ? inZone(pour.plannedAt, project.timeZone) : 'not planned yet';
  const text = [
    headline,
    '',
    `Pour      ${pour.number} ${pour.title}`,
    `Where     ${pour.location}`,
    `Planned   ${planned} (${project.timeZone})`,
    `Plan      rev ${revisionLetter(sheet.plan.revision)}`,
    `Project   ${project.name}`,
    '',
    ...lines,
    '',
    ...(standing.length > 0
      ? [`What stands in the way now (${holds.length}):`, ...standing]
      : ['Nothing stands in the way now, at the points read and for the items checked.']),
    '',
    `See it: ${context.appUrl}${link}`,
    '',
    ...(context.headHash ? [`Head of the record when this was written: ${context.headHash}`] : []),
    'The contract documents and the local code govern. This message is no instruction and releases nothing by itself.',
  ].join('\n');
  return { subject: `${pour.number} ${headline}`, text };
}

function scopeWords({ elementIds, limits }: ReleaseScope, sheet: Sheet): string {
  if (elementIds === null) return 'the whole pour';
  const marks = new Map(sheet.plan.elements.map((element) => [element.id, element.mark]));
  return `${elementIds.map((id) => marks.get(id) ?? id).join(', ')}. Limits: ${limits}`;
}

function eventOf(context: MailContext): { headline: string; lines: string[]; link: string } {
  const { entry, pour, nameOf, project } = context;
  const by = `${nameOf(entry.authorId)}, ${inZone(entry.recordedAt, project.timeZone)}`;
  const pourLink = `/pours/${pour.id}`;
  switch (entry.type) {
    case 'nonconformance':
      return {
        headline:
          context.kind === 'hold' ? `Hold: ${entry.body.title}` : `Decision asked: ${entry.body.title}`,
        lines: [
          `Raised by ${by}.`,
          `Where: ${entry.body.where.text || 'whole pour'}. Extent: ${entry.body.extent}`,
          ...(entry.body.proposal ? [`Proposed: ${entry.body.proposal}`] : []),
          ...(entry.body.neededBy ? [`Needed by: ${inZone(entry.body.neededBy, project.timeZone)}`] : []),
        ],
        link: `/nonconformances/${entry.id}`,
      };
    case 'disposition':
      return {
        headline: `Decided: ${decisions[entry.body.decision]}`,
        lines: [
          `Decided by ${by}, licence ${entry.body.licence}.`,
          `Reason: ${entry.body.reason}`,
          `Extent: ${entry.body.extent}`,
          ...entry.body.conditions.map(
            (condition) =>
              `Condition (${condition.stage.replace('-', ' the ')}): ${condition.text}. Met when: ${condition.criterion}`,
          ),
        ],
        link: `/nonconformances/${entry.body.nonconformanceId}`,
      };
    case 'release':
      return {
        headline: `Released, number ${entry.body.number}`,
        lines: [
          `Released by ${by}.`,
          `Scope: ${scopeWords(entry.body.scope, context.sheet)}.`,
          `Valid until the start of placing, at the latest ${inZone(entry.body.validUntil, project.timeZone)}.`,
          ...entry.body.conditions.map((condition) => `During placing: ${condition}`),
          'At the points read and for the items checked. Formwork, shoring and the authority’s own inspection are not covered unless signed for.',
        ],
        link: context.releaseToken ? `/released/${context.releaseToken}` : pourLink,
      };
    case 'release-void':
      return {
        headline: 'Release is void',
        lines: [
          entry.body.reason,
          `Void since ${inZone(entry.body.at, project.timeZone)}.`,
          ...(context.sheet.placing.started
            ? ['Placing has begun. Superintendent, inspector and engineer decide at once what is to be done.']
            : ['Do not place concrete on it. A new release needs new signatures and a new last walk.']),
        ],
        link: context.releaseToken ? `/released/${context.releaseToken}` : pourLink,
      };
    case 'placing-without-release':
      return {
        headline: 'Concrete is placed without a release',
        lines: [
          `Placing began ${inZone(entry.body.at, project.timeZone)} and no release stood. It is on record as such.`,
        ],
        link: pourLink,
      };
    default:
      return { headline: 'New hold', lines: [`Recorded by ${by}.`], link: pourLink };
  }
}
