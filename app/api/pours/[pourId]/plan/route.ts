import { z } from 'zod';
import { planInput } from '@/lib/inspection/plan-input';
import { recordId, requiredText } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { revisePlan } from '@/lib/server/issue-pour-plan';
import { requirePour } from '@/lib/server/require-pour';

/** Issues the next revision of a pour's plan; `basedOn` is the revision that the person had before them. */
export const POST = handleRoute({
  action: 'plan.revise',
  params: z.object({ pourId: recordId }),
  body: z.object({
    reason: requiredText(300),
    basedOn: z.number().int().positive().optional(),
    plan: planInput,
  }),
  mostBytes: 2_000_000,
  status: 201,
  response: z.object({ revision: z.number().int() }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, person, role, loaded, body, now }) => ({
    revision: await revisePlan(tx, { id: person.id, role }, loaded, body, now),
  }),
});
