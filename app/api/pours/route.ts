import { z } from 'zod';
import { pourInput } from '@/lib/inspection/plan-input';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { createPour } from '@/lib/server/issue-pour-plan';

/** Plans a pour: its number, place and time, and the first revision of its plan. */
export const POST = handleRoute({
  action: 'pour.create',
  body: pourInput,
  mostBytes: 2_000_000,
  status: 201,
  response: z.object({ pourId: recordId }),
  load: async ({ body }) => ({ projectId: body.projectId }),
  run: async ({ tx, person, role, body, now }) => ({
    pourId: await createPour(tx, { id: person.id, role }, body, now),
  }),
});
