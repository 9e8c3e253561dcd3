import { beforeAll, describe, expect, it, vi } from 'vitest';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { inspect, release, sign } from './inspected-pour';
import { startLocalServices, type LocalServices } from './local-services';
import { planPour, pull, registerGauge } from './record-routes';
import { runJobs, waitingJobs } from './run-jobs';
import { deckPlan, openWorld } from './world';

let services: LocalServices;
const world = openWorld(async () => (services = await startLocalServices()));
beforeAll(() => registerGauge(world()));

/** Carries out what would be asked for so many hours from now. */
async function hoursLater<T>(hours: number, work: () => Promise<T>): Promise<T> {
  vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + hours * 3_600_000 });
  try {
    return await work();
  } finally {
    vi.useRealTimers();
  }
}

/** A pour that is inspected, not signed yet; a release of it is valid for 24 hours. */
async function inspectedPour(number: string, more: Partial<PlanInput> = {}): Promise<string> {
  const w = world();
  const pourId = await planPour(w, number, undefined, more);
  await inspect(w, pourId, w.device(w.team.inspector, pourId));
  return pourId;
}

async function releasedPour(number: string) {
  const pourId = await inspectedPour(number);
  await sign(world(), pourId);
  return { pourId, releaseId: (await release(world(), pourId)).releaseId };
}

/** A deck with an edge beam beside it, to be released one after the other. */
function inTwoParts(): Partial<PlanInput> {
  const deck = deckPlan().elements[0]!;
  const faces = deck.faces.map((face) => ({ ...face, id: 'edge-top' }));
  return { elements: [deck, { ...deck, id: 'edge', mark: 'Edge beam', faces }] };
}

/** The scheduled job, waiting twice, carried out by two workers at once. */
async function expireAfter(hours: number): Promise<void> {
  const w = world();
  for (let times = 0; times < 2; times += 1) await w.owner.raw(`select app_add_job('expire-releases', '{}')`);
  await hoursLater(hours, () => Promise.all([runJobs(w), runJobs(w)]));
}

const streamOf = async (pourId: string) =>
  (await pull(world(), world().team.engineer, pourId)).pours[0]!.entries;
const voidsOf = async (pourId: string) =>
  (await streamOf(pourId)).filter((entry) => entry.type === 'release-void');
const voidedIds = async (pourId: string) => (await voidsOf(pourId)).map((entry) => entry.body.releaseId);
const mailsOf = async (subject: string) =>
  (await services.mails()).filter((mail) => mail.subject.startsWith(subject));

describe('a release whose validity is over', () => {
  it('is void on record once, as of its end, and is mailed once to each', async () => {
    const w = world();
    const { pourId, releaseId } = await releasedPour('P-01');
    await expireAfter(23);
    expect(await voidsOf(pourId)).toEqual([]);

    await expireAfter(25);
    const given = (await streamOf(pourId)).find((entry) => entry.id === releaseId);
    expect(await voidsOf(pourId)).toMatchObject([
      {
        authorId: w.team.superintendent.id,
        body: { releaseId, cause: 'validity-over', at: given!.body.validUntil },
      },
    ]);
    const mails = await mailsOf('P-01 Release is void');
    const roles = ['coordinator', 'engineer', 'inspector', 'superintendent', 'viewer'];
    expect(mails.map((mail) => mail.to).sort()).toEqual(roles.map((role) => `own.${role}@example.test`));
    expect(mails[0]!.text).toContain('Its validity ended before placing started.');

    await expireAfter(26);
    expect(await voidsOf(pourId)).toHaveLength(1);
    expect(await mailsOf('P-01 Release is void')).toHaveLength(roles.length);
    const { verifyRecord } = await import('@/lib/server/record-verify');
    expect((await verifyRecord()).problems).toEqual([]);
  });

  it('for one part is void at its end, while that of the other part stands', async () => {
    const w = world();
    const pourId = await inspectedPour('P-02', inTwoParts());
    for (const part of ['deck', 'edge']) await sign(w, pourId, [part]);
    const first = await release(w, pourId, ['deck']);
    const second = await hoursLater(10, () => release(w, pourId, ['edge']));
    expect(second.number).toBe(first.number + 1);
    await runJobs(w);
    for (const [{ number }, mark] of [[first, 'Quay deck D2'] as const, [second, 'Edge beam'] as const]) {
      const [mail] = await mailsOf(`P-02 Released, number ${number}`);
      expect(mail!.text).toContain(`Scope: ${mark}. Limits: Bulkhead at grid D.`);
    }

    await expireAfter(25);
    expect(await voidedIds(pourId)).toEqual([first.releaseId]);
    await expireAfter(35);
    expect(await voidedIds(pourId)).toEqual([first.releaseId, second.releaseId]);
  });

  it('is written together with all that follows from its void', async () => {
    const w = world();
    const pourId = await inspectedPour('P-03', inTwoParts());
    // One signature each for the whole pour: the void of the one part sets them aside.
    await sign(w, pourId);
    await release(w, pourId, ['deck']);
    await hoursLater(10, () => release(w, pourId, ['edge']));
    await w.owner.raw(`select app_add_job('expire-releases', '{}')`);
    await hoursLater(25, () => runJobs(w));
    const written = await streamOf(pourId);
    expect(await voidsOf(pourId)).not.toEqual([]);
    const { expireReleases } = await import('@/lib/server/void-releases');
    const { enterProject } = await import('@/db/stores/session-store');
    const { database } = await import('@/db/connection');
    await database().transaction(async (tx) => {
      await enterProject(tx, w.projectId);
      await expireReleases(
        tx,
        { id: pourId, projectId: w.projectId },
        new Date(Date.now() + 25 * 3_600_000).toISOString(),
      );
    });
    expect(await streamOf(pourId)).toEqual(written);
  });

  it('is void though another pour, due before it, cannot be read', async () => {
    const w = world();
    const { pourId: broken } = await releasedPour('P-04');
    const { pourId: sound } = await releasedPour('P-05');
    await w.owner.raw('alter table plans disable trigger plans_append_only');
    await w.owner.raw(`update plans set document = '{}', digest = 'none' where pour_id = ?`, [broken]);

    await expireAfter(25);
    expect(await voidsOf(sound)).toHaveLength(1);
    const failed = (await waitingJobs(w)).filter(({ name }) => name === 'expire-releases');
    expect(failed[0]?.lastError).toContain(broken);
  });
});
