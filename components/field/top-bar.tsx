'use client';

import type { ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';
import { barWords } from './bar-words';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import type { FixLanguage } from './fix-list-words';
import { HandOver } from './hand-over';
import { notSentCount, notSentWords, syncWords } from './sync-words';
import { useSnapshot } from './use-device';

/** Where you are, the way back, and what has not been sent: at the top of every screen of the offline side. */
export function TopBar({
  title,
  aside,
  back,
  language,
}: {
  title: string;
  aside?: ReactNode;
  back?: { href: string; words: string };
  language: FixLanguage;
}) {
  const { sync, person } = useSnapshot();
  const trouble = sync.refusedEntries > 0 || sync.phase === 'sign-in-needed';
  return (
    <header
      lang={language}
      className="sticky top-0 z-20 flex min-h-[calc(var(--target)+1px)] items-stretch border-b border-ink bg-sheet print:static pt-[env(safe-area-inset-top)]"
    >
      {back && (
        <FieldLink
          href={back.href}
          aria-label={barWords[language].back(back.words)}
          className="grid w-target shrink-0 place-items-center border-r border-rule text-chalk"
        >
          <svg
            viewBox="0 0 16 16"
            width="22"
            height="22"
            aria-hidden="true"
            fill="none"
            stroke="currentColor"
          >
            <path d="M10.5 2.5 5 8l5.5 5.5" strokeWidth="2" />
          </svg>
        </FieldLink>
      )}
      <div className="flex min-w-0 flex-1 flex-col justify-center px-3 py-1">
        <h1 tabIndex={-1} className="line-clamp-3 text-lead leading-tight outline-none">
          {title}
        </h1>
        {aside && <div className="truncate font-label text-label font-medium text-pencil">{aside}</div>}
      </div>
      <HandOver words={barWords[language].handOver} />
      {person && (
        <FieldLink
          href={fieldPaths.notSent}
          className={classNames(
            'flex min-w-target shrink-0 flex-col items-end justify-center border-l border-rule px-3 text-right font-label text-label leading-tight font-medium',
            trouble ? 'text-hold' : notSentCount(sync) > 0 ? 'text-ink' : 'text-pencil',
          )}
        >
          <span className="font-semibold" aria-live="polite">
            {notSentWords(sync, language)}
          </span>
          <span>{syncWords(sync, language)}</span>
        </FieldLink>
      )}
    </header>
  );
}
