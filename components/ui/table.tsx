import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names';

export interface TableProps extends Omit<ComponentProps<'table'>, 'caption'> {
  /** What the table holds: its name for a screen reader, and a line over it unless hidden. */
  caption: string;
  captionHidden?: boolean;
  /** Beside the caption: a link to the CSV. */
  aside?: ReactNode;
}

/** A ruled, compact table that scrolls sideways by itself where it is wider than its place. */
export function Table({ caption, captionHidden, aside, className, children, ...rest }: TableProps) {
  return (
    <div className="grid min-w-0 gap-1">
      {(!captionHidden || aside) && (
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          {!captionHidden && (
            <p aria-hidden="true" className="font-label text-lead font-semibold">
              {caption}
            </p>
          )}
          {aside && <div className="ml-auto font-label text-label">{aside}</div>}
        </div>
      )}
      <div
        role="region"
        aria-label={caption}
        tabIndex={0}
        className="relative min-w-0 overflow-x-auto print:overflow-visible"
      >
        <table {...rest} className={classNames('w-full border-collapse text-left text-body', className)}>
          <caption className="sr-only">{caption}</caption>
          {children}
        </table>
      </div>
    </div>
  );
}

interface CellProps {
  /** A measurement or a count: figures of one width, set right. */
  figure?: boolean;
}

/** A heading cell: of a column in the head, of a row with `scope="row"`. `sort` marks the column that is sorted by. */
export function Th({
  figure,
  sort,
  scope = 'col',
  className,
  ...rest
}: ComponentProps<'th'> & CellProps & { sort?: 'ascending' | 'descending' }) {
  return (
    <th
      {...rest}
      scope={scope}
      aria-sort={sort}
      className={classNames(
        'px-2 py-1.5 align-bottom font-label',
        scope === 'row'
          ? 'border-b border-rule align-top text-body font-semibold whitespace-nowrap'
          : 'border-y border-ink text-label font-semibold text-pencil',
        figure && 'text-right',
        className,
      )}
    />
  );
}

/** A cell. */
export function Td({ figure, className, ...rest }: ComponentProps<'td'> & CellProps) {
  return (
    <td
      {...rest}
      className={classNames(
        'border-b border-rule px-2 py-1.5 align-top',
        figure ? 'text-right font-figure font-medium whitespace-nowrap' : 'min-w-24',
        className,
      )}
    />
  );
}
