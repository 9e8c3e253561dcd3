import { z } from 'zod';
import { AppError } from '@/lib/inspection/app-error';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { uploadAddress } from '@/lib/server/object-storage';
import { incomingKey } from '@/lib/server/photos/photo-keys';
import { requireOwnPhoto } from '@/lib/server/photos/require-photo';

/** An address at which the person who took a photograph can put its bytes; the entry that announces it goes first. */
export const POST = handleRoute({
  action: 'photo.send',
  params: z.object({ photoId: recordId }),
  response: z.object({ url: z.url(), headers: z.record(z.string(), z.string()), expiresAt: z.string() }),
  load: ({ tx, person, params }) => requireOwnPhoto(tx, person, params.photoId),
  run: async ({ loaded, now }) => {
    if (loaded.state === 'stored') throw new AppError('conflict', 'This photograph is stored already.');
    // Signing is arithmetic: no network is waited for inside the transaction.
    return uploadAddress(incomingKey(loaded.id), loaded.contentType, loaded.bytes, now);
  },
});
