import { z } from 'zod';
import { recordId, requiredText } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { requirePour } from '@/lib/server/require-pour';
import { voidRelease } from '@/lib/server/void-releases';

/** Voids a release by hand, with the reason. */
export const POST = handleRoute({
  action: 'release.void',
  params: z.object({ pourId: recordId, releaseId: recordId }),
  body: z.object({ reason: requiredText(500) }),
  status: 201,
  response: z.object({ id: recordId }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, person, role, loaded, params, body, now }) => {
    const wanted = { releaseId: params.releaseId, reason: body.reason };
    return { id: await voidRelease(tx, { id: person.id, role }, loaded, wanted, now) };
  },
});
