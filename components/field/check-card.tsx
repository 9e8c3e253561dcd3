'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { classNames } from '@/components/ui/class-names';
import { Textarea } from '@/components/ui/textarea';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText, type Tone } from '@/components/ui/tone';
import { mayRecord } from '@/lib/inspection/entry-access';
import { judgedCheck } from '@/lib/inspection/judged-words';
import { roleWords } from '@/lib/inspection/roles';
import type { CheckState } from '@/lib/inspection/sheet-types';
import { Disclosure } from './disclosure';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { FormProblem } from './form-problem';
import { JudgedBody } from './judged-body';
import { nameOf, type OpenSheet } from './open-sheet';
import { answerWords } from './state-tone';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

type Answer = 'met' | 'not-met' | 'not-applicable';
const tones: Record<Answer, Tone> = { met: 'met', 'not-met': 'hold', 'not-applicable': 'plain' };

/** One question: how it stands, and its answer. Met is one tap; the others ask for a word first. */
export function CheckCard({ open, check }: { open: OpenSheet; check: CheckState }) {
  const { item, governing } = check;
  const { role } = open.project;
  const mayAnswer = mayRecord('answer', role) && (role === 'inspector' || item.closedBy === role);
  const again = useRefusedAgain('answer', (body) => body.checkId === item.id);
  const [draft, setDraft] = useState<{ answer: Answer; text: string } | null>(
    again && { answer: again.body.answer, text: again.body.reason ?? again.body.note ?? '' },
  );
  const { busy, problems, clearProblems, record } = useRecord(open, again);
  const about = { kind: 'check', id: item.id } as const;

  const keep = async (answer: Answer, text: string) => {
    const said = text.trim();
    const entry = await record('answer', {
      checkId: item.id,
      answer,
      ...(said ? (answer === 'not-applicable' ? { reason: said } : { note: said }) : {}),
    });
    if (entry) setDraft(null);
  };
  const begin = (answer: Answer) => {
    clearProblems();
    setDraft((before) => ({ answer, text: before?.text ?? '' }));
  };
  // A glove that bounces on the key must not write the answer twice; after a correction it is a new answer.
  const settled =
    governing?.body.answer === 'met' &&
    governing.authorId === open.person.id &&
    !check.correctedSince &&
    !check.conflict;
  const photoMissing =
    item.evidence === 'photo' && governing?.body.answer === 'met' && check.photoIds.length === 0;
  const answer = governing?.body.answer;
  return (
    <li className="border border-ink bg-sheet">
      <div className="grid gap-1 px-3 pt-2.5 pb-2">
        {(item.attendance !== 'none' || item.critical) && (
          <p className="flex flex-wrap gap-x-3 font-label text-label font-semibold text-watch">
            {item.attendance === 'hold-point' && <span>Hold point: work does not go on past it</span>}
            {item.attendance === 'witness-point' && <span>Witness point: somebody is asked to be there</span>}
            {item.critical && <span>Critical</span>}
          </p>
        )}
        <h2 className="text-lead">{item.question}</h2>
        <p className="text-label text-pencil">
          {item.basis}
          {item.evidence === 'photo' && ' · needs a photo'}
          {item.closedBy === 'superintendent' && ' · closed by the superintendent'}
        </p>
        {governing && answer && (
          <p className="flex items-start gap-2 pt-1">
            <ToneGlyph
              tone={tones[answer]}
              className={classNames('mt-1 shrink-0', toneText[tones[answer]])}
            />
            <span>
              <b className={toneText[tones[answer]]}>{answerWords[answer]}</b>
              {governing.body.reason && `: ${governing.body.reason}`}
              {governing.body.note && `: ${governing.body.note}`}
              <span className="block text-label text-pencil">
                {nameOf(open, governing.authorId)} · {dayAndTime(governing.recordedAt, open.project.timeZone)}
                {governing.seq === null && ' · not sent yet'}
                {check.acceptedBy && ' · accepted by the engineer'}
                {check.correctedSince && ' · corrected since: look again'}
                {check.conflict && ' · two answers had not seen each other; the less favourable governs'}
              </span>
            </span>
          </p>
        )}
        {governing && (
          <Disclosure summary="How was this judged?">
            <JudgedBody judged={judgedCheck(check)} />
          </Disclosure>
        )}
        {photoMissing && (
          <p className="font-label text-label font-semibold text-watch">
            A photo that shows it is still asked for.
          </p>
        )}
      </div>
      {mayAnswer && (
        <div
          role="group"
          aria-label={governing ? 'Answer again' : 'Answer'}
          className={classNames(
            'grid border-t border-ink',
            item.notApplicable ? 'grid-cols-3' : 'grid-cols-2',
          )}
        >
          <AnswerKey
            answer="met"
            now={answer}
            busy={busy}
            onPress={() =>
              settled ? setDraft(null) : void keep('met', draft?.answer === 'met' ? draft.text : '')
            }
          />
          <AnswerKey answer="not-met" now={answer} busy={busy} onPress={() => begin('not-met')} />
          {item.notApplicable && (
            <AnswerKey
              answer="not-applicable"
              now={answer}
              busy={busy}
              onPress={() => begin('not-applicable')}
            />
          )}
        </div>
      )}
      {draft && (
        <form
          className="grid gap-3 border-t border-rule px-3 py-3"
          onSubmit={(event) => {
            event.preventDefault();
            void keep(draft.answer, draft.text);
          }}
        >
          <Textarea
            label={
              draft.answer === 'not-applicable'
                ? 'Why it does not apply here'
                : draft.answer === 'not-met'
                  ? 'What was found, and where'
                  : 'Note'
            }
            optional={draft.answer !== 'not-applicable'}
            error={problems.reason ?? problems.note}
            value={draft.text}
            onChange={(event) => setDraft({ ...draft, text: event.target.value })}
          />
          <FormProblem problems={problems} shown={['reason', 'note']} />
          <div className="flex gap-2">
            <Button type="submit" variant="primary" busy={busy} className="flex-1">
              Keep: {answerWords[draft.answer]}
            </Button>
            <Button onClick={() => setDraft(null)}>Leave</Button>
          </div>
        </form>
      )}
      {!draft && <FormProblem problems={problems} shown={[]} />}
      <div className="flex flex-wrap border-t border-rule">
        <FieldLink href={fieldPaths.photos(open.sheet.pourId, about)} className={buttonClasses('quiet')}>
          Photo{check.photoIds.length > 0 ? ` (${check.photoIds.length})` : ''}
        </FieldLink>
        {mayAnswer && governing === null && !draft && (
          <Button variant="quiet" onClick={() => begin('met')}>
            Met, with a note
          </Button>
        )}
        {answer === 'not-met' && mayRecord('nonconformance', role) && (
          <FieldLink
            href={fieldPaths.nonconformance(open.sheet.pourId, about)}
            className={buttonClasses('quiet')}
          >
            Nonconformance
          </FieldLink>
        )}
        {answer === 'not-met' && mayRecord('correction', role) && (
          <FieldLink
            href={fieldPaths.correction(open.sheet.pourId, about)}
            className={buttonClasses('quiet')}
          >
            Report the correction
          </FieldLink>
        )}
        {governing && (
          <FieldLink
            href={fieldPaths.entry(open.sheet.pourId, governing.id)}
            className={buttonClasses('quiet')}
          >
            Ask or amend
          </FieldLink>
        )}
      </div>
      {!mayAnswer && governing === null && (
        <p className="border-t border-rule px-3 py-2 text-label text-pencil">
          Open. The {roleWords[item.closedBy].toLowerCase()} answers it.
        </p>
      )}
    </li>
  );
}

function AnswerKey({
  answer,
  now,
  busy,
  onPress,
}: {
  answer: Answer;
  now: Answer | undefined;
  busy: boolean;
  onPress: () => void;
}) {
  const chosen = now === answer;
  return (
    <button
      type="button"
      disabled={busy}
      aria-pressed={chosen}
      onClick={onPress}
      className={classNames(
        'flex min-h-15 items-center justify-center gap-2 border-r border-rule px-1 font-label font-semibold last:border-r-0',
        chosen ? 'bg-ink text-sheet' : toneText[tones[answer]],
      )}
    >
      <ToneGlyph tone={tones[answer]} className="shrink-0" />
      {answer === 'met' ? 'Met' : answer === 'not-met' ? 'Not met' : 'Not applicable'}
    </button>
  );
}
