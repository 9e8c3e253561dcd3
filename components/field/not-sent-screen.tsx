'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice } from '@/components/ui/notice';
import { Spinner } from '@/components/ui/spinner';
import { problemsOf } from './problems-of';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { timeAway } from './field-time';
import { InstallOffer } from './install-offer';
import { PhotoQueue } from './photo-queue';
import { RefusedLine } from './refused-line';
import { saveBlob } from './save-blob';
import { Screen } from './screen';
import { SheetLines } from './sheet-line';
import { WaitingPour } from './waiting-pour';
import { OthersWaiting } from './others-waiting';
import { SignInLink } from './sign-in-link';
import { StorageLine } from './storage-line';
import { answeredWords, bytesWords, notSentCount, syncWords, waitingCount } from './sync-words';
import { useDevice, useSnapshot } from './use-device';
import { useNow } from './use-now';

/** What the server has not taken in: waiting, being sent, refused with the reason; photos; send now; save to a file. */
export function NotSentScreen() {
  const { person, asks } = useSnapshot();
  if (person) return <NotSent />;
  return (
    <Screen title="Not sent yet" back={{ href: fieldPaths.pours, words: 'pours' }}>
      <div className="grid gap-6">
        {asks ? (
          <EmptyState
            title="Sign in to see what waits"
            action={<SignInLink className={buttonClasses('primary')}>Sign in</SignInLink>}
          >
            What was recorded here is kept for whoever recorded it.
          </EmptyState>
        ) : (
          <p className="p-4">
            <Spinner label="Opening" />
          </p>
        )}
        <OthersWaiting />
      </div>
    </Screen>
  );
}

function NotSent() {
  const device = useDevice();
  const { sync, refused, photos, pours } = useSnapshot();
  const now = useNow();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const [saved, setSaved] = useState<string | null>(null);
  const waiting = pours.filter((pour) => pour.notSent > 0);
  const queued = photos.filter((photo) => photo.progress !== 'stored');
  const sending = sync.phase === 'sending' || sync.phase === 'fetching';

  const attempt = async (what: () => Promise<void>) => {
    setBusy(true);
    setProblem(null);
    try {
      await what();
    } catch (error) {
      setProblem(Object.values(problemsOf(error))[0] ?? 'That did not work. Everything is still kept here.');
    } finally {
      setBusy(false);
    }
  };
  const save = () =>
    attempt(async () => {
      const blob = await device.exportUnsent();
      const name = `not-sent-${new Date().toISOString().slice(0, 16).replace(/[:T]/g, '-')}.json`;
      saveBlob(blob, name);
      setSaved(`Saved as ${name}, ${bytesWords(blob.size)}. It stays here too.`);
    });

  return (
    <Screen title="Not sent yet" aside={syncWords(sync)} back={{ href: fieldPaths.pours, words: 'pours' }}>
      <div className="grid gap-6">
        {sync.message && sync.phase !== 'sign-in-needed' && (
          <Notice tone={sync.phase === 'idle' ? 'info' : 'watch'}>{sync.message}</Notice>
        )}
        {notSentCount(sync) === 0 && (
          <EmptyState title="Everything is sent">
            {sync.lastSuccessAt ? answeredWords(sync.lastSuccessAt, now) : 'Nothing waits on this device.'}
          </EmptyState>
        )}
        {waitingCount(sync) > 0 && (
          <SheetLines
            heading="Waiting"
            aside={sync.oldestWaitingAt ? `oldest from ${timeAway(sync.oldestWaitingAt, now)}` : undefined}
          >
            {waiting.map((pour) => (
              <WaitingPour key={pour.id} pour={pour} />
            ))}
            <li className="px-3 py-2 text-label text-pencil">
              {sync.waitingEntries} {sync.waitingEntries === 1 ? 'entry' : 'entries'}, {sync.waitingPhotos}{' '}
              {sync.waitingPhotos === 1 ? 'photo' : 'photos'}. Readings and answers go before photos.
              {sync.lastSuccessAt && ` ${answeredWords(sync.lastSuccessAt, now)}`}
            </li>
          </SheetLines>
        )}
        <div className="grid gap-2">
          <Button
            variant="primary"
            wide
            className="min-h-15"
            busy={busy || sending}
            onClick={() => void attempt(() => device.syncNow())}
          >
            {sending ? 'Sending' : 'Send now'}
          </Button>
          {sync.phase === 'sign-in-needed' && (
            <SignInLink className="flex min-h-target items-center justify-center font-label font-semibold text-chalk underline underline-offset-4">
              Sign in, then it is sent
            </SignInLink>
          )}
          {problem && <Notice tone="hold">{problem}</Notice>}
        </div>
        {refused.length > 0 && (
          <section className="grid gap-2">
            <h2 className="px-1 text-heading">Refused</h2>
            <p className="px-1 text-label text-pencil">
              The server did not take these in. They are kept here until you record them again, or let them
              go.
            </p>
            <ul className="grid gap-3">
              {refused.map((one) => (
                <RefusedLine key={one.entry.id} refused={one} />
              ))}
            </ul>
          </section>
        )}
        {queued.length > 0 && <PhotoQueue photos={queued} />}
        <section className="grid gap-2 border border-ink bg-sheet p-3">
          <h2 className="text-heading">As a last resort</h2>
          <p>
            Everything that is not sent, in one file. The office can take it in if this device does not reach
            the server again.
          </p>
          <Button onClick={() => void save()} busy={busy}>
            Save to a file
          </Button>
          {saved && (
            <p role="status" className="font-label font-semibold text-met">
              {saved}
            </p>
          )}
        </section>
        <OthersWaiting />
        <StorageLine />
        <InstallOffer />
        <FieldLink
          href={fieldPaths.pours}
          className="flex min-h-target items-center font-label font-semibold text-chalk underline underline-offset-4"
        >
          Choose which pours are kept here
        </FieldLink>
      </div>
    </Screen>
  );
}
