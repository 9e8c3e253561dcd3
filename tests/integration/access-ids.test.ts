import { v7 as uuid } from 'uuid';
import { beforeAll, describe, expect, it } from 'vitest';
import { layGround, type Ground } from './access-ground';
import { rows } from './access-rows';
import { startLocalServices } from './local-services';
import { outcomesOf, planPour, push } from './record-routes';
import { deckPour, openWorld, PASSWORD } from './world';

const world = openWorld(startLocalServices);
let ground: Ground;
beforeAll(async () => {
  ground = await layGround(world());
});

describe('ids of another project', () => {
  it('in a batch item, a cursor, a body or a path are told from made-up ones by nothing', async () => {
    const w = world();
    const { inspector, engineer } = w.otherTeam;
    const gauge = w.device(inspector, null);

    const { POST: pushRoute } = await import('@/app/api/sync/push/route');
    for (const pourId of [ground.pourId, uuid()]) {
      const entry = { ...gauge.reading(ground.point, 52), pourId, projectId: w.otherProjectId };
      const body = { ...gauge.batch([entry]), projectId: w.otherProjectId };
      const [outcome] = outcomesOf(await w.call(pushRoute, { as: inspector, body }));
      expect(outcome).toEqual({
        id: entry.id,
        outcome: 'refused',
        code: 'not-found',
        sentence: 'This pour is not among yours.',
      });
    }

    const { POST: pullRoute } = await import('@/app/api/sync/pull/route');
    for (const pourId of [ground.pourId, uuid()]) {
      const cursor = { after: 5, headHash: 'f'.repeat(64) };
      const body = {
        protocol: 1,
        projectId: w.otherProjectId,
        project: { after: 0, headHash: null },
        pours: [{ pourId, planRevision: 0, ...cursor }],
      };
      const answer = await w.call(pullRoute, { as: inspector, body });
      expect((answer.body.pours as unknown[])[0]).toEqual({
        pourId,
        found: false,
        plan: null,
        entries: [],
        head: 5,
        headHash: cursor.headHash,
        more: false,
        headKnown: true,
      });
    }

    const { POST: confirm } = await import('@/app/api/signatures/[signatureId]/confirm/route');
    const answers = [];
    for (const signatureId of [ground.signatures.inspector!, uuid()])
      answers.push(
        await w.call(confirm, { as: inspector, params: { signatureId }, body: { password: PASSWORD } }),
      );
    expect(answers[0]).toEqual(answers[1]);
    expect(answers[0]).toMatchObject({ status: 404 });

    const otherPour = await otherProjectPour();
    const { POST: decide } = await import('@/app/api/pours/[pourId]/dispositions/route');
    const { POST: undo } = await import('@/app/api/pours/[pourId]/releases/[releaseId]/void/route');
    for (const id of [ground.nonconformanceId, uuid()]) {
      const row = rows['POST pours/[pourId]/dispositions']!({
        world: w,
        ground: { ...ground, pourId: otherPour, nonconformanceId: id },
        role: 'engineer',
        person: engineer,
      });
      expect(await w.call(decide, { ...row, as: engineer })).toMatchObject({
        status: 404,
        body: { code: 'not-found' },
      });
    }
    for (const releaseId of [ground.releaseId, uuid()]) {
      const params = { pourId: otherPour, releaseId };
      const answer = await w.call(undo, { as: engineer, params, body: { reason: 'No' } });
      expect(answer).toMatchObject({ status: 404, body: { code: 'not-found' } });
    }

    const { GET: certificate } =
      await import('@/app/api/pours/[pourId]/releases/[releaseId]/certificate/route');
    for (const releaseId of [ground.releaseId, uuid()]) {
      const answer = await w.call(certificate, { as: engineer, params: { pourId: otherPour, releaseId } });
      expect(answer).toMatchObject({ status: 404, body: { code: 'not-found' } });
    }

    const { GET: see } = await import('@/app/api/photos/[photoId]/address/route');
    const { POST: ask } = await import('@/app/api/photos/[photoId]/upload-address/route');
    const { POST: tell } = await import('@/app/api/photos/[photoId]/uploaded/route');
    const waiting = ground.waitingPhotos.inspector!;
    for (const photoId of [ground.photoId, waiting, uuid()]) {
      const params = { photoId };
      const seen = await w.call(see, { as: inspector, params });
      const asked = await w.call(ask, { as: inspector, params, body: {} });
      const told = await w.call(tell, { as: inspector, params, body: {} });
      for (const answer of [seen, asked, told])
        expect(answer).toMatchObject({ status: 404, body: { code: 'not-found' } });
    }
  });

  it('of a pour that crew are not assigned to are not found either', async () => {
    const w = world();
    const { crew } = w.team;
    const pourId = await planPour(w, 'P-77');
    const { GET } = await import('@/app/api/pours/[pourId]/live/route');
    expect(await w.call(GET, { as: crew, params: { pourId } })).toMatchObject({ status: 404 });
    const device = w.device(crew, pourId);
    const entry = device.entry('correction', {
      about: [{ kind: 'pour', id: pourId }],
      text: 'Chairs raised',
      where: { elementId: null, faceId: null, text: '' },
    });
    expect(outcomesOf(await push(w, device, [entry]))[0]).toMatchObject({
      outcome: 'refused',
      code: 'not-found',
    });
  });

  async function otherProjectPour(): Promise<string> {
    const { POST } = await import('@/app/api/pours/route');
    const body = deckPour(world().otherProjectId, 'P-01');
    return String((await world().call(POST, { as: world().otherTeam.engineer, body })).body.pourId);
  }
});
