import type { ComponentProps, ReactNode } from 'react';
import { classNames } from './class-names';
import { toneBorder, toneText, type Tone } from './tone';
import { ToneGlyph } from './tone-glyph';

export interface NoticeProps extends Omit<ComponentProps<'div'>, 'title'> {
  tone?: Exclude<Tone, 'plain'>;
  /** What it is, in a few words. */
  title?: ReactNode;
  /** Buttons or links that go with it. */
  actions?: ReactNode;
}

/**
 * Something the reader has to know. A hold interrupts a screen reader (role alert), the rest wait their turn (role
 * status). Pass `role="note"` for a text that is simply there when the page opens.
 */
export function Notice({ tone = 'info', title, actions, role, className, children, ...rest }: NoticeProps) {
  return (
    <div
      {...rest}
      role={role ?? (tone === 'hold' ? 'alert' : 'status')}
      className={classNames(
        'flex gap-3 border border-l-[6px] bg-sheet px-pad py-2.5',
        toneBorder[tone],
        className,
      )}
    >
      <ToneGlyph tone={tone} className={classNames('mt-1 shrink-0', toneText[tone])} />
      <div className="grid min-w-0 flex-1 gap-1">
        {title && <p className={classNames('font-label text-lead font-semibold', toneText[tone])}>{title}</p>}
        {children && <div className="grid gap-1 text-body">{children}</div>}
        {actions && <div className="mt-1 flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}
