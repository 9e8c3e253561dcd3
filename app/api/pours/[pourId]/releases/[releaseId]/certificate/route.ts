import { z } from 'zod';
import { AppError } from '@/lib/inspection/app-error';
import { recordId } from '@/lib/inspection/primitives';
import { releaseByEntry } from '@/db/stores/release-store';
import { handleRoute } from '@/lib/server/handle-route';
import { downloadAddress } from '@/lib/server/object-storage';
import { certificateKey } from '@/lib/server/pdf/write-certificate';
import { requirePour } from '@/lib/server/require-pour';

/** A short-lived address of a release's certificate. A job makes it; for a moment after the release there is none yet. */
export const GET = handleRoute({
  action: 'pour.read',
  params: z.object({ pourId: recordId, releaseId: recordId }),
  response: z.object({ url: z.url() }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, params, loaded }) => {
    const release = await releaseByEntry(tx, loaded.projectId, params.releaseId);
    if (release?.pourId !== loaded.id) throw new AppError('not-found');
    return { url: await downloadAddress(certificateKey(params.releaseId)) };
  },
});
