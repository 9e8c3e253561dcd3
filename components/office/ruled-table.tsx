import type { ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';

export interface RuledColumn {
  key: string;
  head: ReactNode;
  /** Figures of one width, set right. */
  figure?: boolean;
  className?: string;
}

export interface RuledRow {
  key: string;
  id?: string;
  cells: Record<string, ReactNode>;
  className?: string;
}

/** A ruled table that scrolls sideways by itself where the page is narrower, by keyboard too. */
export function RuledTable({
  caption,
  captionHidden = false,
  columns,
  rows,
  empty,
}: {
  caption: string;
  captionHidden?: boolean;
  columns: readonly RuledColumn[];
  rows: readonly RuledRow[];
  /** In place of the rows where there are none. */
  empty?: ReactNode;
}) {
  if (rows.length === 0 && empty !== undefined) return <div className="text-body text-pencil">{empty}</div>;
  return (
    <div role="region" aria-label={caption} tabIndex={0} className="overflow-x-auto">
      <table className="w-full border-collapse text-body">
        <caption
          className={
            captionHidden ? 'sr-only' : 'pb-1 text-left font-label text-label font-semibold text-pencil'
          }
        >
          {caption}
        </caption>
        <thead>
          <tr className="border-b border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={classNames(
                  'py-1 pr-4 font-label text-label font-semibold whitespace-nowrap last:pr-0',
                  column.figure ? 'text-right' : 'text-left',
                  column.className,
                )}
              >
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr
              key={row.key}
              id={row.id}
              className={classNames('border-b border-rule align-top', row.className)}
            >
              {columns.map((column) => (
                <td
                  key={column.key}
                  className={classNames(
                    'py-1.5 pr-4 last:pr-0',
                    column.figure && 'text-right font-figure font-medium whitespace-nowrap',
                    column.className,
                  )}
                >
                  {row.cells[column.key]}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
