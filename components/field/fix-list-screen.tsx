'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { classNames } from '@/components/ui/class-names';
import { EmptyState } from '@/components/ui/empty-state';
import { mayRecord } from '@/lib/inspection/entry-access';
import { fixList } from '@/lib/inspection/fix-list';
import type { FixItem } from '@/lib/inspection/fix-list-item';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { fixItemWords, fixLanguages, fixListText, fixListWords, type FixLanguage } from './fix-list-words';
import type { OpenSheet } from './open-sheet';
import { saveBlob } from './save-blob';
import { Screen } from './screen';

const preferred = (): FixLanguage => (navigator.language.toLowerCase().startsWith('es') ? 'es' : 'en');

/** What the crew must put right, in English or Spanish: on the screen, on paper, and handed on. */
export function FixListScreen({ open }: { open: OpenSheet }) {
  const { sheet, pour, project, holds } = open;
  const [language, setLanguage] = useState<FixLanguage>(preferred);
  const words = fixListWords[language];
  const items = fixList(sheet, holds);
  const planned = pour.plannedAt ? dayAndTime(pour.plannedAt, project.timeZone) : '';

  const share = async () => {
    const text = fixListText(items, { number: pour.number, title: pour.title, planned }, language);
    const title = `${words.heading} ${pour.number}`;
    if (typeof navigator.share === 'function') {
      // Closing the share sheet is an answer, not a fault.
      await navigator.share({ title, text }).catch(() => undefined);
    } else {
      saveBlob(new Blob([text], { type: 'text/plain' }), `${pour.number}-${language}.txt`);
    }
  };
  return (
    <Screen
      title={`${words.heading} ${pour.number}`}
      aside={planned ? `${words.planned} ${planned}` : undefined}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
    >
      <div className="grid gap-4" lang={language}>
        <div
          role="group"
          aria-label="Language, idioma"
          className="grid grid-cols-2 border border-ink print:hidden"
        >
          {fixLanguages.map((one) => (
            <button
              key={one}
              type="button"
              lang={one}
              aria-pressed={language === one}
              onClick={() => setLanguage(one)}
              className={classNames(
                'min-h-target font-label font-semibold',
                language === one ? 'bg-ink text-sheet' : 'bg-sheet',
              )}
            >
              {fixListWords[one].language}
            </button>
          ))}
        </div>
        {items.length === 0 ? (
          <EmptyState title={words.nothing} />
        ) : (
          <>
            <ol className="border border-ink bg-sheet">
              {items.map((item, index) => (
                <FixLine key={item.id} open={open} item={item} number={index + 1} language={language} />
              ))}
            </ol>
            <p className="px-1 text-label text-pencil">
              {words.afterwards} {words.asTyped}
            </p>
            <div className="grid grid-cols-2 gap-2 print:hidden">
              <Button onClick={() => window.print()}>{words.print}</Button>
              <Button variant="primary" onClick={() => void share()}>
                {words.share}
              </Button>
            </div>
          </>
        )}
      </div>
    </Screen>
  );
}

function FixLine({
  open,
  item,
  number,
  language,
}: {
  open: OpenSheet;
  item: FixItem;
  number: number;
  language: FixLanguage;
}) {
  const { title, lines } = fixItemWords(item, language);
  return (
    <li className="border-b border-rule last:border-b-0">
      <div className="grid grid-cols-[2rem_1fr] px-3 py-2.5">
        <span className="font-figure text-lead font-medium">{number}</span>
        <div>
          <h2 className="text-lead">{title}</h2>
          <p className="text-label text-pencil">{item.where}</p>
          {lines.map((line) => (
            <p key={line} className="font-figure text-label font-medium">
              {line}
            </p>
          ))}
        </div>
      </div>
      {mayRecord('correction', open.project.role) && (
        <FieldLink
          href={fieldPaths.correction(open.sheet.pourId, item.about)}
          className="flex min-h-target items-center justify-end border-t border-rule px-3 font-label font-semibold text-chalk underline underline-offset-4 print:hidden"
        >
          {fixListWords[language].report}
        </FieldLink>
      )}
    </li>
  );
}
