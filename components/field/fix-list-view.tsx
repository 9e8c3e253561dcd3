'use client';

import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import type { OpenPour } from '@/lib/device/device-types';
import type { LengthUnit } from '@/lib/concrete/length';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { CrewList, FixItem } from '@/lib/inspection/fix-list-item';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { FixLine } from './fix-line';
import { fixListText, fixListWords, type FixLanguage } from './fix-list-words';
import { LanguageChoice } from './language-choice';
import { saveBlob } from './save-blob';

/** The fix list: on the screen, on paper, and handed on, in English or Spanish. */
export function FixListView({
  open: { pour, project },
  items,
  awaited,
  drawings,
  units,
  reported,
  language,
  onLanguage,
}: {
  open: OpenPour;
  items: readonly FixItem[];
  awaited: CrewList['awaited'];
  drawings: readonly string[];
  units: LengthUnit;
  /** Ids of items that were reported on this device and not taken off the list yet. */
  reported: ReadonlySet<string>;
  language: FixLanguage;
  onLanguage: (language: FixLanguage) => void;
}) {
  const words = fixListWords[language];
  const planned = pour.plannedAt ? dayAndTime(pour.plannedAt, project.timeZone) : '';
  const reports = mayRecord('correction', project.role);

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
    <div className="grid gap-4" lang={language}>
      <LanguageChoice language={language} onChoose={onLanguage} />
      <SheetFrame
        flush
        titleBlock={
          <TitleBlock
            cells={[
              { label: words.pour, value: pour.number, figure: true },
              { label: words.element, value: pour.title, grow: 2 },
              { label: words.location, value: pour.location, grow: 2 },
              ...(planned ? [{ label: words.planned, value: planned, grow: 2 as const }] : []),
              { label: words.drawing, value: drawings.join(', '), grow: 2 },
            ]}
          />
        }
      >
        {items.length === 0 ? (
          <EmptyState title={words.nothing} />
        ) : (
          <ol>
            {items.map((item, index) => (
              <FixLine
                key={item.id}
                item={item}
                number={index + 1}
                language={language}
                units={units}
                reported={reported.has(item.id)}
                reportPath={reports ? fieldPaths.correction(pour.id, item.about) : null}
              />
            ))}
          </ol>
        )}
      </SheetFrame>
      {awaited.length > 0 && (
        <section className="border border-rule bg-sheet p-3">
          <h2 className="font-label font-semibold">{words.awaited}</h2>
          <ul className="list-inside list-disc">
            {awaited.map(({ id, where }) => (
              <li key={id}>{where}</li>
            ))}
          </ul>
        </section>
      )}
      {items.length > 0 && (
        <>
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
  );
}
