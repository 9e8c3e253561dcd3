'use client';

import { useEffect, type ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';
import { DeviceNotices } from './device-notices';
import type { FixLanguage } from './fix-list-words';
import { useScreenFocus } from './field-router';
import { TopBar } from './top-bar';

/** One screen of the offline side: the bar, what the device has to say, and the sheet. */
export function Screen({
  title,
  aside,
  back,
  form = false,
  tight = false,
  language = 'en',
  children,
}: {
  title: string;
  aside?: ReactNode;
  back?: { href: string; words: string };
  /** Something is being filled in here: nothing offers to reload the application. */
  form?: boolean;
  /** The screen brings its own margins: the reading screen. */
  tight?: boolean;
  /** What the bar over the screen is written in. */
  language?: FixLanguage;
  children: ReactNode;
}) {
  useScreenFocus();
  useEffect(() => {
    document.title = `${title} · Cagewright`;
  }, [title]);
  return (
    <div
      data-density="field"
      className={classNames(
        'flex flex-col bg-paper text-body text-ink',
        tight ? 'h-dvh overflow-hidden' : 'min-h-dvh',
      )}
    >
      <TopBar title={title} aside={aside} back={back} language={language} />
      <DeviceNotices quiet={form || tight} />
      <main
        id="main"
        className={classNames('w-full flex-1', tight ? 'min-h-0' : 'mx-auto max-w-4xl px-3 pt-4 pb-24')}
      >
        {children}
      </main>
    </div>
  );
}
