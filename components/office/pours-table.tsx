import Link from 'next/link';
import { MarkIcon } from '@/components/drawings/mark';
import { EmptyState } from '@/components/ui/empty-state';
import { LinkButton } from '@/components/ui/link-button';
import { Time } from '@/components/ui/time';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { pourStateWords } from '@/lib/inspection/pour-state';
import type { Role } from '@/lib/inspection/roles';
import type { PourState } from '@/lib/inspection/sheet-types';
import { holdCountWords } from './holds-by-role';
import { LinkPending } from './link-pending';
import { poursHref, type PoursQuery } from './pours-query';
import { pourStanding } from './pours-timeline';
import { RuledTable, type RuledColumn } from './ruled-table';

/** A pour as lists show it. */
export interface ListedPour {
  id: string;
  number: string;
  title: string;
  location: string;
  plannedAt: string | null;
  planRevision: number;
  state: PourState;
  holdsTotal: number;
  holdsByRole: Partial<Record<Role, number>>;
  notMet: number;
  readings: number;
  pointsRead: number;
  pointsTotal: number;
  releaseNumber: number | null;
  validUntil: string | null;
}

const compare: Record<PoursQuery['sort'], (a: ListedPour, b: ListedPour) => number> = {
  planned: (a, b) => (a.plannedAt ?? '9').localeCompare(b.plannedAt ?? '9'),
  number: (a, b) => a.number.localeCompare(b.number, 'en', { numeric: true }),
  title: (a, b) => a.title.localeCompare(b.title),
  state: (a, b) => pourStateWords[a.state].localeCompare(pourStateWords[b.state]),
  holds: (a, b) => a.holdsTotal - b.holdsTotal,
  read: (a, b) => a.pointsRead / (a.pointsTotal || 1) - b.pointsRead / (b.pointsTotal || 1),
};

/** The rows of one page of the list, in the order asked for. */
export function sortPours(
  pours: readonly ListedPour[],
  query: Pick<PoursQuery, 'sort' | 'order'>,
): ListedPour[] {
  const sorted = [...pours].sort(compare[query.sort]);
  return query.order === 'down' ? sorted.reverse() : sorted;
}

/** Pours as a table; every column heading sorts by it. */
export function PoursTable({
  pours,
  query,
  timeZone,
  mayPlan,
}: {
  pours: readonly ListedPour[];
  query: PoursQuery;
  timeZone: string;
  mayPlan: boolean;
}) {
  const filtered = Boolean(query.state || query.text || query.clears);
  const head = (key: PoursQuery['sort'], words: string, more: Partial<RuledColumn> = {}): RuledColumn => {
    const current = query.sort === key;
    return {
      key,
      words,
      ...more,
      sort: current ? (query.order === 'up' ? 'ascending' : 'descending') : undefined,
      head: (
        <Link
          prefetch={false}
          className="inline-block py-0.5 text-inherit underline decoration-1 underline-offset-4 hover:text-chalk"
          href={poursHref(query, { sort: key, order: current && query.order === 'up' ? 'down' : 'up' })}
        >
          {words}
          {current && <span aria-hidden="true">{query.order === 'up' ? ' ↑' : ' ↓'}</span>}
        </Link>
      ),
    };
  };
  return (
    <RuledTable
      caption="Pours"
      captionHidden
      columns={[
        head('number', 'Pour'),
        head('title', 'Element and location', { className: 'min-w-44', beside: true }),
        head('planned', 'Planned', { className: 'whitespace-nowrap' }),
        { key: 'plan', head: 'Plan' },
        head('state', 'State', { className: 'min-w-32 max-sm:hidden' }),
        head('holds', 'Holds and who clears them', { className: 'min-w-48', words: 'Holds' }),
        head('read', 'Points read', { figure: true }),
        { key: 'notMet', head: 'Not met', figure: true },
      ]}
      rows={sortPours(pours, query).map((pour) => ({
        key: pour.id,
        cells: {
          number: (
            <Link
              prefetch={false}
              href={`/pours/${pour.id}`}
              className="inline-block min-h-6 font-label font-semibold whitespace-nowrap text-chalk underline underline-offset-4"
            >
              {pour.number}
              <LinkPending />
            </Link>
          ),
          title: (
            <>
              {pour.title}
              <span className="block text-label text-pencil">{pour.location}</span>
              {/* On a phone the state stands under what is placed, where it is looked for. */}
              <span className="flex items-center gap-1.5 text-label sm:hidden">
                <MarkIcon kind={pourStanding(pour).mark} />
                {pourStateWords[pour.state]}
              </span>
            </>
          ),
          planned: pour.plannedAt ? <Time instant={pour.plannedAt} timeZone={timeZone} /> : 'not planned',
          plan: pour.planRevision > 0 ? `rev ${revisionLetter(pour.planRevision)}` : 'missing',
          state: (
            <span className="flex items-start gap-1.5">
              <MarkIcon kind={pourStanding(pour).mark} />
              {pourStateWords[pour.state]}
              {pour.state === 'released' && pour.releaseNumber !== null && ` (${pour.releaseNumber})`}
            </span>
          ),
          holds: holdCountWords(pour.holdsByRole),
          read: `${pour.pointsRead}/${pour.pointsTotal}`,
          notMet: pour.notMet,
        },
      }))}
      empty={
        filtered ? (
          <EmptyState title="No pour matches" action={<LinkButton href="/pours">Show all pours</LinkButton>}>
            Change what is asked for above.
          </EmptyState>
        ) : (
          <EmptyState
            title="No pours yet"
            action={
              mayPlan && (
                <LinkButton href="/pours/new" variant="primary">
                  Plan a pour
                </LinkButton>
              )
            }
          >
            A pour starts with its plan: what has to be in the form, and how deep.
          </EmptyState>
        )
      }
    />
  );
}
