'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Checkbox } from '@/components/ui/checkbox';
import { EmptyState } from '@/components/ui/empty-state';
import { FieldError } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Textarea } from '@/components/ui/textarea';
import { mayRecord } from '@/lib/inspection/entry-access';
import { correctedTogether, failingOnFace } from '@/lib/inspection/corrected-together';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { FormProblem } from './form-problem';
import type { OpenSheet } from './open-sheet';
import { PhotoForm } from './photo-form';
import { Screen } from './screen';
import { SubjectSelect } from './subject-select';
import { subjectWords, whereOf } from './subject-words';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** Reports what was put right: by the superintendent or the crew, with a photo. The inspector then looks again. */
export function CorrectionForm({ open, about: given }: { open: OpenSheet; about: SubjectRef | null }) {
  const { sheet, pour } = open;
  const [about, setAbout] = useState<SubjectRef>(given ?? { kind: 'pour', id: sheet.pourId });
  const again = useRefusedAgain('correction');
  const [text, setText] = useState(again?.body.text ?? '');
  const [kept, setKept] = useState(false);
  const [choices] = useState(() => (given?.kind === 'face' ? failingOnFace(sheet, given.id) : []));
  const [chosen, setChosen] = useState<readonly string[]>(() =>
    choices.filter((one) => !one.asked).map((one) => one.key),
  );
  const [unchosen, setUnchosen] = useState(false);
  const { busy, problems, record } = useRecord(open, again);
  const back = { href: fieldPaths.holds(sheet.pourId), words: 'holds' };
  if (!mayRecord('correction', open.project.role)) {
    return (
      <Screen title="Correction" back={back}>
        <EmptyState title="A correction is reported by the superintendent or the crew">
          You recheck it, or read again, once it is reported.
        </EmptyState>
      </Screen>
    );
  }
  // One hold gathers the failing points of a face; a report names those that were put right, and no other.
  const all = choices.length > 0 ? chosen.map(point) : correctedTogether(sheet, about);
  const keep = async () => {
    if (all.length === 0) return setUnchosen(true);
    const entry = await record('correction', { about: all, text, where: whereOf(sheet, about) });
    if (entry) setKept(true);
  };
  return (
    <Screen title="Report the correction" aside={pour.number} back={back} form>
      <div className="grid gap-5">
        {kept ? (
          <Notice
            tone="met"
            title="Reported. The inspector looks again."
            actions={
              <FieldLink href={back.href} className={buttonClasses('secondary')}>
                To the holds
              </FieldLink>
            }
          >
            <p>What was read before stays in the record. Add a photo that shows it as it is now.</p>
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
            {choices.length > 0 ? (
              <fieldset>
                <legend className="font-label text-label font-semibold text-pencil">
                  What was put right on {subjectWords(sheet, about)}
                </legend>
                {choices.map((one) => (
                  <Checkbox
                    key={one.key}
                    label={one.label}
                    {...(one.asked ? { hint: 'the engineer is asked to decide on it' } : {})}
                    checked={chosen.includes(one.key)}
                    onChange={(event) => {
                      setUnchosen(false);
                      setChosen(
                        event.target.checked ? [...chosen, one.key] : chosen.filter((key) => key !== one.key),
                      );
                    }}
                  />
                ))}
                <FieldError id="corrected-points" error={unchosen ? 'Tick what was put right.' : undefined} />
              </fieldset>
            ) : given ? (
              <div>
                <p className="font-label text-label font-semibold text-pencil">What was put right</p>
                <ul className="list-inside list-disc">
                  {all.map((one) => (
                    <li key={`${one.kind}${one.id}`}>{subjectWords(sheet, one)}</li>
                  ))}
                </ul>
              </div>
            ) : (
              <SubjectSelect
                sheet={sheet}
                label="What was put right"
                value={about}
                error={problems.about}
                onChoose={setAbout}
              />
            )}
            <Textarea
              label="What was done"
              value={text}
              error={problems.text}
              maxLength={1000}
              onChange={(event) => setText(event.target.value)}
            />
            <FormProblem problems={problems} shown={['text', 'about']} />
            <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
              Report it
            </Button>
          </form>
        )}
        <PhotoForm open={open} about={about} shots={['after', 'before']} />
      </div>
    </Screen>
  );
}

const point = (id: string): SubjectRef => ({ kind: 'point', id });
