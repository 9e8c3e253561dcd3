'use client';

import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import type { QueuedPhoto } from '@/lib/device/device-types';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { PhotoImage } from './photo-image';
import { bytesWords } from './sync-words';
import { useDevice } from './use-device';
import { usePhotoAddress } from './use-photo-address';

const words: Record<QueuedPhoto['progress'], string> = {
  waiting: 'waits',
  sending: 'being sent',
  sent: 'sent, being checked',
  stored: 'stored',
  refused: 'refused',
};

/** Photos of this device on their way to the server, each with how far it is. */
export function PhotoQueue({ photos }: { photos: readonly QueuedPhoto[] }) {
  return (
    <section className="grid gap-2">
      <h2 className="px-1 text-heading">Photos</h2>
      <ul className="border border-ink bg-sheet">
        {photos.map((photo) => (
          <PhotoLine key={photo.photoId} photo={photo} />
        ))}
      </ul>
    </section>
  );
}

function PhotoLine({ photo }: { photo: QueuedPhoto }) {
  const device = useDevice();
  const address = usePhotoAddress(photo.photoId);
  const refused = photo.progress === 'refused';
  return (
    <li className="grid grid-cols-[4rem_1fr] gap-3 border-b border-rule p-2 last:border-b-0">
      {address ? (
        <PhotoImage src={address} alt="" className="size-16 object-cover" />
      ) : (
        <span className="size-16 bg-paper" />
      )}
      <div className="grid min-w-0 gap-1">
        <p className="font-label font-semibold">{photo.caption || `Photo, ${photo.shot}`}</p>
        <p className={refused ? 'font-semibold text-hold' : 'text-label text-pencil'}>
          {words[photo.progress]} · {bytesWords(photo.bytes)}
          {photo.problem && `: ${photo.problem}`}
        </p>
        {refused && (
          <div className="flex flex-wrap gap-2">
            <FieldLink
              href={fieldPaths.photos(photo.pourId, photo.about)}
              className={buttonClasses('secondary')}
            >
              Take it again
            </FieldLink>
            <Button variant="quiet" onClick={() => void device.forgetPhoto(photo.photoId)}>
              Let it go
            </Button>
          </div>
        )}
      </div>
    </li>
  );
}
