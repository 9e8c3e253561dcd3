import knexFactory, { type Knex } from 'knex';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll } from 'vitest';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { roles, type Role } from '@/lib/inspection/roles';
import { testSecrets } from '../../scripts/setup/test-cluster.mjs';
import { createTestDatabase, type TestDatabase } from './test-database';

export { deckPlan, deckPour } from '@/tests/stories/deck-pour';

export const PASSWORD = 'a long enough password';
export const APP_ORIGIN = 'http://localhost:3000';

export interface TestPerson {
  id: string;
  email: string;
  sessionId: string;
  cookie: string;
}

export type Team = Record<Role, TestPerson>;

export interface Answer {
  status: number;
  // Tests look into answers of every route; what is in them is asserted there.
  body: Record<string, unknown> & { code?: string };
}

type Handler = (
  request: Request,
  context: { params: Promise<Record<string, string | string[]>> },
) => Promise<Response>;

export interface CallOptions {
  as?: Pick<TestPerson, 'cookie'> | null;
  params?: Record<string, string>;
  query?: string;
  body?: unknown;
  headers?: Record<string, string>;
  method?: string;
}

/**
 * A database of the file's own with two projects, each with one person per role, and ways to call route handlers as
 * one of them. Modules of the application are loaded only once the environment names this database.
 */
export class World {
  readonly projectId = uuid();
  readonly otherProjectId = uuid();
  /** The depth gauge that readings are taken with, once `registerGauge` has put it on record. */
  readonly gaugeId = uuid();
  team = {} as Team;
  otherTeam = {} as Team;

  private constructor(
    readonly database: TestDatabase,
    readonly owner: Knex,
  ) {}

  /** @param env where services run that the tests of this file use; the others answer nothing */
  static async open(env: Record<string, string> = {}): Promise<World> {
    const database = await createTestDatabase();
    Object.assign(process.env, {
      APP_URL: APP_ORIGIN,
      DATABASE_URL: database.appUrl,
      NEXTAUTH_SECRET: testSecrets.NEXTAUTH_SECRET,
      S3_ENDPOINT: 'http://127.0.0.1:9',
      S3_REGION: 'local',
      S3_BUCKET: 'photos',
      S3_ACCESS_KEY: testSecrets.S3_ACCESS_KEY,
      S3_SECRET_KEY: testSecrets.S3_SECRET_KEY,
      SMTP_URL: 'smtp://127.0.0.1:9',
      MAIL_FROM: 'Cagewright <mail@example.test>',
      LOG_LEVEL: process.env.LOG_LEVEL ?? 'fatal',
      ...env,
    });
    const owner = knexFactory({ client: 'pg', connection: database.ownerUrl, pool: { min: 0, max: 4 } });
    const world = new World(database, owner);
    for (const id of [world.projectId, world.otherProjectId]) {
      await owner('projects').insert({ id, name: `Landing ${id.slice(-4)}`, time_zone: 'Europe/Lisbon' });
      await owner('project_counters').insert({ project_id: id });
    }
    world.team = await world.addTeam(world.projectId, 'own');
    world.otherTeam = await world.addTeam(world.otherProjectId, 'other');
    return world;
  }

  private async addTeam(projectId: string, prefix: string): Promise<Team> {
    const people = await Promise.all(
      roles.map(async (role) => [role, await this.addPerson(projectId, role, `${prefix}.${role}`)] as const),
    );
    return Object.fromEntries(people) as Team;
  }

  async addPerson(projectId: string, role: Role, name: string): Promise<TestPerson> {
    const { hashPassword } = await import('@/lib/server/password');
    const id = uuid();
    const email = `${name}@example.test`;
    await this.owner('users').insert({
      id,
      email,
      name: name.replace('.', ' '),
      password_hash: await hashPassword(PASSWORD),
      licence: role === 'engineer' ? 'PE 10001' : '',
    });
    await this.owner('memberships').insert({ project_id: projectId, person_id: id, role });
    return { id, email, ...(await this.addSession(id)) };
  }

  /** A device of this person, reading with the project's gauge. */
  device(person: TestPerson, pourId: string | null): TestDevice {
    return new TestDevice(person, this.projectId, pourId, this.gaugeId);
  }

  /** A session as sign-in opens it, without the browser. */
  async addSession(personId: string): Promise<{ sessionId: string; cookie: string }> {
    const { sessionCookies, sessionToken } = await import('@/lib/server/session');
    const sessionId = uuid();
    await this.owner('sessions').insert({
      id: sessionId,
      person_id: personId,
      expires_at: new Date(Date.now() + 3_600_000).toISOString(),
    });
    const token = await sessionToken({ personId, sessionId });
    return { sessionId, cookie: `${sessionCookies().sessionToken.name}=${token}` };
  }

  /** Calls a route handler as Next.js would, without a server. */
  async call(
    handler: Handler,
    { as, params, query, body, headers, method }: CallOptions = {},
  ): Promise<Answer> {
    const request = new Request(`${APP_ORIGIN}/api/test${query ?? ''}`, {
      method: method ?? (body === undefined ? 'GET' : 'POST'),
      headers: {
        origin: APP_ORIGIN,
        'content-type': 'application/json',
        ...(as ? { cookie: as.cookie } : {}),
        ...headers,
      },
      ...(body === undefined
        ? {}
        : { body: body instanceof Uint8Array ? new Uint8Array(body) : JSON.stringify(body) }),
    });
    const response = await handler(request, { params: Promise.resolve(params ?? {}) });
    return { status: response.status, body: (await response.json()) as Answer['body'] };
  }

  async close(): Promise<void> {
    const { closeDatabase } = await import('@/db/connection');
    await closeDatabase();
    await this.owner.destroy();
    await this.database.drop();
  }
}

/**
 * Opens a world before the tests of a file and drops it afterwards.
 * @param start starts the services that the file uses; they are stopped afterwards
 */
export function openWorld(
  start?: () => Promise<{ env: Record<string, string>; stop(): Promise<void> }>,
): () => World {
  let world: World | undefined;
  let services: Awaited<ReturnType<NonNullable<typeof start>>> | undefined;
  beforeAll(async () => {
    services = await start?.();
    world = await World.open(services?.env);
  });
  afterAll(async () => {
    await world?.close();
    await services?.stop();
  });
  return () => {
    if (!world) throw new Error('The world is not open yet.');
    return world;
  };
}

/** A device of one person: numbers its entries as the phone does. */
export class TestDevice {
  readonly id = uuid();
  private deviceSeq = 0;

  constructor(
    readonly person: TestPerson,
    readonly projectId: string,
    readonly pourId: string | null,
    private readonly gaugeId: string | null = null,
  ) {}

  entry(type: string, body: Record<string, unknown>, more: Partial<EntryEnvelope> = {}): EntryEnvelope {
    this.deviceSeq += 1;
    return {
      id: uuid(),
      projectId: this.projectId,
      pourId: this.pourId,
      type,
      v: 1,
      body: body as EntryEnvelope['body'],
      planRevision: 1,
      authorId: this.person.id,
      deviceId: this.id,
      deviceSeq: this.deviceSeq,
      recordedAt: new Date().toISOString(),
      clockOffsetMs: 0,
      seenSeq: 0,
      ...more,
    };
  }

  /** A reading at a point of the face `deck-top`, in whole millimetres. */
  reading(
    point: string,
    mm: number,
    more: Partial<EntryEnvelope> = {},
    body: Record<string, unknown> = {},
  ): EntryEnvelope {
    return this.entry(
      'reading',
      {
        faceId: 'deck-top',
        requirementId: 'top-bars',
        steel: 'outermost bar T1',
        pointId: point,
        spot: null,
        value: { text: String(mm), unit: 'mm', mm },
        goNoGo: null,
        instrumentId: this.gaugeId,
        phase: 'before',
        measuredAt: new Date().toISOString(),
        asFoundBar: null,
        measurer: null,
        ...body,
      },
      more,
    );
  }

  batch(entries: readonly unknown[]) {
    return {
      protocol: 1,
      projectId: this.projectId,
      deviceId: this.id,
      sentAt: new Date().toISOString(),
      entries,
    };
  }
}
