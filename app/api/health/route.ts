import { z } from 'zod';
import { handleRoute } from '@/lib/server/handle-route';

/** Answers once the database answers. */
export const GET = handleRoute({
  action: 'health.read',
  response: z.object({ ok: z.literal(true) }),
  run: async ({ tx }) => {
    await tx.raw('select 1');
    return { ok: true as const };
  },
});
