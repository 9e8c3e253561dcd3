import { beforeAll, describe, expect, it } from 'vitest';
import type { Knex } from 'knex';
import type { Tx } from '@/db/connection';
import { planPour, pointsOf, pushKept, registerGauge } from './record-routes';
import { openWorld } from './world';

const world = openWorld();
let app: Knex;

beforeAll(async () => {
  const w = world();
  app = (await import('@/db/connection')).database();
  await registerGauge(w);
  const pourId = await planPour(w, 'P-01');
  const phone = w.device(w.team.inspector, pourId);
  await pushKept(
    w,
    phone,
    (await pointsOf(w, pourId)).map((point) => phone.reading(point, 52)),
  );
});

async function asPerson<T>(sessionId: string, work: (tx: Tx) => Promise<T>): Promise<T> {
  const { enterSession } = await import('@/db/stores/session-store');
  return app.transaction(async (tx) => {
    await enterSession(tx, sessionId);
    return work(tx);
  });
}

describe('entries and plans are only ever added', () => {
  const changes = [
    `update entries set body = '{}'`,
    'delete from entries',
    'truncate entries cascade',
    `update plans set document = '{}'`,
    'delete from plans',
    'truncate plans',
  ];
  it.each(changes)('the application may not: %s', async (sql) => {
    const { sessionId } = world().team.engineer;
    await expect(asPerson(sessionId, (tx) => tx.raw(sql))).rejects.toMatchObject({ code: '42501' });
  });

  it.each(changes)('and the owner of the tables is stopped by the trigger: %s', async (sql) => {
    await expect(world().owner.raw(sql)).rejects.toThrow(/append-only/);
  });

  it('the application owns nothing and passes no row-level rule by', async () => {
    const { rows } = await app.raw(
      `select rolsuper, rolbypassrls, rolcreaterole, (select count(*) from pg_class where relowner = r.oid) as owned
       from pg_roles r where rolname = current_user`,
    );
    expect(rows[0]).toMatchObject({ rolsuper: false, rolbypassrls: false, rolcreaterole: false, owned: 0 });
  });

  it('every table with a project in it has the wall', async () => {
    const { rows } = await world().owner.raw<{ rows: { name: string }[] }>(
      `select c.relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace
       where n.nspname = 'public' and c.relkind = 'r' and not (c.relrowsecurity and c.relforcerowsecurity)
         and (c.relname = 'projects' or exists (select from pg_attribute a
           where a.attrelid = c.oid and a.attname = 'project_id'))`,
    );
    expect(rows).toEqual([]);
  });
});

describe('row-level security', () => {
  const tables = [
    'projects',
    'pours',
    'plans',
    'entries',
    'pour_summaries',
    'project_counters',
    'memberships',
  ];

  it.each(tables)('%s: rows of own projects only, and without a session none', async (table) => {
    const { team, otherTeam } = world();
    const count = async (tx: Knex) => Number((await tx(table).count({ n: '*' }))[0]?.n);
    const mine = await asPerson(team.viewer.sessionId, count);
    const others = await asPerson(otherTeam.engineer.sessionId, count);
    const { n } = (await world().owner(table).count({ n: '*' }))[0] ?? {};
    expect(mine).toBeGreaterThan(0);
    expect(mine + others).toBe(Number(n));
    expect(await count(app)).toBe(0);
  });

  it('a row cannot be written into another project, whatever the statement says', async () => {
    const w = world();
    const row = {
      project_id: w.projectId,
      id: w.gaugeId,
      number: 'X',
      title: 'x',
      location: 'x',
      created_by: w.otherTeam.engineer.id,
    };
    await expect(asPerson(w.otherTeam.engineer.sessionId, (tx) => tx('pours').insert(row))).rejects.toThrow(
      /row-level security/,
    );
  });

  it('ends with the transaction that opened it', async () => {
    const one = (await import('@/db/connection')).connect(world().database.appUrl, 1);
    const { enterSession } = await import('@/db/stores/session-store');
    await one.transaction((tx) => enterSession(tx, world().team.engineer.sessionId));
    expect(await one('pours').select('id')).toEqual([]);
    await one.destroy();
  });
});
