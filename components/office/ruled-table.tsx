import type { ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';
import { Table, Td, Th } from '@/components/ui/table';

export interface RuledColumn {
  key: string;
  head: ReactNode;
  /** The heading in words, where `head` is more than a text. */
  words?: string;
  /** Figures of one width, set right. */
  figure?: boolean;
  /** On a phone this cell stays in one line with the first, without its heading. */
  beside?: boolean;
  className?: string;
  sort?: 'ascending' | 'descending';
}

export interface RuledRow {
  key: string;
  id?: string;
  cells: Record<string, ReactNode>;
  className?: string;
}

/*
 * On a phone a row is a small sheet of its own: the first cell over the others, each with its heading before it, so
 * that nothing lies outside the screen. The roles are written out, since a table that is not laid out as one is none
 * to some screen readers; the headings before the cells are drawn by CSS, since the row of headings is read out.
 */
const headOnPhone = {
  hidden: 'max-sm:sr-only',
  /** Headings that sort have to stay where they can be pressed. */
  sorts:
    "max-sm:flex max-sm:flex-wrap max-sm:items-baseline max-sm:gap-x-4 max-sm:border-y max-sm:border-ink max-sm:py-1 max-sm:before:font-label max-sm:before:text-label max-sm:before:text-pencil max-sm:before:content-['Sort_by']",
} as const;
const rowOnPhone =
  'max-sm:flex max-sm:flex-wrap max-sm:gap-x-3 max-sm:gap-y-1 max-sm:border-b max-sm:border-rule max-sm:py-2';
const cellOnPhone =
  'print:min-w-0 max-sm:min-w-0 max-sm:border-0 max-sm:p-0 max-sm:text-left max-sm:wrap-anywhere max-sm:whitespace-normal';
/** What the row is about, over the rest. */
const firstOnPhone = 'max-sm:font-label max-sm:font-semibold max-sm:[&_.text-pencil]:font-normal';
const underHeading =
  'max-sm:grid max-sm:basis-full max-sm:grid-cols-[7rem_minmax(0,1fr)] max-sm:gap-x-3 max-sm:before:pt-px max-sm:before:font-label max-sm:before:text-label max-sm:before:font-medium max-sm:before:text-pencil max-sm:before:content-[attr(data-head)]';

const isEmpty = (cell: ReactNode): boolean => cell === undefined || cell === null || cell === false;

/** A table from columns and rows; `empty` stands in its place where there are none. */
export function RuledTable({
  caption,
  captionHidden = false,
  aside,
  columns,
  rows,
  empty,
}: {
  caption: string;
  captionHidden?: boolean;
  aside?: ReactNode;
  columns: readonly RuledColumn[];
  rows: readonly RuledRow[];
  empty?: ReactNode;
}) {
  if (rows.length === 0 && empty !== undefined) return <div className="text-body text-pencil">{empty}</div>;
  const sorts = columns.some((column) => column.words !== undefined);
  return (
    <Table
      role="table"
      caption={caption}
      captionHidden={captionHidden}
      aside={aside}
      className="max-sm:block"
    >
      <thead role="rowgroup" className={sorts ? 'max-sm:block' : headOnPhone.hidden}>
        <tr role="row" className={sorts ? headOnPhone.sorts : undefined}>
          {columns.map((column) => (
            <Th
              key={column.key}
              role="columnheader"
              figure={column.figure}
              sort={column.sort}
              className={classNames(
                column.className,
                sorts &&
                  (column.words === undefined
                    ? 'max-sm:sr-only'
                    : 'max-sm:min-w-0 max-sm:border-0 max-sm:p-0'),
              )}
            >
              {column.head}
            </Th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="max-sm:block max-sm:border-t max-sm:border-ink">
        {rows.map((row) => (
          <tr
            key={row.key}
            id={row.id}
            role="row"
            className={classNames('target:bg-paper', rowOnPhone, row.className)}
          >
            {columns.map((column, index) => {
              const cell = row.cells[column.key];
              const beside = index === 0 || column.beside;
              return (
                <Td
                  key={column.key}
                  role="cell"
                  figure={column.figure}
                  data-head={beside ? undefined : (column.words ?? column.head?.toString())}
                  className={classNames(
                    column.className,
                    cellOnPhone,
                    index === 0 && firstOnPhone,
                    isEmpty(cell) ? 'max-sm:hidden' : !beside && underHeading,
                  )}
                >
                  {beside || isEmpty(cell) ? cell : <div>{cell}</div>}
                </Td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
