import { z } from 'zod';
import { officeBodies } from '@/lib/inspection/entry-bodies';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { recordOnline } from '@/lib/server/record-online';
import { requirePour } from '@/lib/server/require-pour';

/**
 * The engineer's decision about a nonconformance, signed with the password. `seenSeq` is the head of the pour that
 * the signer had on the screen: what was recorded or amended since is not accepted by it.
 */
export const POST = handleRoute({
  action: 'disposition.sign',
  params: z.object({ pourId: recordId }),
  body: z.object({
    body: officeBodies.disposition,
    password: z.string().min(1, 'Your password signs it.').max(400),
    seenSeq: z.number().int().nonnegative().optional(),
  }),
  password: (body) => body.password,
  status: 201,
  response: z.object({ id: recordId }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, person, role, loaded, body, now }) => {
    const { seenSeq, body: decision } = body;
    const made = { type: 'disposition', body: decision, ...(seenSeq === undefined ? {} : { seenSeq }) };
    return { id: await recordOnline(tx, { person, role }, loaded, made, now) };
  },
});
