'use client';

import { EmptyState } from '@/components/ui/empty-state';
import type { CrewPour as CrewFacts, OpenPour } from '@/lib/device/device-types';
import { subjectKey } from '@/lib/inspection/facts';
import type { FixItem } from '@/lib/inspection/fix-list-item';
import { barWords } from './bar-words';
import { CrewCorrection } from './crew-correction';
import { fieldPaths, type PourRoute } from './field-routes';
import { FixListView } from './fix-list-view';
import { fixListWords } from './fix-list-words';
import { Screen } from './screen';
import { useFixLanguage } from './use-fix-language';

/** A pour as crew have it: the list of what to put right, and the report of each. They are given nothing else of it. */
export function CrewPour({ open, crew, route }: { open: OpenPour; crew: CrewFacts; route: PourRoute }) {
  const [language, setLanguage] = useFixLanguage();
  const { pour } = open;
  const { list } = crew;
  const words = fixListWords[language];
  if (list && route.part === 'correction') {
    const about = route.about && subjectKey(route.about);
    const item = list.items.find((one) => subjectKey(one.about) === about);
    return <CrewCorrection key={about} open={open} item={item ?? null} language={language} />;
  }
  return (
    <Screen
      title={`${words.heading} ${pour.number}`}
      aside={pour.title}
      back={{ href: fieldPaths.pours, words: barWords[language].pours }}
      language={language}
    >
      {list ? (
        <FixListView
          open={open}
          {...list}
          reported={reportedHere(crew, list.items)}
          language={language}
          onLanguage={setLanguage}
        />
      ) : (
        <EmptyState title={pour.serverPlanRevision > 0 ? words.noList : words.nothing} />
      )}
    </Screen>
  );
}

/** Items that a correction recorded here puts right and the list does not rest on yet. */
function reportedHere({ own, headSeq }: CrewFacts, items: readonly FixItem[]): Set<string> {
  const put = new Set(
    own.flatMap((entry) =>
      entry.type === 'correction' && (entry.seq === null || entry.seq > headSeq)
        ? entry.body.about.map(subjectKey)
        : [],
    ),
  );
  return new Set(
    items.filter((item) => item.together.every((one) => put.has(subjectKey(one)))).map((item) => item.id),
  );
}
