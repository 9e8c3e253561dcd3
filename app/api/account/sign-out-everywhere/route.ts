import { z } from 'zod';
import { revokeSessionsOf } from '@/db/stores/session-store';
import { handleRoute } from '@/lib/server/handle-route';

/** Ends every session of the person, this one included, at once. */
export const POST = handleRoute({
  action: 'account.sign-out-everywhere',
  response: z.object({ ended: z.number().int() }),
  run: async ({ tx, person, now }) => ({ ended: await revokeSessionsOf(tx, person.id, now) }),
});
