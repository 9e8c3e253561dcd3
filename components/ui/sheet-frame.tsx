import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names';

export interface SheetFrameProps extends Omit<ComponentProps<'section'>, 'title'> {
  /** A TitleBlock, ruled across the head (or the foot) of the sheet. */
  titleBlock?: ReactNode;
  titleBlockAt?: 'head' | 'foot';
  /** The heading of what is on the sheet; `level` is its rank on the page. */
  heading?: ReactNode;
  level?: 1 | 2 | 3;
  /** What stands at the right end of the heading's line. */
  aside?: ReactNode;
  /** The content reaches the frame: for tables and lists that bring their own margins. */
  flush?: boolean;
}

/** A sheet: a heavy frame line with a thin trim line and centring marks outside it. Leave 8 px around it. */
export function SheetFrame({
  titleBlock,
  titleBlockAt = 'head',
  heading,
  level = 2,
  aside,
  flush,
  className,
  children,
  ...rest
}: SheetFrameProps) {
  const Heading = `h${level}` as const;
  return (
    <section {...rest} className={classNames('sheet-frame min-w-0', className)}>
      {titleBlock && titleBlockAt === 'head' && <div className="border-b border-ink">{titleBlock}</div>}
      {(heading || aside) && (
        <header className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 px-4 pt-3">
          {heading && <Heading className={level === 1 ? 'text-title' : 'text-heading'}>{heading}</Heading>}
          {aside && <div className="font-label text-label font-medium text-pencil">{aside}</div>}
        </header>
      )}
      <div className={flush ? 'pt-2' : 'px-4 pt-2 pb-4'}>{children}</div>
      {titleBlock && titleBlockAt === 'foot' && <div className="border-t border-ink">{titleBlock}</div>}
    </section>
  );
}
