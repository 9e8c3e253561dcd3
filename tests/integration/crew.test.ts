import { beforeAll, describe, expect, it } from 'vitest';
import { pullResponse, type PullRequest, type PullResponse } from '@/lib/inspection/wire';
import { startLocalServices } from './local-services';
import { announce, askAddress, photoEntry, photograph, send } from './photo-routes';
import { outcomesOf, planPour, pointsOf, pull, push, pushKept, registerGauge } from './record-routes';
import { runJobs } from './run-jobs';
import { openWorld, type TestDevice, type TestPerson } from './world';

const world = openWorld(() => startLocalServices());
let pourId: string;
let otherPourId: string;
let points: string[];
let photoId: string;
let inspector: TestDevice;
let crew: TestPerson;

type Pour = PullResponse['pours'][number];
type PourCursor = PullRequest['pours'][number];

beforeAll(async () => {
  const w = world();
  await registerGauge(w);
  pourId = await planPour(w, 'P-01');
  otherPourId = await planPour(w, 'P-02');
  points = await pointsOf(w, pourId);
  inspector = w.device(w.team.inspector, pourId);
  crew = w.team.crew;
  await assign(crew, pourId);

  const raised = inspector.entry('nonconformance', {
    title: 'Two bars short at the joint',
    about: [{ kind: 'point', id: points[1]! }],
    where: { elementId: 'deck', faceId: 'deck-top', text: 'Grid D' },
    extent: 'Two bars over 600 mm',
    description: 'For the office: the schedule was read wrongly.',
    proposal: '',
    neededBy: null,
  });
  await pushKept(w, inspector, [
    inspector.reading(points[0]!, 31),
    inspector.reading(points[2]!, 57.5),
    inspector.entry('answer', { checkId: 'clean', answer: 'not-met', note: 'Sawdust at the east end' }),
    inspector.entry('note', { about: { kind: 'pour', id: pourId }, text: 'Between us in the office' }),
    raised,
  ]);
  const taken = await announce(w, inspector, await photograph(), {
    about: { kind: 'nonconformance', id: raised.id },
  });
  await send(w, w.team.inspector, taken);
  await runJobs(w);
  photoId = taken.photoId;
});

async function assign(person: TestPerson, to: string): Promise<void> {
  await world()
    .owner('assignments')
    .insert({ project_id: world().projectId, pour_id: to, person_id: person.id });
}

async function pullPour(as: TestPerson, cursor: Partial<PourCursor> = {}): Promise<Pour> {
  const { POST } = await import('@/app/api/sync/pull/route');
  const answer = await world().call(POST, {
    as,
    body: {
      protocol: 1,
      projectId: world().projectId,
      project: { after: 0, headHash: null },
      pours: [{ pourId, planRevision: 0, after: 0, headHash: null, crewList: null, ...cursor }],
    },
  });
  expect(answer.status).toBe(200);
  const parsed = pullResponse.strict().parse(answer.body);
  expect(parsed.project.entries).toEqual([]);
  return parsed.pours[0]!;
}

const cursorAfter = (pour: Pour, list = pour.crewList) => ({
  after: pour.head,
  headHash: pour.headHash,
  crewList: list?.digest ?? null,
});

describe('what crew get of a pour', () => {
  it('is what they must put right: readings with their place on the face, extents, photographs', async () => {
    const { found, plan, entries, crewList } = await pullPour(crew);
    expect({ found, plan, entries }).toEqual({ found: true, plan: null, entries: [] });
    expect(crewList).toMatchObject({ planRevision: 1, drawings: ['FL-S-201 rev B'], awaited: [] });
    const items = Object.fromEntries(crewList!.items.map((item) => [item.what.kind, item]));
    expect(Object.keys(items).sort()).toEqual(['check', 'cover', 'nonconformance']);
    expect(items.cover).toMatchObject({
      what: { accepted: '40 mm', high: false, values: [{ value: '31 mm' }] },
      together: [{ kind: 'point', id: points[0] }],
      face: { name: 'Quay deck D2, Top', widthMm: 8000, heightMm: 4000 },
    });
    expect(items.cover?.face?.points.map((point) => [point.key, point.mark])).toEqual([
      [points[0], 'not-met-low'],
    ]);
    expect(items.check?.what).toEqual({
      kind: 'check',
      question: 'Form clean?',
      note: 'Sawdust at the east end',
    });
    expect(items.nonconformance).toMatchObject({
      what: { title: 'Two bars short at the joint', extent: 'Two bars over 600 mm', decision: null },
      photoIds: [photoId],
    });
    expect(items.nonconformance?.together.map((one) => one.kind)).toEqual(['nonconformance', 'point']);
  });

  it('is nothing else of the record', async () => {
    const hidden = [
      '57.5',
      'Between us in the office',
      'schedule was read wrongly',
      world().team.inspector.id,
      'leastAcceptedMm',
      'trail',
      'decisionRule',
    ];
    const given = JSON.stringify(await pullPour(crew));
    expect(hidden.filter((one) => given.includes(one))).toEqual([]);
    // The same search finds each of them in what the inspector gets.
    const whole = JSON.stringify(await pull(world(), world().team.inspector, pourId));
    expect(hidden.filter((one) => !whole.includes(one))).toEqual([]);
  });

  it('comes once, and again when something in it has changed', async () => {
    const first = await pullPour(crew);
    const again = await pullPour(crew, cursorAfter(first));
    expect(again).toMatchObject({ found: true, crewList: null, more: false, head: first.head });
    await pushKept(world(), inspector, [inspector.reading(points[3]!, 33)]);
    const later = await pullPour(crew, cursorAfter(first));
    expect(later.crewList?.digest).not.toBe(first.crewList?.digest);
    expect(later.head).toBeGreaterThan(first.head);
  });

  it('is given to a device of an earlier version too, which names no list', async () => {
    const { pours } = await pull(world(), crew, pourId);
    expect(pours[0]?.crewList?.items.length).toBeGreaterThan(0);
  });

  it('is told apart from a record that was restored behind it', async () => {
    const { head } = await pullPour(crew);
    expect((await pullPour(crew, { after: head, headHash: 'f'.repeat(64) })).headKnown).toBe(false);
  });
});

describe('a pour that crew are not assigned to', () => {
  it('is not found, is not listed, takes nothing and shows no photograph', async () => {
    const w = world();
    const { GET } = await import('@/app/api/sync/index/route');
    const index = await w.call(GET, { as: crew });
    const listed = (index.body.projects as { pours: { id: string }[] }[]).flatMap((one) => one.pours);
    expect(listed.map((pour) => pour.id)).toEqual([pourId]);

    const { pours } = await pull(w, crew, otherPourId);
    expect(pours[0]).toEqual({
      pourId: otherPourId,
      found: false,
      plan: null,
      entries: [],
      head: 0,
      headHash: null,
      more: false,
      headKnown: true,
    });

    const phone = w.device(crew, otherPourId);
    const [outcome] = outcomesOf(
      await push(w, phone, [correction(phone, { kind: 'pour', id: otherPourId })]),
    );
    expect(outcome).toMatchObject({ outcome: 'refused', code: 'not-found' });

    const elsewhere = await announce(w, w.device(w.team.inspector, otherPourId), await photograph());
    expect((await askAddress(w, crew, elsewhere.photoId)).status).toBe(404);
    expect((await askAddress(w, crew, photoId)).status).toBe(200);
  });
});

function correction(phone: TestDevice, about: { kind: string; id: string }, seenSeq = 0) {
  return phone.entry(
    'correction',
    { about: [about], text: 'Chair set under the bar', where: { elementId: null, faceId: null, text: '' } },
    { seenSeq },
  );
}

describe('a correction by crew', () => {
  it('is taken in with its photograph, leaves the list, and waits for the inspector', async () => {
    const w = world();
    const phone = w.device(crew, pourId);
    const seen = await pullPour(crew);
    const bytes = await photograph();
    const about = { kind: 'point', id: points[0]! };
    const entry = correction(phone, about, seen.head);
    const photo = photoEntry(phone, bytes, { about });
    await pushKept(w, phone, [entry, photo]);
    await send(w, crew, { photoId: String(photo.body.photoId), entryId: photo.id, bytes });
    await runJobs(w);

    const after = await pullPour(crew, cursorAfter(seen));
    expect(after.entries.map((one) => [one.type, one.authorId])).toEqual([
      ['correction', crew.id],
      ['photo', crew.id],
      ['photo-stored', crew.id],
    ]);
    const named = after.crewList!.items.flatMap((item) => item.together.map((one) => one.id));
    expect(named).not.toContain(points[0]);
    expect(after.crewList!.awaited).toHaveLength(1);
    expect(after.crewList!.awaited[0]?.where).toContain('Quay deck D2, Top');
  });

  it('is not shown to others of the crew, whose list it changes', async () => {
    const mate = await world().addPerson(world().projectId, 'crew', 'mate.crew');
    await assign(mate, pourId);
    const pour = await pullPour(mate);
    expect(pour.entries).toEqual([]);
    expect(pour.crewList?.awaited).toHaveLength(1);
    expect(JSON.stringify(pour)).not.toContain('Chair set under the bar');
  });

  it.each([
    ['note', () => ({ about: { kind: 'pour', id: pourId }, text: 'Seen' })],
    ['answer', () => ({ checkId: 'clean', answer: 'met' })],
    ['recheck', () => ({ about: { kind: 'check', id: 'clean' }, outcome: 'met', note: '' })],
  ] as const)('is all that crew record besides photographs: no %s', async (type, body) => {
    const phone = world().device(crew, pourId);
    const [outcome] = outcomesOf(await push(world(), phone, [phone.entry(type, body())]));
    expect(outcome).toMatchObject({ outcome: 'refused', code: 'not-allowed' });
  });
});

it('who is taken off a pour gets nothing of it any more', async () => {
  const w = world();
  const leaver = await w.addPerson(w.projectId, 'crew', 'leaver.crew');
  await assign(leaver, pourId);
  expect((await pullPour(leaver)).crewList).not.toBeNull();
  await w.owner('assignments').where({ person_id: leaver.id }).delete();
  const gone = await pullPour(leaver);
  expect(gone.found).toBe(false);
  expect(gone.crewList ?? null).toBeNull();
});
