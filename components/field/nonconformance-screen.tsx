'use client';

import { buttonClasses } from '@/components/ui/button-classes';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText } from '@/components/ui/tone';
import { mayRecord } from '@/lib/inspection/entry-access';
import { judgedNonconformance } from '@/lib/inspection/judged-nonconformance';
import { ConditionCheck } from './condition-check';
import { Disclosure } from './disclosure';
import { EntryNotHere } from './entry-not-here';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { JudgedBody } from './judged-body';
import { nameOf, type OpenSheet } from './open-sheet';
import { PhotoForm } from './photo-form';
import { PhotoTile } from './photo-tile';
import { RecheckForm } from './recheck-form';
import { Screen } from './screen';
import { nonconformanceWords } from './state-tone';
import { subjectWords } from './subject-words';

const decisionWords = {
  rework: 'Rework',
  repair: 'Repair',
  'use-as-is': 'Use as is',
  reject: 'Reject',
} as const;

/** One nonconformance: what was found, what was decided, what was done, and what is next for you. */
export function NonconformanceScreen({ open, id }: { open: OpenSheet; id: string }) {
  const { sheet, pour, project } = open;
  const state = sheet.nonconformances.find((one) => one.entry.id === id);
  const back = { href: fieldPaths.pour(sheet.pourId), words: pour.number };
  if (!state) {
    return (
      <Screen title="Nonconformance" back={back}>
        <EntryNotHere id={id} what="nonconformance" />
      </Screen>
    );
  }
  const { body } = state.entry;
  const about = { kind: 'nonconformance', id } as const;
  const { word, tone } = nonconformanceWords[state.status];
  const photos = sheet.photos.filter((photo) => state.photoIds.includes(photo.entry.body.photoId));
  const when = (iso: string) => dayAndTime(iso, project.timeZone);
  const mayRecheck = mayRecord('recheck', project.role) && state.status === 'corrected';
  return (
    <Screen title="Nonconformance" aside={`${pour.number} · ${word}`} back={back} form>
      <div className="grid gap-5">
        <article className="grid gap-2 border border-ink bg-sheet p-3">
          <h2 className="text-heading">{body.title}</h2>
          <p className={`flex items-center gap-2 font-label font-semibold ${toneText[tone]}`}>
            <ToneGlyph tone={tone} /> {state.withdrawn ? 'withdrawn' : word}
          </p>
          <dl className="grid gap-2">
            <Line label="About" text={body.about.map((one) => subjectWords(sheet, one)).join('; ')} />
            <Line label="Extent" text={body.extent} />
            {body.description && <Line label="Description" text={body.description} />}
            {body.proposal && <Line label="Proposal" text={body.proposal} />}
            {body.neededBy && <Line label="Answer needed by" text={when(body.neededBy)} />}
            <Line
              label="Raised"
              text={`${nameOf(open, state.entry.authorId)}, ${when(state.entry.recordedAt)}${state.entry.seq === null ? ', not sent yet' : ''}`}
            />
          </dl>
          <Disclosure summary="How was this judged?" className="border-t border-rule">
            <JudgedBody judged={judgedNonconformance(state)} />
          </Disclosure>
          <FieldLink href={fieldPaths.entry(sheet.pourId, id)} className={buttonClasses('quiet')}>
            Ask about it, amend or withdraw it
          </FieldLink>
        </article>
        {state.disposition && (
          <section className="grid gap-2 border border-ink bg-sheet p-3">
            <h2 className="text-heading">Decision: {decisionWords[state.disposition.body.decision]}</h2>
            <p>{state.disposition.body.reason}</p>
            <p className="text-label text-pencil">
              {nameOf(open, state.disposition.authorId)} · {when(state.disposition.recordedAt)} · extent:{' '}
              {state.disposition.body.extent}
            </p>
            {state.conditions.map((condition) => (
              <ConditionCheck key={condition.condition.id} open={open} state={condition} />
            ))}
          </section>
        )}
        {state.corrections.map((correction) => (
          <section key={correction.id} className="border-l-4 border-watch bg-sheet p-3">
            <h2 className="font-label font-semibold">Corrected</h2>
            <p>{correction.body.text}</p>
            <p className="text-label text-pencil">
              {nameOf(open, correction.authorId)} · {when(correction.recordedAt)}
            </p>
          </section>
        ))}
        {state.rechecks.map((recheck) => (
          <section
            key={recheck.id}
            className={`border-l-4 bg-sheet p-3 ${recheck.body.outcome === 'met' ? 'border-met' : 'border-hold'}`}
          >
            <h2 className="font-label font-semibold">
              Rechecked: {recheck.body.outcome === 'met' ? 'met' : 'not met'}
            </h2>
            {recheck.body.text && <p>{recheck.body.text}</p>}
            <p className="text-label text-pencil">
              {nameOf(open, recheck.authorId)} · {when(recheck.recordedAt)}
            </p>
          </section>
        ))}
        {mayRecheck && <RecheckForm open={open} about={about} />}
        {mayRecord('correction', project.role) && !state.withdrawn && (
          <FieldLink
            href={fieldPaths.correction(sheet.pourId, about)}
            className={buttonClasses('primary', true, 'min-h-15')}
          >
            Report the correction
          </FieldLink>
        )}
        {photos.length > 0 && (
          <ul className="grid grid-cols-2 gap-3 sm:grid-cols-3">
            {photos.map((photo) => (
              <PhotoTile key={photo.entry.id} open={open} photo={photo} />
            ))}
          </ul>
        )}
        {mayRecord('photo', project.role) && <PhotoForm open={open} about={about} />}
      </div>
    </Screen>
  );
}

function Line({ label, text }: { label: string; text: string }) {
  return (
    <div>
      <dt className="font-label text-label font-semibold text-pencil">{label}</dt>
      <dd>{text}</dd>
    </div>
  );
}
