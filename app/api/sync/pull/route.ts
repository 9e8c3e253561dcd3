import { pullRequest, pullResponse } from '@/lib/inspection/wire';
import { handleRoute } from '@/lib/server/handle-route';
import { pullStreams } from '@/lib/server/pull-streams';

/** Gives a device what it does not hold yet of the pours that it keeps. */
export const POST = handleRoute({
  action: 'record.pull',
  body: pullRequest,
  response: pullResponse,
  load: async ({ body }) => ({ projectId: body.projectId }),
  run: async ({ tx, person, role, body, now }) => ({
    serverTime: now,
    ...(await pullStreams(tx, body, { id: person.id, role }, now)),
  }),
});
