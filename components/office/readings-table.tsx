import { MarkIcon } from '@/components/drawings/mark';
import { markWords } from '@/components/drawings/mark-words';
import { measurerOf } from '@/lib/inspection/measurers';
import type { LengthUnit } from '@/lib/concrete/length';
import { judgedReading } from '@/lib/inspection/judged-words';
import type {
  FaceState,
  InstrumentState,
  PointState,
  ReadingState,
  Sheet,
} from '@/lib/inspection/sheet-types';
import { personName } from './entry-words';
import { byName } from './judged-by-name';
import { JudgedDetails } from './judged-details';
import { dayAndTime } from './project-time';
import { readingMark, readingText } from './reading-words';
import { RuledTable, type RuledRow } from './ruled-table';

interface TableContext {
  plan: Sheet['plan'];
  units: LengthUnit;
  timeZone: string;
  people: ReadonlyMap<string, string>;
  instruments: ReadonlyMap<string, InstrumentState>;
}

/** Every reading of a face, point by point, amended and superseded ones included: the table of its map and section. */
export function ReadingsTable({
  sheet,
  face,
  name,
  people,
  timeZone,
}: {
  sheet: Sheet;
  face: FaceState;
  name: string;
  people: ReadonlyMap<string, string>;
  timeZone: string;
}) {
  const context: TableContext = {
    plan: sheet.plan,
    units: sheet.plan.units,
    timeZone,
    people,
    instruments: new Map(sheet.instruments.map((one) => [one.instrumentId, one])),
  };
  const rows = [...face.points, ...face.spots].flatMap((point) => pointRows(point, context));
  return (
    <RuledTable
      caption={`Readings of ${name}`}
      captionHidden
      columns={[
        { key: 'point', head: 'Point', className: 'max-sm:shrink-0 max-sm:basis-20' },
        {
          key: 'cover',
          head: 'Cover',
          figure: true,
          beside: true,
          className: 'max-sm:shrink-0 max-sm:basis-16',
        },
        { key: 'verdict', head: 'Verdict', className: 'min-w-40 max-sm:flex-1', beside: true },
        { key: 'steel', head: 'To', className: 'whitespace-nowrap' },
        { key: 'measured', head: 'Measured', className: 'whitespace-nowrap' },
      ]}
      rows={rows}
      empty="No points on this face."
    />
  );
}

const pointKind = (point: PointState): string =>
  point.point === null
    ? 'spot'
    : point.point.kind === 'chosen'
      ? `chosen${point.point.reason ? `, ${point.point.reason}` : ''}`
      : '';

function pointRows(point: PointState, context: TableContext): RuledRow[] {
  const label = (
    <span className="font-label font-semibold">
      {point.label}
      {pointKind(point) && (
        <span className="block text-label font-medium text-pencil">{pointKind(point)}</span>
      )}
    </span>
  );
  if (point.readings.length === 0) {
    return [
      {
        key: point.key,
        id: `point-${point.key}`,
        cells: {
          point: label,
          cover: '–',
          verdict: <Verdict kind="unread" word={markWords.unread} lines={recheckLines(point)} />,
        },
      },
    ];
  }
  return point.readings.map((reading, index) => ({
    key: reading.entry.id,
    id: index === 0 ? `point-${point.key}` : undefined,
    cells: readingCells(point, reading, index === 0 ? label : null, context),
  }));
}

const recheckLines = (point: PointState): string[] => [
  ...(point.conflict ? ['Two records had not seen each other; the less favourable governs.'] : []),
  ...(point.recheck === 'failed' ? ['To be read again after the correction.'] : []),
  ...(point.recheck === 'neighbour' ? ['To be read again: next to a corrected point.'] : []),
];

function readingCells(
  point: PointState,
  reading: ReadingState,
  label: React.ReactNode,
  context: TableContext,
): RuledRow['cells'] {
  const { entry, current } = reading;
  const first = readingText(entry.body, context.units);
  const now = current === null ? null : readingText(current, context.units);
  const governs = point.governing.includes(reading);
  const changed = now !== first;
  return {
    point: label ?? <span className="sr-only">{point.label}</span>,
    cover: (
      <span className="grid justify-items-end">
        {changed ? <del>{first}</del> : <span className={governs ? '' : 'text-pencil'}>{first}</span>}
        {changed && now !== null && <ins className="no-underline">{now}</ins>}
      </span>
    ),
    verdict:
      current === null ? (
        <span className="text-pencil">withdrawn: {reading.amendments.at(-1)?.entry.body.reason}</span>
      ) : (
        <Verdict
          kind={readingMark(reading)}
          word={`${markWords[readingMark(reading)]}${governs ? '' : ', earlier'}`}
          lines={[
            ...(readingMark(reading) === 'met' ? [] : [reading.judged.reason]),
            ...(reading.round > 1 ? [`Round ${reading.round}.`] : []),
            ...(reading.acceptedBy ? ['Accepted by a decision of the engineer.'] : []),
            ...(reading.pending ? ['Not received by the server yet.'] : []),
            ...(governs ? recheckLines(point) : []),
            ...reading.amendments.map((one) =>
              one.counts
                ? `Amended: ${one.entry.body.reason}`
                : `An amendment does not count: ${one.problem ?? 'it is not allowed here'}`,
            ),
          ]}
          judged={<HowJudged {...{ point, reading, context }} />}
        />
      ),
    steel: entry.body.steel,
    measured: (
      <>
        {dayAndTime(entry.body.measuredAt, context.timeZone)}
        <span className="block text-label text-pencil">
          {entry.body.instrumentId
            ? (context.instruments.get(entry.body.instrumentId)?.name ?? 'instrument not in the register')
            : 'instrument not named'}
          , {personName(measurerOf(entry), context.people)}
          {measurerOf(entry) !== entry.authorId && `, typed by ${personName(entry.authorId, context.people)}`}
        </span>
      </>
    ),
  };
}

function Verdict({
  kind,
  word,
  lines,
  judged,
}: {
  kind: React.ComponentProps<typeof MarkIcon>['kind'];
  word: string;
  lines: string[];
  judged?: React.ReactNode;
}) {
  return (
    <div className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-1.5">
      <MarkIcon kind={kind} className="mt-0.5" />
      <div>
        {word}
        {lines.map((line) => (
          <span key={line} className="block text-label text-pencil">
            {line}
          </span>
        ))}
        {judged}
      </div>
    </div>
  );
}

function HowJudged({
  point,
  reading,
  context,
}: {
  point: PointState;
  reading: ReadingState;
  context: TableContext;
}) {
  const instrumentId = (reading.current ?? reading.entry.body).instrumentId;
  const instrument = instrumentId === null ? undefined : context.instruments.get(instrumentId);
  const words = judgedReading(reading, context.plan, instrument ?? null, context.units);
  return (
    <JudgedDetails
      about={point.label}
      judged={byName(words, point.faceId, reading.requirement?.id ?? null)}
    />
  );
}
