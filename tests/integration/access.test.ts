import { readdirSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import path from 'node:path';
import { v7 as uuid } from 'uuid';
import { beforeAll, describe, expect, it } from 'vitest';
import { access, allowed, type Action } from '@/lib/server/access';
import { mayRecord } from '@/lib/inspection/entry-access';
import { roles, type Role } from '@/lib/inspection/roles';
import { startLocalServices } from './local-services';
import { announce, photograph, send } from './photo-routes';
import { planPour, pointsOf, pushKept, receiptOf, registerGauge, push, outcomesOf } from './record-routes';
import { runJobs } from './run-jobs';
import { deckPlan, deckPour, PASSWORD, openWorld, type CallOptions, type TestPerson } from './world';

const world = openWorld(startLocalServices);

/** What the rows below ask about: one pour with something in it to be asked for. */
interface Ground {
  pourId: string;
  point: string;
  nonconformanceId: string;
  releaseId: string;
  signatures: Partial<Record<Role, string>>;
  /** A photograph that is stored. */
  photoId: string;
  /** Photographs announced and not sent yet, by the role of who took them: nobody else sends them. */
  waitingPhotos: Partial<Record<Role, string>>;
}
let ground: Ground;

type Handler = Parameters<ReturnType<typeof world>['call']>[0] & { action?: Action };
type Row = (ground: Ground, role: Role, person: TestPerson) => CallOptions;

const onPour =
  (body?: unknown): Row =>
  (g) => ({ params: { pourId: g.pourId }, ...(body === undefined ? {} : { body }) });

const onOwnPhoto: Row = (g, role) => ({
  params: { photoId: g.waitingPhotos[role] ?? g.waitingPhotos.inspector ?? '' },
  body: {},
});

/** One valid request for every route: a route without a row fails the test. */
const rows: Record<string, Row> = {
  'GET health': () => ({}),
  'POST account/sign-out-everywhere': () => ({ body: {} }),
  'GET sync/index': () => ({}),
  'POST sync/push': (g, _role, person) => {
    const device = world().device(person, g.pourId);
    return {
      body: device.batch([device.entry('note', { about: { kind: 'pour', id: g.pourId }, text: 'Seen' })]),
    };
  },
  'POST sync/pull': (g) => ({
    body: {
      protocol: 1,
      projectId: world().projectId,
      project: { after: 0, headHash: null },
      pours: [{ pourId: g.pourId, planRevision: 0, after: 0, headHash: null }],
    },
  }),
  'POST pours': () => ({ body: deckPour(world().projectId, uuid().slice(-12)) }),
  'POST pours/[pourId]/plan': onPour({ reason: 'Chairs moved', plan: deckPlan() }),
  'POST pours/[pourId]/entries': (g) => ({
    params: { pourId: g.pourId },
    body: { type: 'note', body: { about: { kind: 'pour', id: g.pourId }, text: 'Seen' } },
  }),
  'POST pours/[pourId]/dispositions': (g) => ({
    params: { pourId: g.pourId },
    body: {
      body: {
        nonconformanceId: g.nonconformanceId,
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
  'POST pours/[pourId]/releases/[releaseId]/void': (g) => ({
    params: { pourId: g.pourId, releaseId: g.releaseId },
    body: { reason: 'Rain is coming' },
  }),
  'GET pours/[pourId]/releases/[releaseId]/certificate': (g) => ({
    params: { pourId: g.pourId, releaseId: g.releaseId },
  }),
  'GET pours/[pourId]/live': onPour(),
  'GET photos/[photoId]/address': (g) => ({ params: { photoId: g.photoId } }),
  'POST photos/[photoId]/upload-address': onOwnPhoto,
  'POST photos/[photoId]/uploaded': onOwnPhoto,
  'POST signatures/[signatureId]/confirm': (g, role) => ({
    params: { signatureId: g.signatures[role] ?? g.signatures.inspector ?? '' },
    body: { password: PASSWORD },
  }),
};

/** next-auth answers by itself what belongs to sign-in; it is the only route without the wrapper. */
const notWrapped = new Set(['GET auth/[...nextauth]', 'POST auth/[...nextauth]']);

const api = path.resolve('app/api');
const files = readdirSync(api, { recursive: true, encoding: 'utf8' }).filter((file) =>
  file.endsWith('route.ts'),
);
const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;

async function routes(): Promise<{ name: string; handler: Handler }[]> {
  const found = await Promise.all(
    files.map(async (file) => {
      const exported = (await import(pathToFileURL(path.join(api, file)).href)) as Record<
        string,
        Handler | undefined
      >;
      return methods.flatMap((method) => {
        const handler = exported[method];
        return handler ? [{ name: `${method} ${path.posix.dirname(file)}`, handler }] : [];
      });
    }),
  );
  return found.flat();
}

beforeAll(async () => {
  const w = world();
  await registerGauge(w);
  const pourId = await planPour(w, 'P-01');
  const points = await pointsOf(w, pourId);
  const phone = w.device(w.team.inspector, pourId);
  const nonconformance = phone.entry('nonconformance', {
    title: 'Bars short',
    about: [{ kind: 'check', id: 'bars' }],
    where: { elementId: 'deck', faceId: null, text: 'Grid D' },
    extent: 'Two bars',
    description: '',
    proposal: '',
    neededBy: null,
  });
  await pushKept(w, phone, [phone.reading(points[0]!, 52), nonconformance]);
  const sign = async (as: 'inspector' | 'superintendent') => {
    const device = w.device(w.team[as], pourId);
    const entry = device.entry('signature', {
      as,
      elementIds: null,
      words: 'As listed',
      strokes: [],
      sheetDigest: 'a'.repeat(64),
    });
    receiptOf(outcomesOf(await push(w, device, [entry]))[0]);
    return entry.id;
  };
  // So that a refusal of crew is about the role, and not about the pour being none of theirs.
  await w
    .owner('assignments')
    .insert({ project_id: w.projectId, pour_id: pourId, person_id: w.team.crew.id });
  const seen = await announce(w, phone, await photograph());
  await send(w, w.team.inspector, seen);
  await runJobs(w);
  const waitingPhotos: Ground['waitingPhotos'] = {};
  for (const role of roles.filter((one) => mayRecord('photo', one))) {
    const taken = await announce(w, w.device(w.team[role], pourId), await photograph());
    waitingPhotos[role] = taken.photoId;
  }
  ground = {
    pourId,
    point: points[0]!,
    nonconformanceId: nonconformance.id,
    signatures: { inspector: await sign('inspector'), superintendent: await sign('superintendent') },
    releaseId: await writeRelease(w.projectId, pourId),
    photoId: seen.photoId,
    waitingPhotos,
  };
});

/** A release put on record as the server does, without what would have to be inspected before. */
async function writeRelease(projectId: string, pourId: string): Promise<string> {
  const { OpenRecord } = await import('@/lib/server/open-record');
  const { enterProject } = await import('@/db/stores/session-store');
  const { insertRelease } = await import('@/db/stores/release-store');
  const { database } = await import('@/db/connection');
  return database().transaction(async (tx) => {
    await enterProject(tx, projectId);
    const now = new Date().toISOString();
    const author = { id: world().team.superintendent.id, role: 'superintendent' } as const;
    const record = await OpenRecord.open(tx, projectId, author, now);
    await record.load([pourId]);
    const number = record.nextReleaseNumber();
    const validUntil = new Date(Date.now() + 3_600_000).toISOString();
    const entry = record.write(pourId, 'release', {
      number,
      scope: { elementIds: null, limits: '' },
      sheetDigest: 'a'.repeat(64),
      planRevision: 1,
      drawings: [],
      mix: null,
      signatureIds: [uuid(), uuid()],
      dispositionIds: [],
      readings: 0,
      conditions: [],
      validUntil,
      headSeq: 1,
      headHash: null,
    });
    await record.close();
    const row = { projectId, number, entryId: entry.id, pourId, token: uuid(), releasedBy: author.id };
    await insertRelease(tx, { ...row, releasedAt: now, validUntil });
    return entry.id;
  });
}

const closed = ['sign-in-needed', 'not-found', 'not-allowed'];

describe('every route', () => {
  it('has its row here, and its action in the table', async () => {
    const found = await routes();
    expect(found.length).toBeGreaterThan(10);
    const named = found.map(({ name }) => name).filter((name) => !notWrapped.has(name));
    expect(named.sort()).toEqual(Object.keys(rows).sort());
    for (const { name, handler } of found)
      expect({ name, known: (handler.action ?? '') in access }).toEqual({ name, known: true });
  });

  it('asks nobody in without a session, unless it is public', async () => {
    for (const { name, handler } of await wrapped()) {
      const row = rows[name]!;
      const answer = await world().call(handler, row(ground, 'inspector', world().team.inspector));
      const open = access[handler.action] === 'public';
      expect({ name, status: answer.status }).toEqual({ name, status: open ? 200 : 401 });
    }
  });

  it('asks a disabled person to sign in, whatever the role was', async () => {
    const w = world();
    for (const role of roles) {
      const person = await w.addPerson(w.projectId, role, `disabled.${role}`);
      await w.owner('users').where({ id: person.id }).update({ disabled_at: new Date().toISOString() });
      for (const { name, handler } of await wrapped()) {
        if (access[handler.action] === 'public') continue;
        const row = rows[name]!(ground, role, person);
        const { body } = await w.call(handler, { ...row, as: person });
        // A password of somebody who may not sign in is wrong before it is anything else.
        expect({ name, role, code: body.code }).toEqual({
          name,
          role,
          code: JSON.stringify(row.body ?? '').includes(PASSWORD) ? 'wrong-password' : 'sign-in-needed',
        });
      }
    }
  });

  it.each(roles)('holds no member of another project for anything but a stranger: %s', async (role) => {
    const w = world();
    const person = w.otherTeam[role];
    for (const { name, handler } of await wrapped()) {
      if (typeof access[handler.action] === 'string') continue;
      const answer = await w.call(handler, { ...rows[name]!(ground, role, person), as: person });
      expect({ name, status: answer.status, code: answer.body.code }).toEqual({
        name,
        status: 404,
        code: 'not-found',
      });
    }
  });

  it.each(roles)('does what the table says, and nothing else: %s', async (role) => {
    const w = world();
    for (const { name, handler } of await wrapped()) {
      // A session of its own for each: one of the routes ends them all.
      const person = { ...w.team[role], ...(await w.addSession(w.team[role].id)) };
      const { status, body } = await w.call(handler, { ...rows[name]!(ground, role, person), as: person });
      if (allowed(handler.action, role)) {
        expect({
          name,
          status,
          code: body.code,
          open: !closed.includes(body.code ?? '') && status < 500,
        }).toMatchObject({
          name,
          open: true,
        });
      } else {
        expect({ name, status, code: body.code }).toEqual({ name, status: 403, code: 'not-allowed' });
      }
    }
  });

  async function wrapped(): Promise<{ name: string; handler: Handler & { action: Action } }[]> {
    return (await routes()).flatMap(({ name, handler }) =>
      notWrapped.has(name) || !handler.action
        ? []
        : [{ name, handler: Object.assign(handler, { action: handler.action }) }],
    );
  }
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
      const row = rows['POST pours/[pourId]/dispositions']!(
        { ...ground, pourId: otherPour, nonconformanceId: id },
        'engineer',
        engineer,
      );
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
  });

  it('of a pour that crew are not assigned to are not found either', async () => {
    const w = world();
    // The walk above has ended everybody's first session.
    const again = async (person: TestPerson) => ({ ...person, ...(await w.addSession(person.id)) });
    const crew = await again(w.team.crew);
    const pourId = await planPour(w, 'P-77', await again(w.team.engineer));
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
