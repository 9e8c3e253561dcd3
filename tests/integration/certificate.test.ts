import { beforeAll, expect, it } from 'vitest';
import { headSeq, inspect, release, sign, type Given } from './inspected-pour';
import { startLocalServices } from './local-services';
import { pdfText } from './pdf-text';
import { planPour, pull, pushKept, registerGauge } from './record-routes';
import { runJobs } from './run-jobs';
import { openWorld, type Answer, type TestDevice, type TestPerson } from './world';

const world = openWorld(startLocalServices);
let pourId: string;
let phone: TestDevice;
let given: Given;

beforeAll(async () => {
  const w = world();
  await registerGauge(w);
  pourId = await planPour(w, 'P-07');
  phone = w.device(w.team.inspector, pourId);
  await inspect(w, pourId, phone);
  await sign(w, pourId);
  given = await release(w, pourId);
});

async function certificateOf(
  as: TestPerson,
  params = { pourId, releaseId: given.releaseId },
): Promise<Answer> {
  const { GET } = await import('@/app/api/pours/[pourId]/releases/[releaseId]/certificate/route');
  return world().call(GET, { as, params });
}

async function fetched(): Promise<Response> {
  return fetch(String((await certificateOf(world().team.viewer)).body.url));
}

/** The text of the certificate once the job has made it. */
async function certificateText(): Promise<string> {
  await runJobs(world());
  return pdfText(Buffer.from(await (await fetched()).arrayBuffer()));
}

it('is not there before the job has made it, and is afterwards, for the project alone', async () => {
  const w = world();
  expect((await fetched()).status).toBe(404);
  await runJobs(w);
  const answer = await fetched();
  expect([answer.status, answer.headers.get('content-type')]).toEqual([200, 'application/pdf']);

  expect(await certificateOf(w.otherTeam.engineer)).toMatchObject({ status: 404 });
  const otherPour = await planPour(w, 'P-08');
  expect(
    await certificateOf(w.team.engineer, { pourId: otherPour, releaseId: given.releaseId }),
  ).toMatchObject({
    status: 404,
    body: { code: 'not-found' },
  });
});

it('says what was released, by which rule, on what it rests, and what it does not cover', async () => {
  const w = world();
  const text = await certificateText();
  const { entries } = (await pull(w, w.team.engineer, pourId)).pours[0]!;
  const index = entries.findIndex((entry) => entry.id === given.releaseId);
  const entry = entries[index]!;

  expect(text).toContain(`Release No. ${given.number}`);
  expect(text).toContain('Pour P-07');
  expect(text).toContain('Scope The whole pour');
  expect(text).toContain('Plan rev A');
  expect(text).toContain('FL-S-201 rev B');
  expect(text).toContain('Conforming at the points read and for the items checked');
  expect(text).toMatch(
    /Decision rule Simple acceptance: a reading is met at or above the least accepted cover/,
  );
  expect(text).toContain('Readings 8');
  expect(text).toContain('specified 50 mm, accepted from 40 mm');
  expect(text.match(/52 mm met/g)).toHaveLength(8);
  expect(text).toContain('Bars as drawn? met');
  expect(text).toMatch(/own inspector inspector .* own superintendent superintendent/);
  expect(text).toContain(`/released/${given.token}`);

  // Heads from the record itself: whoever cuts its tail cannot make this one again.
  expect(text).toContain(`Head of the record ${entries[index - 1]!.hash}`);
  expect(text).toContain(`Hash of this entry ${entry.hash}`);
  expect(text).toContain(`Sheet digest ${String(entry.body.sheetDigest)}`);

  expect(text).toContain('At the points read and for the items checked.');
  expect(text).toContain('not covered unless signed for');
  expect(text).toContain('The contract documents and the local code govern');
  expect(text).toContain('no statement is made that the structure is safe');
  expect(text).not.toMatch(/\?\?|undefined|null|NaN/);
});

it('stays what was given when the job runs again after a later reading has voided the release', async () => {
  const w = world();
  const before = await certificateText();
  const seenSeq = await headSeq(w, pourId);
  await pushKept(w, phone, [phone.reading('deck-top.A1', 30, { seenSeq })]);
  const { entries } = (await pull(w, w.team.engineer, pourId)).pours[0]!;
  expect(entries.at(-1)).toMatchObject({ type: 'release-void' });

  const { writeCertificate } = await import('@/lib/server/pdf/write-certificate');
  await writeCertificate({ projectId: w.projectId, pourId, entryId: given.releaseId });
  expect(await certificateText()).toBe(before);
});
