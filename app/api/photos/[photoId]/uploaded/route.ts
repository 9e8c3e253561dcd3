import { z } from 'zod';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { enqueueJob } from '@/lib/server/jobs/enqueue-job';
import { requireOwnPhoto } from '@/lib/server/photos/require-photo';

/** Tells that the bytes were put: a job looks at them. Told again, it looks once more or finds them stored. */
export const POST = handleRoute({
  action: 'photo.send',
  params: z.object({ photoId: recordId }),
  response: z.object({ state: z.enum(['waiting', 'stored', 'refused']) }),
  load: ({ tx, person, params }) => requireOwnPhoto(tx, person, params.photoId),
  run: async ({ tx, loaded }) => {
    if (loaded.state !== 'stored')
      await enqueueJob(tx, 'verify-photo', { projectId: loaded.projectId, photoId: loaded.id });
    return { state: loaded.state };
  },
});
