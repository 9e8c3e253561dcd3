import { z } from 'zod';
import { AppError } from '@/lib/inspection/app-error';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { downloadAddress } from '@/lib/server/object-storage';
import { requirePhoto } from '@/lib/server/photos/require-photo';

/** A short-lived address for looking at a photograph that is stored. */
export const GET = handleRoute({
  action: 'photo.see',
  params: z.object({ photoId: recordId }),
  response: z.object({ url: z.url() }),
  load: ({ tx, person, params }) => requirePhoto(tx, person, params.photoId),
  run: async ({ loaded }) => {
    if (loaded.objectKey === null) throw new AppError('not-found', 'This photograph is not stored yet.');
    return { url: await downloadAddress(loaded.objectKey) };
  },
});
