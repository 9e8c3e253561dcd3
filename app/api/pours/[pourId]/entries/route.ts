import { z } from 'zod';
import { AppError } from '@/lib/inspection/app-error';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { recordOnline } from '@/lib/server/record-online';
import { requirePour } from '@/lib/server/require-pour';

/** Records one entry online. Decisions have a route of their own: they are signed with the password. */
export const POST = handleRoute({
  action: 'entry.record',
  params: z.object({ pourId: recordId }),
  body: z.object({
    type: z.string().min(1).max(40),
    body: z.record(z.string(), z.json()),
    seenSeq: z.number().int().nonnegative().optional(),
  }),
  mostBytes: 1_000_000,
  status: 201,
  response: z.object({ id: recordId }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, person, role, loaded, body, now }) => {
    if (body.type === 'disposition')
      throw new AppError('not-allowed', 'A disposition is signed with the password, on its decision sheet.');
    return { id: await recordOnline(tx, { person, role }, loaded, body, now) };
  },
});
