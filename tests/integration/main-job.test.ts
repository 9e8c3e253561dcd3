import { v7 as uuid } from 'uuid';
import { expect, it } from 'vitest';
import type { Hold } from '@/lib/inspection/sheet-types';
import {
  planPour,
  pointsOf,
  pull,
  push,
  pushKept,
  receiptOf,
  outcomesOf,
  registerGauge,
} from './record-routes';
import { PASSWORD, openWorld, type Answer, type TestPerson } from './world';

const world = openWorld();
const nowhere = { elementId: 'deck', faceId: 'deck-top', text: 'Top, near grid D' };

it('carries a pour from plan to release and to its void, by the API alone', async () => {
  const w = world();
  const { inspector, superintendent, engineer } = w.team;
  const entries = await import('@/app/api/pours/[pourId]/entries/route');
  const dispositions = await import('@/app/api/pours/[pourId]/dispositions/route');
  const release = await import('@/app/api/pours/[pourId]/release/route');
  const confirm = await import('@/app/api/signatures/[signatureId]/confirm/route');
  const live = await import('@/app/api/pours/[pourId]/live/route');

  await registerGauge(w);
  const pourId = await planPour(w, 'P-01');
  const points = await pointsOf(w, pourId);
  expect(points).toHaveLength(8);
  const phone = w.device(inspector, pourId);
  const record = async (as: TestPerson, type: string, body: object): Promise<string> => {
    const answer = await w.call(entries.POST, { as, params: { pourId }, body: { type, body } });
    expect(answer).toMatchObject({ status: 201 });
    return String(answer.body.id);
  };
  const head = async () =>
    (await w.call(live.GET, { as: inspector, params: { pourId } })).body.headSeq as number;
  const askRelease = (as = superintendent): Promise<Answer> =>
    w.call(release.POST, {
      as,
      params: { pourId },
      body: { scope: { elementIds: null, limits: '' }, reason: '' },
    });

  // Offline: eight readings, two not met; the checks; a nonconformance about one of the two.
  const readings = points.map((point, index) => phone.reading(point, { 0: 33, 7: 34 }[index] ?? 52));
  // At opposite corners: what is asked for again beside the one is not the other.
  const low = readings[0]!;
  const lowest = readings[7]!;
  const nonconformance = phone.entry('nonconformance', {
    title: 'Cover low at two points',
    about: [{ kind: 'entry', id: lowest.id }],
    where: nowhere,
    extent: 'About 1 m2 around the point',
    description: '',
    proposal: 'Use as is: 34 mm against 40 mm',
    neededBy: null,
  });
  const answers = ['bars', 'clean'].map((checkId) => phone.entry('answer', { checkId, answer: 'met' }));
  await pushKept(w, phone, [...readings, ...answers, nonconformance]);

  const refused = await askRelease();
  expect(refused.status).toBe(409);
  const holds = (refused.body.detail as { holds: Hold[] }).holds.map((hold) => hold.kind);
  expect(holds).toEqual(
    expect.arrayContaining(['cover-not-met', 'disposition-awaited', 'signature-missing']),
  );

  // The superintendent reports a correction of one point; the inspector reads what is asked for again.
  await record(superintendent, 'correction', {
    about: [{ kind: 'point', id: low.body.pointId }],
    text: 'Chairs raised',
    where: nowhere,
  });
  const seen = await head();
  const stillAsked = points.filter((point) => point !== lowest.body.pointId);
  await pushKept(
    w,
    phone,
    stillAsked.map((point) => phone.reading(point, 51, { seenSeq: seen })),
  );

  // The engineer accepts the other as it is, with a condition for after the pour.
  const wrong = await w.call(dispositions.POST, {
    as: engineer,
    params: { pourId },
    body: { body: disposition(nonconformance.id, [lowest.id]), password: 'not the password' },
  });
  expect(wrong).toMatchObject({ status: 403, body: { code: 'wrong-password' } });
  const decided = await w.call(dispositions.POST, {
    as: engineer,
    params: { pourId },
    body: { body: disposition(nonconformance.id, [lowest.id]), password: PASSWORD, seenSeq: await head() },
  });
  expect(decided.status).toBe(201);

  // Both sign in sight of everything, and confirm with their own passwords.
  for (const [as, device] of [
    ['inspector', phone],
    ['superintendent', w.device(superintendent, pourId)],
  ] as const) {
    const signature = device.entry(
      'signature',
      {
        as,
        elementIds: null,
        words: 'Inspected as listed',
        strokes: [[1, 1, 2, 2]],
        sheetDigest: 'a'.repeat(64),
      },
      { seenSeq: await head() },
    );
    receiptOf(outcomesOf(await push(w, device, [signature]))[0]);
    expect((await askRelease()).status).toBe(409);
    const params = { signatureId: signature.id };
    const byOther = await w.call(confirm.POST, {
      as: as === 'inspector' ? superintendent : inspector,
      params,
      body: { password: PASSWORD },
    });
    expect(byOther).toMatchObject({ status: 403, body: { code: 'not-allowed' } });
    expect(
      (await w.call(confirm.POST, { as: device.person, params, body: { password: PASSWORD } })).status,
    ).toBe(201);
  }

  const given = await askRelease();
  expect(given).toMatchObject({ status: 201, body: { number: 1 } });
  expect((await w.call(live.GET, { as: superintendent, params: { pourId } })).body).toMatchObject({
    state: 'released',
    holds: 0,
  });
  const { publicRelease } = await import('@/lib/server/public-release');
  const page = await publicRelease(String(given.body.token), new Date().toISOString());
  expect(page).toMatchObject({ number: 1, stands: true, chain: { intact: true }, voided: null });
  expect(page?.signers.map((signer) => signer.role).sort()).toEqual(['inspector', 'superintendent']);

  // One more reading that is not met: the release is void by the same write.
  await pushKept(w, phone, [phone.reading(points[4]!, 30, { seenSeq: await head() })]);
  const after = await publicRelease(String(given.body.token), new Date().toISOString());
  expect(after).toMatchObject({ stands: false });
  expect(after?.voided?.reason).toBeTruthy();
  expect((await w.call(live.GET, { as: superintendent, params: { pourId } })).body.state).toBe('held');

  const { entries: stream } = (await pull(w, engineer, pourId)).pours[0]!;
  expect(stream.map((entry) => entry.seq)).toEqual([...stream.keys()].map((index) => index + 2));
  expect(stream.filter((entry) => entry.type === 'release-refused').length).toBe(3);
  expect(stream.at(-1)).toMatchObject({ type: 'release-void', body: { releaseId: given.body.releaseId } });

  const jobs = await w.owner.raw<{ rows: { identifier: string; kind: string | null }[] }>(
    `select t.identifier, j.payload ->> 'kind' as kind from graphile_worker._private_jobs j
     join graphile_worker._private_tasks t on t.id = j.task_id order by j.id`,
  );
  const mails = jobs.rows.filter((job) => job.identifier === 'mail').map((job) => job.kind);
  expect(mails).toEqual(['disposition-asked', 'hold', 'decided', 'released', 'void', 'hold']);

  const { verifyRecord } = await import('@/lib/server/record-verify');
  expect((await verifyRecord()).problems).toEqual([]);
});

const disposition = (nonconformanceId: string, accepts: string[]) => ({
  nonconformanceId,
  decision: 'use-as-is',
  reason: 'Fire and durability reviewed at 34 mm.',
  accepts,
  extent: 'About 1 m2 around the point',
  conditions: [
    {
      id: uuid(),
      text: 'Coat the surface',
      criterion: 'Coating report received',
      stage: 'after-pour',
      dueAt: null,
    },
  ],
  licence: 'PE 10001',
});
