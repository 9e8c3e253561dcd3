import { MarkIcon } from './mark';
import { markKinds, markWords, type MarkKind } from './mark-words';

/** What the marks mean; only those that occur, where `kinds` is given. `counts` puts a number to each, and leaves out what does not occur. */
export function MarkLegend({
  kinds = markKinds,
  counts,
}: {
  kinds?: readonly MarkKind[];
  counts?: Partial<Record<MarkKind, number>>;
}) {
  return (
    <ul aria-label="Marks" className="flex flex-wrap gap-x-5 gap-y-1 font-label text-label font-medium">
      {markKinds
        .filter((kind) => kinds.includes(kind) && (!counts || (counts[kind] ?? 0) > 0))
        .map((kind) => (
          <li key={kind} className="flex items-center gap-1.5">
            <MarkIcon kind={kind} />
            {counts && <span className="font-figure">{counts[kind] ?? 0}</span>}
            {markWords[kind]}
          </li>
        ))}
    </ul>
  );
}
