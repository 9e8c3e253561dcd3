import 'fake-indexeddb/auto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { v7 as uuid } from 'uuid';
import { describe, expect, it } from 'vitest';
import { projectBodies, siteBodies } from '@/lib/inspection/entry-bodies';
import type { Role } from '@/lib/inspection/roles';
import type { PushOutcome } from '@/lib/inspection/wire';
import { planPour, pointsOf, registerGauge } from '@/tests/integration/record-routes';
import { openWorld, type TestDevice } from '@/tests/integration/world';
import { lineOf } from './world/real-routes';
import { at, note, opened, pourId, reading, site } from './world/site';
import { until } from './world/phone';

const world = openWorld();

interface Kept {
  role: Role;
  type: string;
  stream?: 'project';
  name?: string;
  body: Record<string, unknown>;
}
const { entries } = JSON.parse(
  readFileSync(path.join(import.meta.dirname, 'fixtures/entries-of-version-1.json'), 'utf8'),
) as { entries: Kept[] };

describe('a phone that was offline through a new version', () => {
  it('has an entry of each type among those kept here', () => {
    // What rests on an online decision cannot be queued before it: there is nothing to refer to.
    const online = ['measurement', 'condition-verified'];
    const types = [...Object.keys(siteBodies), ...Object.keys(projectBodies)];
    expect(
      types.filter((type) => !online.includes(type) && !entries.some((one) => one.type === type)),
    ).toEqual([]);
  });

  it('brings entries as version 1 wrote them, and each is kept', async () => {
    const w = world();
    await registerGauge(w);
    const planned = await planPour(w, 'V-1');
    const [point = ''] = await pointsOf(w, planned);
    const names = new Map<string, string>();
    const devices = new Map<string, TestDevice>();
    const outcomes: string[] = [];
    for (const { role, type, stream, name, body } of entries) {
      const key = `${role} ${stream ?? 'pour'}`;
      const device = devices.get(key) ?? w.device(w.team[role], stream ? null : planned);
      devices.set(key, device);
      const text = JSON.stringify(body)
        .replaceAll('{{pour}}', planned)
        .replaceAll('{{point}}', point)
        .replaceAll('{{gauge}}', w.gaugeId)
        .replaceAll('{{new}}', () => uuid())
        .replaceAll(/\{\{id:([\w-]+)\}\}/g, (_all, other: string) => names.get(other) ?? 'unknown');
      // As version 1 made its envelopes, field by field.
      const made = device.entry(type, JSON.parse(text) as Record<string, unknown>);
      const { id, projectId, v, planRevision, authorId, deviceId, deviceSeq } = made;
      const envelope = {
        ...{ id, projectId, pourId: made.pourId, type, v, body: made.body, planRevision, authorId, deviceId },
        ...{ deviceSeq, recordedAt: made.recordedAt, clockOffsetMs: null, seenSeq: 0 },
      };
      expect(envelope.v).toBe(1);
      if (name) names.set(name, id);
      const answer = await lineOf(w.team[role])('/api/sync/push', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(device.batch([envelope])),
      });
      const [outcome] = ((await answer.json()) as { outcomes: PushOutcome[] }).outcomes;
      outcomes.push(`${type}: ${outcome?.outcome === 'refused' ? outcome.sentence : outcome?.outcome}`);
    }
    expect(outcomes).toEqual(entries.map(({ type }) => `${type}: kept`));
  });

  it('is told of what is newer than the server, which stays on the phone with the reason (negative control)', async () => {
    const w = world();
    const planned = await planPour(w, 'V-2');
    const device = w.device(w.team.inspector, planned);
    const newer = [
      device.entry('note', { about: { kind: 'pour', id: planned }, text: 'x' }, { v: 2 }),
      device.entry('laser-scan', { cloud: 'x' }),
    ];
    const answer = await lineOf(w.team.inspector)('/api/sync/push', {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(device.batch(newer)),
    });
    const { outcomes } = (await answer.json()) as { outcomes: PushOutcome[] };
    expect(outcomes.map((one) => one.outcome === 'refused' && one.code)).toEqual(['too-new', 'too-new']);
  });
});

describe('an old tab', () => {
  it('goes on beside a server that is newer: it saves, sends, and holds the pour over what it cannot read', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    await opened(tab);
    // The newer server answers more than this version knows of, and holds entries of a kind that it never heard of.
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      const body = (await answer.json()) as object;
      return Response.json({ ...body, hints: ['new'], serverVersion: 9 }, { status: answer.status });
    };
    const other = server.writes(pourId, 'note', { about: { kind: 'pour', id: pourId }, text: 'x' });
    Object.assign(other, { type: 'laser-scan', v: 3, body: { cloud: 'x' } });
    const entry = await tab.record(at, 'reading', reading('A1', 52));
    await tab.syncNow();
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 0, phase: 'idle' });
    expect(server.entries.some((one) => one.id === entry.id)).toBe(true);
    expect(tab.pour(pourId)?.sheet?.unknown.map((one) => one.id)).toEqual([other.id]);
    expect(tab.pour(pourId)?.holds.map((hold) => hold.kind)).toContain('update-needed');
    await tab.record(at, 'note', note('still saves'));
    await phone.kill();
  });

  it('goes on when a newer version has changed the shape of the store under it', async () => {
    const { phone, server } = site();
    const tab = await phone.tab();
    await opened(tab);
    const before = await tab.record(at, 'reading', reading('A1', 52));
    const name = (await indexedDB.databases()).find(
      (one) =>
        one.name?.endsWith(`cagewright-${tab.snapshot().person?.id}`) && one.name.startsWith(phone.name),
    );
    if (!name?.name || !name.version) throw new Error('no store');
    // A tab of the newer version opens the store with one more drawer in it.
    const newer = await new Promise<IDBDatabase>((open, fail) => {
      const request = indexedDB.open(name.name ?? '', (name.version ?? 0) + 1);
      request.onupgradeneeded = () => void request.result.createObjectStore('of the newer version');
      request.onsuccess = () => open(request.result);
      request.onerror = () => fail(request.error);
      request.onblocked = () => fail(new Error('the old tab does not let go of the store'));
    });
    const after = await tab.record(at, 'reading', reading('A2', 53));
    await tab.syncNow();
    await until(() => tab.snapshot().sync.waitingEntries === 0, 'all is sent');
    expect(server.entries.map((one) => one.id)).toEqual(expect.arrayContaining([before.id, after.id]));
    newer.close();
    await phone.kill();
  });
});
