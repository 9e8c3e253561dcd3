'use client';

import { crewListOf } from '@/lib/inspection/crew-list';
import { fieldPaths } from './field-routes';
import { FixListView } from './fix-list-view';
import { fixListWords } from './fix-list-words';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { useFixLanguage } from './use-fix-language';

const none: ReadonlySet<string> = new Set();

/** What the crew must put right, as those who have the sheet see it: what is recorded here is folded in already. */
export function FixListScreen({ open }: { open: OpenSheet }) {
  const [language, setLanguage] = useFixLanguage();
  const { sheet, pour, holds } = open;
  return (
    <Screen
      title={`${fixListWords[language].heading} ${pour.number}`}
      aside={pour.title}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
    >
      <FixListView
        open={open}
        {...crewListOf(sheet, holds)}
        reported={none}
        language={language}
        onLanguage={setLanguage}
      />
    </Screen>
  );
}
