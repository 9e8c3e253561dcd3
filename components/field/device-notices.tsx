'use client';

import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Notice } from '@/components/ui/notice';
import { FieldLink, useFieldRoute } from './field-router';
import { fieldPaths } from './field-routes';
import { clockWords } from './sync-words';
import { SignInLink } from './sign-in-link';
import { useDevice, useSnapshot } from './use-device';
import { entriesWords, waitingWords } from './waiting-words';

/**
 * What the device has to tell whatever the screen: a new version, a session that ended, a wrong clock, lost entries.
 * @param quiet a form is open: only what cannot wait is said, and nothing that reloads
 */
export function DeviceNotices({ quiet }: { quiet: boolean }) {
  const device = useDevice();
  const { sync, updateReady, person, people, pin } = useSnapshot();
  const clock = clockWords(sync.clockOffsetMs);
  const lostEntries = sync.lostEntries ?? 0;
  const lostPhotos = sync.lostPhotos ?? 0;
  const lost = lostEntries + lostPhotos;
  const signIn = person !== null && sync.phase === 'sign-in-needed';
  const inTray = useFieldRoute().screen === 'not-sent';
  const refused = inTray ? 0 : sync.refusedEntries;
  const choosePin = person !== null && people.length > 1 && !pin.set;
  if (quiet && lost === 0) return null;
  if (!updateReady && !clock && lost === 0 && refused === 0 && !signIn && !choosePin) return null;
  return (
    <div className="mx-auto grid w-full max-w-4xl gap-2 px-3 pt-3">
      {lost > 0 && (
        <Notice
          tone="hold"
          title={`${waitingWords({ entries: lostEntries, photos: lostPhotos })} ${lost === 1 ? 'is' : 'are'} gone from this device`}
          actions={
            <>
              <FieldLink href={fieldPaths.notSent} className={buttonClasses('secondary')}>
                See what is here
              </FieldLink>
              {device.acknowledgeLost && (
                <Button variant="quiet" onClick={() => void device.acknowledgeLost?.()}>
                  I have read this
                </Button>
              )}
            </>
          }
        >
          <p>
            The device made room by itself before they were sent. They are not on the server. What was sent is
            safe. Record again what is missing{lostPhotos > 0 && ', and take the photos again'}.
          </p>
        </Notice>
      )}
      {!quiet && refused > 0 && (
        <Notice
          tone="hold"
          role="status"
          title={`The server refused ${entriesWords(refused)}`}
          actions={
            <FieldLink href={fieldPaths.notSent} className={buttonClasses('secondary')}>
              See which and why
            </FieldLink>
          }
        >
          <p>
            {refused === 1 ? 'It does' : 'They do'} not count on any sheet. Record{' '}
            {refused === 1 ? 'it' : 'them'} again, or let {refused === 1 ? 'it' : 'them'} go.
          </p>
        </Notice>
      )}
      {!quiet && signIn && (
        <Notice
          tone="watch"
          title={
            sync.waitingEntries > 0
              ? `${entriesWords(sync.waitingEntries)} ${sync.waitingEntries === 1 ? 'waits' : 'wait'} for ${person.name} to sign in`
              : 'Sign in to send'
          }
          actions={<SignInLink className={buttonClasses('primary')}>Sign in as {person.name}</SignInLink>}
        >
          <p>
            {sync.signedInAs === null
              ? 'Your session has ended. Everything you recorded is kept here, and you can go on.'
              : `The server has ${sync.signedInAs}’s session, and nothing of yours is sent in it. Everything you recorded is kept here, and you can go on.`}
          </p>
        </Notice>
      )}
      {!quiet && choosePin && (
        <Notice
          title="Choose a PIN for this device"
          actions={
            <FieldLink href={fieldPaths.pin} className={buttonClasses('secondary')}>
              Choose a PIN
            </FieldLink>
          }
        >
          <p>
            Others use it too. With a PIN you open your work here without a network, and nobody else does.
          </p>
        </Notice>
      )}
      {!quiet && clock && (
        <Notice tone="watch" title="The clock is off">
          <p>{clock}</p>
        </Notice>
      )}
      {!quiet && updateReady && (
        <Notice
          title="A new version is ready"
          actions={<Button onClick={() => device.applyUpdate()}>Update now</Button>}
        >
          <p>It takes a moment and keeps what is not sent. Nothing happens until you choose to.</p>
        </Notice>
      )}
    </div>
  );
}
