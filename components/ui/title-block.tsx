import type { ReactNode } from 'react';
import { classNames } from './class-names';
import { toneFill, type Tone } from './tone';

export interface TitleBlockCell {
  label: string;
  value: ReactNode;
  /** Share of the row that the cell asks for, 1 by default. */
  grow?: 1 | 2 | 3;
  /** Tints the cell: the state of a pour. The words in it say the same. */
  tone?: Tone;
  /** A number or a revision: figures of one width. */
  figure?: boolean;
}

const basis = { 1: 'basis-24 grow', 2: 'basis-48 grow-2', 3: 'basis-72 grow-3' } as const;

/**
 * The title block of a sheet: ruled cells, each a label over a value. The rules are the gaps between cells on an ink
 * ground, so that the block stays ruled however the cells wrap.
 */
export function TitleBlock({
  cells,
  label = 'Title block',
  className,
}: {
  cells: readonly TitleBlockCell[];
  label?: string;
  className?: string;
}) {
  return (
    <dl aria-label={label} className={classNames('title-block flex flex-wrap gap-px bg-ink', className)}>
      {cells.map((cell) => (
        <div
          key={cell.label}
          className={classNames(
            'min-w-0 px-pad pt-1 pb-1.5',
            basis[cell.grow ?? 1],
            toneFill[cell.tone ?? 'plain'],
          )}
        >
          <dt
            className={classNames(
              'font-label text-label font-medium',
              cell.tone && cell.tone !== 'plain' ? 'text-inherit' : 'text-pencil',
            )}
          >
            {cell.label}
          </dt>
          <dd
            className={classNames(
              'text-lead break-words',
              cell.figure ? 'font-figure font-medium' : 'font-label font-semibold',
            )}
          >
            {cell.value}
          </dd>
        </div>
      ))}
    </dl>
  );
}
