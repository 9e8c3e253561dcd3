'use client';

import type { ReactNode } from 'react';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText, type Tone } from '@/components/ui/tone';
import { FieldLink } from './field-router';

/** One line of the sheet that leads to its work: what, how far, and how it stands. */
export function SheetLine({
  href,
  mark,
  title,
  detail,
  count,
  tone = 'plain',
}: {
  href: string;
  /** Shape of how it stands; by default that of the tone. */
  mark?: ReactNode;
  title: ReactNode;
  detail?: ReactNode;
  count?: ReactNode;
  tone?: Tone;
}) {
  return (
    <li className="border-b border-rule last:border-b-0">
      <FieldLink
        href={href}
        className="grid min-h-target grid-cols-[1.5rem_1fr_auto] items-center gap-x-2 px-3 py-2 hover:bg-paper/60"
      >
        <span className={toneText[tone]}>{mark ?? <ToneGlyph tone={tone} />}</span>
        <span className="min-w-0">
          <span className="block font-label font-semibold">{title}</span>
          {detail && <span className="block text-label text-pencil">{detail}</span>}
        </span>
        {count !== undefined && (
          <span className={`text-right font-label text-label font-semibold ${toneText[tone]}`}>{count}</span>
        )}
      </FieldLink>
    </li>
  );
}

/** A ruled list of lines under its heading. */
export function SheetLines({
  heading,
  aside,
  children,
}: {
  heading: string;
  aside?: ReactNode;
  children: ReactNode;
}) {
  return (
    <section className="grid gap-1.5">
      <div className="flex items-baseline justify-between gap-3 px-1">
        <h2 className="text-heading">{heading}</h2>
        {aside && <span className="font-label text-label font-medium text-pencil">{aside}</span>}
      </div>
      <ul className="border border-ink bg-sheet">{children}</ul>
    </section>
  );
}
