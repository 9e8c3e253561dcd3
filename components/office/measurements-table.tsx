import type { ReactNode } from 'react';
import { MarkIcon } from '@/components/drawings/mark';
import type { MarkKind } from '@/components/drawings/mark-words';
import type { Verdict } from '@/lib/concrete/judge-reading';
import { judgedMeasurement } from '@/lib/inspection/judged-words';
import { limitWords, measuredText } from '@/lib/inspection/measured-words';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { personName } from './entry-words';
import { JudgedDetails } from './judged-details';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime } from './project-time';
import { RuledTable, type RuledRow } from './ruled-table';

const marks: Record<Verdict, { mark: MarkKind; word: string }> = {
  met: { mark: 'met', word: 'met' },
  'not-met': { mark: 'not-met-low', word: 'not met' },
  'not-verified': { mark: 'not-verified', word: 'not verified' },
};

/** What the plan asks to be measured, each place with its verdict. */
export function MeasurementsTable({ sheet, viewer }: { sheet: Sheet; viewer: OfficeViewer }) {
  return (
    <RuledTable
      caption="Measurements"
      captionHidden
      empty="The plan asks for no measurements."
      columns={[
        { key: 'what', head: 'What, and its limits', className: 'min-w-40' },
        { key: 'value', head: 'Measured', figure: true },
        { key: 'verdict', head: 'Verdict', className: 'min-w-40' },
        { key: 'place', head: 'Place' },
        { key: 'by', head: 'By', className: 'whitespace-nowrap print:whitespace-normal' },
      ]}
      rows={sheet.measurements.flatMap((state): RuledRow[] => {
        const head = {
          what: (
            <>
              {state.item.title}
              <span className="block text-label text-pencil">
                {limitWords(state.item, sheet.plan.units)}.{' '}
                {new Set(state.places.map((one) => one.current?.place ?? one.entry.body.place)).size} of{' '}
                {state.item.required} places{state.item.loaded ? ', before, under and after load' : ''}
              </span>
            </>
          ),
        };
        if (state.places.length === 0) {
          return [
            {
              key: state.item.id,
              id: `measurement-${state.item.id}`,
              cells: { ...head, place: '–', value: '–', verdict: <Mark verdict={null} reason="" /> },
            },
          ];
        }
        return state.places.map((place, index) => ({
          key: place.entry.id,
          id: index === 0 ? `measurement-${state.item.id}` : undefined,
          cells: {
            ...(index === 0 ? head : { what: <span className="sr-only">{state.item.title}</span> }),
            place: [
              place.entry.body.place || 'not named',
              place.entry.body.stage === 'single' ? '' : `${place.entry.body.stage} load`,
            ]
              .filter(Boolean)
              .join(', '),
            value:
              place.current === null ? (
                <del>{measuredText(place.entry.body.value)}</del>
              ) : place.amendments.some((one) => one.counts) ? (
                <span className="grid justify-items-end">
                  <del>{measuredText(place.entry.body.value)}</del>
                  <ins className="no-underline">{measuredText(place.current.value)}</ins>
                </span>
              ) : (
                measuredText(place.current.value)
              ),
            verdict: (
              <Mark
                verdict={place.current === null ? null : place.verdict}
                reason={place.current === null ? 'withdrawn' : place.verdict === 'met' ? '' : place.reason}
                judged={
                  place.current && (
                    <JudgedDetails
                      about={`${state.item.title}, ${place.current.place || 'place not named'}`}
                      judged={judgedMeasurement(state.item, place, sheet.plan.units)}
                    />
                  )
                }
              />
            ),
            by: `${personName(place.entry.authorId, viewer.people)}, ${dayAndTime(place.entry.body.measuredAt, viewer.timeZone)}`,
          },
        }));
      })}
    />
  );
}

function Mark({ verdict, reason, judged }: { verdict: Verdict | null; reason: string; judged?: ReactNode }) {
  const shown =
    verdict === null ? { mark: 'unread' as const, word: reason || 'not measured' } : marks[verdict];
  return (
    <div className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-1.5">
      <MarkIcon kind={shown.mark} className="mt-0.5" />
      <div>
        {shown.word}
        {verdict !== null && reason && <span className="block text-label text-pencil">{reason}</span>}
        {judged}
      </div>
    </div>
  );
}
