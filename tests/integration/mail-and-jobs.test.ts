import { v7 as uuid } from 'uuid';
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { KeptMail } from '../../scripts/mail-sink';
import { headSeq, inspect, release, sign } from './inspected-pour';
import { startLocalServices, type LocalServices } from './local-services';
import { narrowLine } from './narrow-line';
import { planPour, pull, pushKept, registerGauge } from './record-routes';
import { passRetryDelay, runJobs, waitingJobs } from './run-jobs';
import { openWorld, PASSWORD, type TestDevice } from './world';

let services: LocalServices;
const world = openWorld(async () => (services = await startLocalServices()));
let pours = 0;
let pourId: string;
let phone: TestDevice;

beforeAll(async () => {
  const w = world();
  await registerGauge(w);
  // Two who would be told of everything, were they still there.
  const disabled = await w.addPerson(w.projectId, 'engineer', 'disabled.engineer');
  await w.owner('users').where({ id: disabled.id }).update({ disabled_at: new Date().toISOString() });
  const removed = await w.addPerson(w.projectId, 'superintendent', 'removed.superintendent');
  await w
    .owner('memberships')
    .where({ person_id: removed.id })
    .update({ removed_at: new Date().toISOString() });
});

beforeEach(async () => {
  pours += 1;
  pourId = await planPour(world(), `P-0${pours}`);
  phone = world().device(world().team.inspector, pourId);
});

afterEach(async () => {
  const members = own('coordinator', 'engineer', 'inspector', 'superintendent', 'viewer');
  for (const { to } of await services.mails()) expect(members).toContain(to);
});

/** The mails about the pour at hand, whose subjects begin so, oldest first. */
async function mailsOf(start: string): Promise<KeptMail[]> {
  return (await services.mails()).filter(({ subject }) => subject.startsWith(`P-0${pours} ${start}`));
}

const own = (...roles: string[]) => roles.map((role) => `own.${role}@example.test`).sort();
const addressees = (mails: readonly KeptMail[]) => mails.map((mail) => mail.to).sort();

/** A nonconformance about a reading that is not met, with a proposal to the engineer. */
async function raise(): Promise<{ id: string; readingId: string }> {
  const low = phone.reading('deck-top.A1', 33);
  const nonconformance = phone.entry('nonconformance', {
    title: 'Cover low at A1',
    about: [{ kind: 'entry', id: low.id }],
    where: { elementId: 'deck', faceId: 'deck-top', text: 'Top, near grid D' },
    extent: 'About 1 m2 around the point',
    description: '',
    proposal: 'Use as is: 33 mm against 40 mm',
    neededBy: null,
  });
  await pushKept(world(), phone, [low, nonconformance]);
  return { id: nonconformance.id, readingId: low.id };
}

async function inspected(): Promise<void> {
  await inspect(world(), pourId, phone);
  await sign(world(), pourId);
}

describe('mail', () => {
  it('tells of a hold, and asks the engineer for a decision', async () => {
    const { id } = await raise();
    await runJobs(world());

    const asked = await mailsOf('Decision asked: Cover low at A1');
    expect(addressees(asked)).toEqual(own('engineer', 'superintendent'));
    const hold = await mailsOf('Hold: Cover low at A1');
    expect(addressees(hold)).toEqual(own('inspector', 'superintendent'));
    for (const { from, text } of [...asked, ...hold]) {
      expect(from).toContain('mail@example.test');
      expect(text).toContain('Quay deck, bay 2');
      expect(text).toContain('Raised by own inspector');
      expect(text).toContain('Extent: About 1 m2 around the point');
      expect(text).toContain('Proposed: Use as is: 33 mm against 40 mm');
      expect(text).toMatch(/What stands in the way now \(\d+\):\n- /);
      expect(text).toContain(`See it: http://localhost:3000/nonconformances/${id}`);
      expect(text).toContain('This message is no instruction and releases nothing by itself.');
    }
  });

  it('tells of a hold that nobody raised by name, by what stands in the way', async () => {
    await pushKept(world(), phone, [phone.reading('deck-top.A1', 33)]);
    await runJobs(world());
    const hold = await mailsOf('New hold');
    expect(addressees(hold)).toEqual(own('inspector', 'superintendent'));
    expect(hold[0]!.text).toMatch(/33 mm/);
    expect(hold[0]!.text).toContain(`See it: http://localhost:3000/pours/${pourId}`);
  });

  it('tells what the engineer decided, on whose licence and on what condition', async () => {
    const w = world();
    const { id, readingId } = await raise();
    const { POST } = await import('@/app/api/pours/[pourId]/dispositions/route');
    const condition = { id: uuid(), text: 'Coat the surface', criterion: 'Report received', dueAt: null };
    const answer = await w.call(POST, {
      as: w.team.engineer,
      params: { pourId },
      body: {
        body: {
          nonconformanceId: id,
          decision: 'use-as-is',
          reason: 'Durability reviewed at 33 mm.',
          accepts: [readingId],
          extent: 'About 1 m2 around the point',
          conditions: [{ ...condition, stage: 'after-pour' }],
          licence: 'PE 10001',
        },
        password: PASSWORD,
        seenSeq: await headSeq(w, pourId),
      },
    });
    expect(answer.status).toBe(201);
    await runJobs(w);
    const decided = await mailsOf('Decided: use as is');
    expect(addressees(decided)).toEqual(own('engineer', 'inspector', 'superintendent'));
    expect(decided[0]!.text).toContain('Decided by own engineer');
    expect(decided[0]!.text).toContain('licence PE 10001');
    expect(decided[0]!.text).toContain('Reason: Durability reviewed at 33 mm.');
    expect(decided[0]!.text).toContain(
      'Condition (after the pour): Coat the surface. Met when: Report received',
    );
  });

  it('tells everybody but crew of a release, and everybody who was told that it is void', async () => {
    const w = world();
    await inspected();
    const { token, number } = await release(w, pourId);
    await runJobs(w);
    const told = own('coordinator', 'engineer', 'inspector', 'superintendent', 'viewer');
    const released = await mailsOf(`Released, number ${number}`);
    expect(addressees(released)).toEqual(told);
    const { entries } = (await pull(w, w.team.engineer, pourId)).pours[0]!;
    for (const { text } of released) {
      expect(text).toContain('Released by own superintendent');
      expect(text).toContain('Scope: the whole pour.');
      expect(text).toMatch(/Valid until the start of placing, at the latest \w{3},? \d+ \w{3}/);
      expect(text).toContain('At the points read and for the items checked.');
      expect(text).toContain(`See it: http://localhost:3000/released/${token}`);
      // The head is outside of the database from now on: a tail that is cut later can be shown.
      expect(text).toContain(`Head of the record when this was written: ${entries.at(-1)!.hash}`);
    }

    const rain = { kind: 'rain', text: 'Heavy since five', at: new Date().toISOString() };
    await pushKept(w, phone, [
      phone.entry(
        'site-event',
        { ...rain, amountMm: 12, elementIds: null },
        { seenSeq: await headSeq(w, pourId) },
      ),
    ]);
    await runJobs(w);
    const voided = await mailsOf('Release is void');
    expect(addressees(voided)).toEqual(told);
    expect(voided[0]!.text).toContain('Rain');
    expect(voided[0]!.text).toContain('Do not place concrete on it.');
    expect(voided[0]!.text).toContain(`See it: http://localhost:3000/released/${token}`);
    expect(await waitingJobs(w)).toEqual([]);
  });
});

describe('mail that could not be sent', () => {
  it('waits while the mail server is down, and comes once when it is back', async () => {
    const w = world();
    const back = await services.mailDown();
    await raise();
    await runJobs(w).finally(back);
    const waiting = (await waitingJobs(w)).filter(({ name }) => name === 'mail');
    expect(waiting).toHaveLength(4);
    // Not tried again at once: a server that is down is not hammered.
    for (const job of waiting) {
      expect(job).toMatchObject({ triedLater: true });
      expect(job.lastError).toContain('ECONNREFUSED');
    }
    expect(await mailsOf('')).toEqual([]);
    await passRetryDelay(w);
    await runJobs(w);
    expect(addressees(await mailsOf('Decision asked'))).toEqual(own('engineer', 'superintendent'));
    expect(addressees(await mailsOf('Hold:'))).toEqual(own('inspector', 'superintendent'));
    expect(await waitingJobs(w)).toEqual([]);
  });

  it('to one is sent to that one again, and not to those who have theirs', async () => {
    const w = world();
    const line = await narrowLine(services.smtpPort, 1);
    vi.stubEnv('SMTP_URL', `smtp://127.0.0.1:${line.port}`);
    vi.resetModules();
    try {
      await pushKept(w, phone, [phone.reading('deck-top.A1', 33)]);
      await runJobs(w);
      expect(await mailsOf('New hold')).toHaveLength(1);
      expect(await waitingJobs(w)).toMatchObject([{ name: 'mail', triedLater: true }]);
      line.widen();
      await passRetryDelay(w);
      await runJobs(w);
      expect(addressees(await mailsOf('New hold'))).toEqual(own('inspector', 'superintendent'));
    } finally {
      vi.unstubAllEnvs();
      vi.resetModules();
      line.stop();
    }
  });

  it('is not sent to somebody who left the project while it waited', async () => {
    const w = world();
    const leaver = await w.addPerson(w.projectId, 'inspector', 'leaving.inspector');
    const back = await services.mailDown();
    await raise();
    await runJobs(w).finally(back);
    await w
      .owner('memberships')
      .where({ person_id: leaver.id })
      .update({ removed_at: new Date().toISOString() });
    await passRetryDelay(w);
    await runJobs(w);
    expect(addressees(await mailsOf('Hold:'))).toEqual(own('inspector', 'superintendent'));
    expect(await waitingJobs(w)).toEqual([]);
  });
});
