import { pushRequest, pushResponse } from '@/lib/inspection/wire';
import { noteDevice } from '@/db/stores/device-store';
import { appendEntries } from '@/lib/server/append-entries';
import { handleRoute } from '@/lib/server/handle-route';
import { highestDeviceSeq } from '@/lib/server/highest-device-seq';

/** Takes in a batch that a device has queued; each entry is answered by itself. */
export const POST = handleRoute({
  action: 'record.push',
  body: pushRequest,
  mostBytes: 12_000_000,
  response: pushResponse,
  load: async ({ body }) => ({ projectId: body.projectId }),
  run: async ({ tx, person, role, body, now }) => {
    const sender = { projectId: body.projectId, authorId: person.id, role, from: 'device' } as const;
    const outcomes = await appendEntries(tx, sender, body.entries, now);
    await noteDevice(tx, {
      id: body.deviceId,
      personId: person.id,
      at: now,
      highestDeviceSeq: highestDeviceSeq(body.entries),
    });
    return { serverTime: now, outcomes };
  },
});
