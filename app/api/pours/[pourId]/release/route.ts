import { z } from 'zod';
import { releaseScope } from '@/lib/inspection/entry-bodies';
import { optionalText, recordId } from '@/lib/inspection/primitives';
import { giveRelease } from '@/lib/server/give-release';
import { handleRoute } from '@/lib/server/handle-route';
import { requirePour } from '@/lib/server/require-pour';

/** Gives the release of a scope, or answers 409 with the holds that stand in it; either way it is on record. */
export const POST = handleRoute({
  action: 'release.give',
  params: z.object({ pourId: recordId }),
  body: z.object({ scope: releaseScope, reason: optionalText(500).default('') }),
  status: 201,
  response: z.object({ releaseId: recordId, number: z.number().int(), token: z.string() }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: ({ tx, person, role, loaded, body, now }) =>
    giveRelease(tx, { id: person.id, role }, loaded, body.scope, body.reason, now),
});
