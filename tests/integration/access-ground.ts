import { v7 as uuid } from 'uuid';
import { mayRecord } from '@/lib/inspection/entry-access';
import { roles, type Role } from '@/lib/inspection/roles';
import { announce, photograph, send } from './photo-routes';
import { planPour, pointsOf, pushKept, receiptOf, registerGauge, push, outcomesOf } from './record-routes';
import { runJobs } from './run-jobs';
import type { World } from './world';

/** What is asked about: one pour with something in it to be asked for. */
export interface Ground {
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

/** Lays the ground, by the routes where people would; the services have to run for the photographs. */
export async function layGround(w: World): Promise<Ground> {
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
  return {
    pourId,
    point: points[0]!,
    nonconformanceId: nonconformance.id,
    signatures: { inspector: await sign('inspector'), superintendent: await sign('superintendent') },
    releaseId: await writeRelease(w, pourId),
    photoId: seen.photoId,
    waitingPhotos,
  };
}

/** A release put on record as the server does, without what would have to be inspected before. */
async function writeRelease({ projectId, team }: World, pourId: string): Promise<string> {
  const { OpenRecord } = await import('@/lib/server/open-record');
  const { enterProject } = await import('@/db/stores/session-store');
  const { insertRelease } = await import('@/db/stores/release-store');
  const { database } = await import('@/db/connection');
  return database().transaction(async (tx) => {
    await enterProject(tx, projectId);
    const now = new Date().toISOString();
    const author = { id: team.superintendent.id, role: 'superintendent' } as const;
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
