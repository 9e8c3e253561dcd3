import { MarkIcon } from '@/components/drawings/mark';
import { markWords } from '@/components/drawings/mark-words';
import type { FaceState, PointState, Sheet } from '@/lib/inspection/sheet-types';
import { readingText } from './reading-words';

const seen = (point: PointState): boolean =>
  (point.mark === 'met' || point.mark === 'met-flagged') && point.recheck === null && !point.conflict;

/** How a point stands: what governs, else the last that was read there and why it does not count. */
function standsAs(point: PointState, sheet: Sheet): string {
  const counted = point.governing.filter((reading) => reading.current !== null);
  const shown = counted.length > 0 ? counted : point.readings.filter((one) => one.current !== null).slice(-1);
  const words = shown.flatMap(({ current, judged }) =>
    current ? [`${readingText(current, sheet.plan.units)}, ${markWords[point.mark]}. ${judged.reason}`] : [],
  );
  return words.join(' ') || 'withdrawn; to be read again.';
}

/** The points of a face that somebody has to see to, in words; the rest is in the drawing and the table. */
export function PointsToSee({ sheet, face }: { sheet: Sheet; face: FaceState }) {
  const points = [...face.points, ...face.spots].filter((point) => !seen(point));
  const unread = points.filter((point) => point.readings.length === 0);
  const read = points.filter((point) => point.readings.length > 0);
  if (points.length === 0) return null;
  return (
    <ul aria-label="To see to">
      {read.map((point) => (
        <li key={point.key} className="flex gap-2 border-b border-rule py-1">
          <MarkIcon kind={point.mark} className="mt-0.5 shrink-0" />
          <span>
            <span className="font-label font-semibold">{point.label}</span> {standsAs(point, sheet)}
            {point.conflict && ' Two records had not seen each other; the less favourable governs.'}
            {point.recheck === 'failed' && ' To be read again after the correction.'}
            {point.recheck === 'neighbour' && ' To be read again: next to a corrected point.'}
            {point.governing.some((reading) => reading.acceptedBy !== null) &&
              ' Accepted by a decision of the engineer.'}
          </span>
        </li>
      ))}
      {unread.length > 0 && (
        <li className="flex gap-2 border-b border-rule py-1">
          <MarkIcon kind="unread" className="mt-0.5 shrink-0" />
          <span>
            <span className="font-label font-semibold">{unread.map((point) => point.label).join(', ')}</span>{' '}
            not yet read
          </span>
        </li>
      )}
    </ul>
  );
}
