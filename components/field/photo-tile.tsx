'use client';

import { useState } from 'react';
import { buttonClasses } from '@/components/ui/button-classes';
import { Dialog } from '@/components/ui/dialog';
import type { DeviceSnapshot, QueuedPhoto } from '@/lib/device/device-types';
import type { PhotoState } from '@/lib/inspection/sheet-types';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { nameOf, type OpenSheet } from './open-sheet';
import { subjectWords } from './subject-words';
import { useSnapshot } from './use-device';
import { PhotoImage } from './photo-image';
import { usePhotoAddress } from './use-photo-address';

const progressWords: Record<QueuedPhoto['progress'], string> = {
  waiting: 'waits to be sent',
  sending: 'being sent',
  sent: 'sent, being checked',
  stored: 'stored',
  refused: 'refused',
};

/** How far a photo has come, in words, to who holds this device. */
export function photoStanding(
  photo: PhotoState,
  queued: QueuedPhoto | undefined,
  { deviceId, person }: Pick<DeviceSnapshot, 'deviceId' | 'person'>,
): { words: string; bad: boolean } {
  if (photo.stored) return { words: 'stored', bad: false };
  if (photo.refused) return { words: `refused: ${photo.refused.body.problem}`, bad: true };
  if (queued?.progress === 'refused')
    return { words: `refused: ${queued.problem ?? 'no reason given'}`, bad: true };
  if (queued) return { words: progressWords[queued.progress], bad: false };
  // Nothing that waits is ever dropped: where its own device does not have it, the browser has cleared the store.
  if (photo.entry.deviceId === deviceId && photo.entry.authorId === person?.id)
    return { words: 'gone from this device before it was sent', bad: true };
  return { words: 'on its way from another device', bad: false };
}

/** One photo: small, with what it shows and how far it has come; tapped, it opens large. */
export function PhotoTile({ open, photo }: { open: OpenSheet; photo: PhotoState }) {
  const snapshot = useSnapshot();
  const { body } = photo.entry;
  const address = usePhotoAddress(body.photoId);
  const [shown, setShown] = useState(false);
  const standing = photoStanding(
    photo,
    snapshot.photos.find((one) => one.photoId === body.photoId),
    snapshot,
  );
  const words = subjectWords(open.sheet, body.about);
  const text = [body.caption, words].filter(Boolean).join('; ');
  return (
    <li className="border border-ink bg-sheet">
      <button type="button" onClick={() => setShown(true)} className="block w-full text-left">
        {address ? (
          <PhotoImage src={address} alt={text} className="aspect-4/3 w-full object-cover" />
        ) : (
          <span className="grid aspect-4/3 w-full place-items-center bg-paper px-2 text-center text-label text-pencil">
            Its bytes are not here. Shown when there is a network.
          </span>
        )}
        <span className="block px-2 py-1.5 text-label leading-tight">
          <span className="block font-label font-semibold">
            {body.shot} · {words}
          </span>
          {body.caption && <span className="block">{body.caption}</span>}
          <span className={standing.bad ? 'block font-semibold text-hold' : 'block text-pencil'}>
            {standing.words}
          </span>
        </span>
      </button>
      {standing.bad && (
        <FieldLink
          href={fieldPaths.photos(open.sheet.pourId, body.about)}
          className={buttonClasses('quiet', true)}
        >
          Take it again
        </FieldLink>
      )}
      <Dialog open={shown} title={words} onClose={() => setShown(false)} wide closeOutside>
        {address && <PhotoImage src={address} alt={text} className="w-full" />}
        <p className="pt-2 text-label text-pencil">
          {body.caption && `${body.caption} · `}
          {nameOf(open, photo.entry.authorId)} · {dayAndTime(body.takenAt, open.project.timeZone)} ·{' '}
          {standing.words}
        </p>
      </Dialog>
    </li>
  );
}
