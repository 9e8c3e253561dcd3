'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Checkbox } from '@/components/ui/checkbox';
import { EmptyState } from '@/components/ui/empty-state';
import { FieldError } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Textarea } from '@/components/ui/textarea';
import type { OpenPour } from '@/lib/device/device-types';
import type { FixItem } from '@/lib/inspection/fix-list-item';
import { CrewPhoto } from './crew-photo';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { fixItemWords, fixListWords, type FixLanguage } from './fix-list-words';
import { FormProblem } from './form-problem';
import { Screen } from './screen';
import { useRecord } from './use-record';

/** Crew report what they put right, with a photo, offline too. */
export function CrewCorrection({
  open,
  item: given,
  language,
}: {
  open: OpenPour;
  /** Null: it has left the list. */
  item: FixItem | null;
  language: FixLanguage;
}) {
  // Once it is reported and the list has followed, the screen still shows what was reported.
  const [item] = useState(given);
  const [text, setText] = useState('');
  const [chosen, setChosen] = useState<readonly string[]>(
    () => item?.choices.filter((one) => !one.asked).map((one) => one.key) ?? [],
  );
  const [unchosen, setUnchosen] = useState(false);
  const [kept, setKept] = useState(false);
  const { busy, problems, record } = useRecord(open);
  const words = fixListWords[language];
  const back = { href: fieldPaths.pour(open.pour.id), words: open.pour.number };
  if (!item) {
    return (
      <Screen title={words.heading} back={back} language={language}>
        <EmptyState
          title={words.gone}
          action={
            <FieldLink href={back.href} className={buttonClasses('primary')}>
              {words.back}
            </FieldLink>
          }
        />
      </Screen>
    );
  }
  const { title, lines } = fixItemWords(item, language);
  const keep = async () => {
    const about =
      item.choices.length > 0 ? chosen.map((id) => ({ kind: 'point' as const, id })) : item.together;
    if (about.length === 0) return setUnchosen(true);
    const entry = await record('correction', { about, text, where: item.place });
    if (entry) setKept(true);
  };
  return (
    <Screen title={words.report} aside={open.pour.number} back={back} language={language} form>
      <div className="grid gap-5" lang={language}>
        <section className="border border-ink bg-sheet p-3">
          <h2 className="text-lead">{title}</h2>
          <p className="text-label text-pencil">{item.where}</p>
          {lines.map((line) => (
            <p key={line} className="font-figure text-label font-medium">
              {line}
            </p>
          ))}
        </section>
        {kept ? (
          <Notice
            tone="met"
            title={words.reported}
            actions={
              <FieldLink href={back.href} className={buttonClasses('secondary')}>
                {words.back}
              </FieldLink>
            }
          >
            <p>{words.reportedThen}</p>
          </Notice>
        ) : (
          <form
            noValidate
            className="grid gap-4 border border-ink bg-sheet p-3"
            onSubmit={(event) => {
              event.preventDefault();
              void keep();
            }}
          >
            {item.choices.length > 0 && (
              <fieldset>
                <legend className="font-label text-label font-semibold text-pencil">{words.putRight}</legend>
                {item.choices.map((one) => (
                  <Checkbox
                    key={one.key}
                    label={one.label}
                    {...(one.asked ? { hint: words.askedToDecide } : {})}
                    checked={chosen.includes(one.key)}
                    onChange={(event) => {
                      setUnchosen(false);
                      setChosen(
                        event.target.checked ? [...chosen, one.key] : chosen.filter((key) => key !== one.key),
                      );
                    }}
                  />
                ))}
                <FieldError id="put-right" error={unchosen ? words.tickSome : undefined} />
              </fieldset>
            )}
            <Textarea
              label={words.whatWasDone}
              value={text}
              error={problems.text && (text.trim() === '' ? words.writeSomething : problems.text)}
              maxLength={1000}
              onChange={(event) => setText(event.target.value)}
            />
            <FormProblem problems={problems} shown={['text']} />
            <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
              {words.reportIt}
            </Button>
          </form>
        )}
        <CrewPhoto open={open} about={item.about} language={language} />
      </div>
    </Screen>
  );
}
