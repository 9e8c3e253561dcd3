import { deviceIndex } from '@/lib/inspection/wire';
import { readDeviceIndex } from '@/db/read/device-index';
import { handleRoute } from '@/lib/server/handle-route';

/** What the signed-in person's device may keep. */
export const GET = handleRoute({
  action: 'device.index',
  response: deviceIndex,
  run: async ({ tx, person, now }) => ({
    serverTime: now,
    person: { id: person.id, name: person.name, email: person.email },
    projects: await readDeviceIndex(tx, person, now),
  }),
});
