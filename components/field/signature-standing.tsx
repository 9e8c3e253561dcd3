'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText, type Tone } from '@/components/ui/tone';
import { roleWords } from '@/lib/inspection/roles';
import type { SignatureState } from '@/lib/inspection/sheet-types';
import { dayAndTime } from './field-time';
import { nameOf, type OpenSheet } from './open-sheet';
import { SIGNATURE_HEIGHT, SIGNATURE_WIDTH, strokePath } from './signature-strokes';
import { useDevice, useSnapshot } from './use-device';
import { Disclosure } from './disclosure';

function standing(state: SignatureState): { words: string; tone: Tone } {
  if (state.setAsideBy)
    return { words: 'set aside: something was recorded since that it does not cover', tone: 'hold' };
  if (!state.confirmed) return { words: 'signed, not confirmed yet', tone: 'watch' };
  return state.stands ? { words: 'stands', tone: 'met' } : { words: 'does not count', tone: 'hold' };
}

/** Every signature on the sheet and how it stands; your own is confirmed here with the password. */
export function SignatureStanding({ open }: { open: OpenSheet }) {
  const { signatures } = open.sheet;
  if (signatures.length === 0) return null;
  return (
    <section className="grid gap-2">
      <h2 className="px-1 text-heading">Signatures</h2>
      {signatures.toReversed().map((state) => {
        const { words, tone } = standing(state);
        const { body } = state.entry;
        const mine = state.entry.authorId === open.person.id;
        return (
          <article key={state.entry.id} className="grid gap-2 border border-ink bg-sheet p-3">
            <h3 className="font-label text-lead font-semibold">
              {nameOf(open, state.entry.authorId)}, {roleWords[body.as].toLowerCase()}
            </h3>
            <p className={`flex items-start gap-2 font-label font-semibold ${toneText[tone]}`}>
              <ToneGlyph tone={tone} className="mt-0.5 shrink-0" /> {words}
            </p>
            {body.strokes.length > 0 && (
              <svg
                viewBox={`0 0 ${SIGNATURE_WIDTH} ${SIGNATURE_HEIGHT}`}
                role="img"
                aria-label="Drawn signature"
                className="h-20 w-50"
              >
                <path
                  d={strokePath(body.strokes)}
                  fill="none"
                  stroke="var(--ink)"
                  strokeWidth="9"
                  strokeLinecap="round"
                />
              </svg>
            )}
            <Disclosure summary="What was signed">
              <p>{body.words}</p>
            </Disclosure>
            <p className="text-label text-pencil">
              {dayAndTime(state.entry.recordedAt, open.project.timeZone)}
              {state.entry.seq === null && ' · not sent yet'}
            </p>
            {mine && !state.confirmed && !state.setAsideBy && (
              <ConfirmForm signatureId={state.entry.id} sent={state.entry.seq !== null} />
            )}
          </article>
        );
      })}
    </section>
  );
}

function ConfirmForm({ signatureId, sent }: { signatureId: string; sent: boolean }) {
  const device = useDevice();
  const { sync } = useSnapshot();
  const [password, setPassword] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const offline = sync.phase === 'offline' || sync.phase === 'strange-network';

  const confirm = async () => {
    setProblem(null);
    if (password === '') return setProblem('Write your password.');
    setBusy(true);
    try {
      if (!sent) await device.syncNow();
      const answer = await device.confirmSignature(signatureId, password);
      setPassword('');
      if (!answer.ok) setProblem(answer.sentence);
    } catch {
      setProblem('There was no answer. Your signature is kept; confirm it when there is a network.');
    } finally {
      setBusy(false);
    }
  };
  return (
    <form
      noValidate
      className="grid gap-3 border-t border-rule pt-3"
      onSubmit={(event) => {
        event.preventDefault();
        void confirm();
      }}
    >
      <TextInput
        label="Your password"
        hint={
          offline
            ? 'The signature counts once confirmed. That needs a network; your password is never kept here.'
            : 'The signature counts once confirmed. Your password is never kept here.'
        }
        type="password"
        autoComplete="current-password"
        value={password}
        error={problem}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" variant="primary" wide busy={busy} disabled={offline} className="min-h-15">
        {offline ? 'Confirm when there is a network' : 'Confirm the signature'}
      </Button>
    </form>
  );
}
