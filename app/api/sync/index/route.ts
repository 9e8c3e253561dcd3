import { deviceIndex } from '@/lib/inspection/wire';
import { readDeviceIndex } from '@/db/read/device-index';
import { readSessionStart } from '@/db/read/person-sessions';
import { handleRoute } from '@/lib/server/handle-route';

/** What the signed-in person's device may keep. */
export const GET = handleRoute({
  action: 'device.index',
  response: deviceIndex,
  run: async ({ tx, person, now }) => ({
    serverTime: now,
    person: { id: person.id, name: person.name, email: person.email },
    signedInAt: await readSessionStart(tx, person.sessionId),
    projects: await readDeviceIndex(tx, person, now),
  }),
});
