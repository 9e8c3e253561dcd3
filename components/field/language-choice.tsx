'use client';

import { classNames } from '@/components/ui/class-names';
import { fixLanguages, fixListWords, type FixLanguage } from './fix-list-words';

/** English or Spanish, for the crew's screens. */
export function LanguageChoice({
  language,
  onChoose,
}: {
  language: FixLanguage;
  onChoose: (language: FixLanguage) => void;
}) {
  return (
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
          onClick={() => onChoose(one)}
          className={classNames(
            'min-h-target font-label font-semibold',
            language === one ? 'bg-ink text-sheet' : 'bg-sheet',
          )}
        >
          {fixListWords[one].language}
        </button>
      ))}
    </div>
  );
}
