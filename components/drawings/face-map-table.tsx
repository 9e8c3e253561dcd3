import { MarkIcon } from './mark';
import { markWords } from './mark-words';
import type { FaceMapPoint } from './face-map';

/** The points of a face map as a table: what the picture shows, for whoever cannot or does not want to see it. */
export function FaceMapTable({
  caption,
  points,
  format,
  values,
}: {
  caption: string;
  points: readonly FaceMapPoint[];
  format: (mm: number) => string;
  /** The reading at a point as written, by its id. */
  values?: Readonly<Record<string, string>>;
}) {
  const head = 'border-y border-ink px-2 py-1 font-label text-label font-semibold text-pencil';
  const cell = 'border-b border-rule px-2 py-1';
  const figure = `${cell} text-right font-figure font-medium whitespace-nowrap`;
  return (
    <div role="region" aria-label={caption} tabIndex={0} className="overflow-x-auto">
      <table className="w-full border-collapse text-left text-body">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            <th className={head}>Point</th>
            <th className={`${head} text-right`}>From the left</th>
            <th className={`${head} text-right`}>Up</th>
            {values && <th className={`${head} text-right`}>Cover</th>}
            <th className={head}>Verdict</th>
          </tr>
        </thead>
        <tbody>
          {points.map((point) => (
            <tr key={point.id}>
              <th scope="row" className={`${cell} font-label font-semibold`}>
                {point.label}
                {point.chosen && <span className="font-medium text-pencil"> chosen</span>}
                {point.spot && <span className="font-medium text-pencil"> spot</span>}
              </th>
              <td className={figure}>{format(point.xMm)}</td>
              <td className={figure}>{format(point.yMm)}</td>
              {values && <td className={figure}>{values[point.id] ?? ''}</td>}
              <td className={`${cell} whitespace-nowrap`}>
                <MarkIcon kind={point.mark} /> {markWords[point.mark]}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
