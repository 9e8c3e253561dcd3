import { PourTimeline } from '@/components/drawings/pour-timeline';
import type { MarkKind } from '@/components/drawings/mark-words';
import { formatInstant } from '@/components/ui/format-instant';
import { pourStateWords } from '@/lib/inspection/pour-state';
import type { PourState } from '@/lib/inspection/sheet-types';
import { holdCountWords } from './holds-by-role';
import type { ListedPour } from './pours-table';
import { eveningBefore, startOfDay } from './project-time';

const marks: Record<PourState, MarkKind> = {
  'no-plan': 'unread',
  'not-read': 'unread',
  held: 'not-met-low',
  ready: 'met-flagged',
  released: 'met',
  placing: 'met',
  placed: 'met',
  'placed-without-release': 'not-met-low',
};

const DAYS = 14;

/** The mark and the words of a pour in lists: where it stands, and who is to move. */
export function pourStanding(pour: Pick<ListedPour, 'state' | 'holdsByRole' | 'holdsTotal'>): {
  mark: MarkKind;
  words: string;
} {
  const onlyEngineer = pour.holdsTotal > 0 && pour.holdsByRole.engineer === pour.holdsTotal;
  const shows = pour.state === 'held' || pour.state === 'not-read';
  return {
    mark: pour.state === 'held' && onlyEngineer ? 'met-flagged' : marks[pour.state],
    words:
      shows && pour.holdsTotal > 0
        ? `${pour.state === 'not-read' ? 'not read yet · ' : ''}${holdCountWords(pour.holdsByRole)}`
        : pourStateWords[pour.state],
  };
}

/** The next two weeks against time, with the evening before each pour dotted. */
export function PoursTimeline({
  pours,
  now,
  timeZone,
}: {
  pours: readonly ListedPour[];
  now: string;
  timeZone: string;
}) {
  const from = startOfDay(now, timeZone);
  const planned = pours.flatMap((pour) => (pour.plannedAt ? [{ ...pour, plannedAt: pour.plannedAt }] : []));
  const last = planned.reduce((latest, pour) => Math.max(latest, Date.parse(pour.plannedAt)), 0);
  const span = Math.min(DAYS, Math.max(7, Math.ceil((last - Date.parse(from)) / 86_400_000) + 1));
  const to = new Date(Date.parse(from) + span * 86_400_000).toISOString();
  const shown = planned.filter((pour) => pour.plannedAt >= from && pour.plannedAt < to);
  if (shown.length === 0) return <p className="text-pencil">No pour is planned in the next two weeks.</p>;
  return (
    <PourTimeline
      label="Pours of the next two weeks"
      pours={shown.map((pour) => ({
        id: pour.id,
        number: pour.number,
        title: pour.title,
        href: `/pours/${pour.id}`,
        plannedAt: pour.plannedAt,
        deadlineAt: eveningBefore(pour.plannedAt, timeZone),
        ...pourStanding(pour),
      }))}
      {...{ from, to, now, timeZone }}
      format={(instant, style) => formatInstant(instant, timeZone, style)}
    />
  );
}
