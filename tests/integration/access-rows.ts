import { v7 as uuid } from 'uuid';
import type { Role } from '@/lib/inspection/roles';
import type { Ground } from './access-ground';
import { deckPlan, deckPour, PASSWORD, type CallOptions, type TestPerson, type World } from './world';

export interface Asking {
  world: World;
  ground: Ground;
  role: Role;
  person: TestPerson;
}
type Row = (asking: Asking) => CallOptions;

const onPour =
  (body?: unknown): Row =>
  ({ ground }) => ({ params: { pourId: ground.pourId }, ...(body === undefined ? {} : { body }) });

const onOwnPhoto: Row = ({ ground, role }) => ({
  params: { photoId: ground.waitingPhotos[role] ?? ground.waitingPhotos.inspector ?? '' },
  body: {},
});

/** One valid request for every route: a route without a row fails the test. */
export const rows: Record<string, Row> = {
  'GET health': () => ({}),
  'POST account/sign-out-everywhere': () => ({ body: {} }),
  'GET sync/index': () => ({}),
  'POST sync/push': ({ world, ground, person }) => {
    const device = world.device(person, ground.pourId);
    return {
      body: device.batch([
        device.entry('note', { about: { kind: 'pour', id: ground.pourId }, text: 'Seen' }),
      ]),
    };
  },
  'POST sync/pull': ({ world, ground }) => ({
    body: {
      protocol: 1,
      projectId: world.projectId,
      project: { after: 0, headHash: null },
      pours: [{ pourId: ground.pourId, planRevision: 0, after: 0, headHash: null }],
    },
  }),
  'POST pours': ({ world }) => ({ body: deckPour(world.projectId, uuid().slice(-12)) }),
  'POST pours/[pourId]/plan': onPour({ reason: 'Chairs moved', plan: deckPlan() }),
  'POST pours/[pourId]/entries': ({ ground }) => ({
    params: { pourId: ground.pourId },
    body: { type: 'note', body: { about: { kind: 'pour', id: ground.pourId }, text: 'Seen' } },
  }),
  'POST pours/[pourId]/dispositions': ({ ground }) => ({
    params: { pourId: ground.pourId },
    body: {
      body: {
        nonconformanceId: ground.nonconformanceId,
        decision: 'rework',
        reason: 'Not as drawn',
        accepts: [],
        extent: 'Two bars',
        conditions: [],
        licence: 'PE 10001',
      },
      password: PASSWORD,
    },
  }),
  'POST pours/[pourId]/release': onPour({ scope: { elementIds: null, limits: '' } }),
  'POST pours/[pourId]/releases/[releaseId]/void': ({ ground }) => ({
    params: { pourId: ground.pourId, releaseId: ground.releaseId },
    body: { reason: 'Rain is coming' },
  }),
  'GET pours/[pourId]/releases/[releaseId]/certificate': ({ ground }) => ({
    params: { pourId: ground.pourId, releaseId: ground.releaseId },
  }),
  'GET pours/[pourId]/live': onPour(),
  'GET photos/[photoId]/address': ({ ground }) => ({ params: { photoId: ground.photoId } }),
  'POST photos/[photoId]/upload-address': onOwnPhoto,
  'POST photos/[photoId]/uploaded': onOwnPhoto,
  'POST signatures/[signatureId]/confirm': ({ ground, role }) => ({
    params: { signatureId: ground.signatures[role] ?? ground.signatures.inspector ?? '' },
    body: { password: PASSWORD },
  }),
};
