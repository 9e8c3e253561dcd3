import { v7 as uuid } from 'uuid';
import { PROTOCOL } from '@/lib/inspection/protocol';
import type { PullResponse } from '@/lib/inspection/wire';
import type { PlanInput } from '@/lib/inspection/plan-input';
import type { Role } from '@/lib/inspection/roles';
import type { Product } from './product';

export const PASSWORD = 'a long enough password';

export interface Person {
  id: string;
  role: Role;
  cookie: { name: string; value: string };
}

export interface BenchPour {
  id: string;
  number: string;
  /** Every point that its plan asks to read, with its face. */
  points: { faceId: string; pointId: string }[];
}

/** A project with its people, a gauge and pours that are planned and assigned to the inspector. */
export interface Site {
  projectId: string;
  gaugeId: string;
  people: Record<'inspector' | 'superintendent' | 'engineer' | 'coordinator', Person>;
  pours: BenchPour[];
}

let passwordHash: Promise<string> | null = null;

/** A project with four people whose sessions are open; nothing is planned yet. */
export async function emptySite({ database }: Pick<Product, 'database'>): Promise<Site> {
  const projectId = uuid();
  const name = `Landing ${projectId.slice(-6)}`;
  await database.query(`insert into projects (id, name, time_zone) values ($1, $2, 'Europe/Lisbon')`, [
    projectId,
    name,
  ]);
  await database.query('insert into project_counters (project_id) values ($1)', [projectId]);
  const person = (role: Role) => addPerson(database, projectId, role);
  return {
    projectId,
    gaugeId: uuid(),
    people: {
      inspector: await person('inspector'),
      superintendent: await person('superintendent'),
      engineer: await person('engineer'),
      coordinator: await person('coordinator'),
    },
    pours: [],
  };
}

/** A site with pours of so many points each, planned by the product itself. */
export async function plannedSite(
  product: Product,
  of: { pours: number; faces: number; pointsOfFace: number },
): Promise<Site> {
  const site = await emptySite(product);
  await registerGauge(product, site);
  for (let index = 0; index < of.pours; index += 1)
    site.pours.push(await planPour(product, site, `P-${String(index + 1).padStart(3, '0')}`, of));
  return site;
}

async function addPerson(database: Product['database'], projectId: string, role: Role): Promise<Person> {
  const { hashPassword } = await import('@/lib/server/password');
  const { sessionCookies, sessionToken } = await import('@/lib/server/session');
  passwordHash ??= hashPassword(PASSWORD);
  const [id, sessionId] = [uuid(), uuid()];
  await database.query(
    'insert into users (id, email, name, password_hash, licence) values ($1, $2, $3, $4, $5)',
    [id, `${id}@example.test`, `A ${role}`, await passwordHash, role === 'engineer' ? 'PE 10001' : ''],
  );
  await database.query('insert into memberships (project_id, person_id, role) values ($1, $2, $3)', [
    projectId,
    id,
    role,
  ]);
  await database.query(
    `insert into sessions (id, person_id, expires_at) values ($1, $2, now() + interval '1 day')`,
    [sessionId, id],
  );
  const value = await sessionToken({ personId: id, sessionId });
  return { id, role, cookie: { name: sessionCookies().sessionToken.name, value } };
}

/** A request of this person's to the product, as their browser makes it. */
export function ask(
  { app }: Pick<Product, 'app'>,
  { cookie }: Person,
  path: string,
  body?: BodyInit,
): Promise<Response> {
  return fetch(`${app}${path}`, {
    method: body === undefined ? 'GET' : 'POST',
    headers: {
      origin: app,
      cookie: `${cookie.name}=${cookie.value}`,
      ...(body === undefined ? {} : { 'content-type': 'application/json' }),
    },
    ...(body === undefined ? {} : { body }),
  });
}

/** @throws Error with what the product answered, when it did not do it */
export async function askJson<T>(
  product: Pick<Product, 'app'>,
  person: Person,
  path: string,
  body: unknown,
): Promise<T> {
  const answer = await ask(product, person, path, JSON.stringify(body));
  const text = await answer.text();
  if (!answer.ok) throw new Error(`${path} answered ${answer.status}: ${text.slice(0, 300)}`);
  return JSON.parse(text) as T;
}

async function registerGauge(product: Product, site: Site): Promise<void> {
  const { coordinator } = site.people;
  const deviceId = uuid();
  const recordedAt = new Date().toISOString();
  await askJson(product, coordinator, '/api/sync/push', {
    protocol: PROTOCOL,
    projectId: site.projectId,
    deviceId,
    sentAt: recordedAt,
    entries: [
      {
        id: uuid(),
        projectId: site.projectId,
        pourId: null,
        type: 'instrument-status',
        v: 1,
        body: {
          instrumentId: site.gaugeId,
          name: 'DG-1',
          kind: 'depth-gauge',
          serial: 'T-1',
          calibrationDue: '2099-01-01T00:00:00.000Z',
          uncertaintyMm: 1,
          inService: true,
        },
        planRevision: 0,
        authorId: coordinator.id,
        deviceId,
        deviceSeq: 1,
        recordedAt,
        clockOffsetMs: 0,
        seenSeq: 0,
      },
    ],
  });
}

async function planPour(
  product: Product,
  site: Site,
  number: string,
  of: { faces: number; pointsOfFace: number },
): Promise<BenchPour> {
  const { engineer, inspector } = site.people;
  const { pourId } = await askJson<{ pourId: string }>(product, engineer, '/api/pours', {
    projectId: site.projectId,
    number,
    title: 'Quay deck',
    location: 'Grid C to D',
    plannedAt: new Date(Date.now() + 86_400_000).toISOString(),
    reason: 'First issue',
    plan: deckPlan(of),
  });
  await product.database.query(
    'insert into assignments (project_id, pour_id, person_id) values ($1, $2, $3)',
    [site.projectId, pourId, inspector.id],
  );
  const pulled = await askJson<PullResponse>(product, inspector, '/api/sync/pull', {
    protocol: PROTOCOL,
    projectId: site.projectId,
    project: { after: 0, headHash: null },
    pours: [{ pourId, after: 0, headHash: null, planRevision: 0 }],
  });
  const faces = pulled.pours[0]?.plan?.elements.flatMap((element) => element.faces) ?? [];
  const points = faces.flatMap((face) =>
    face.points.map((point) => ({ faceId: face.id, pointId: point.id })),
  );
  return { id: pourId, number, points };
}

/** A deck of so many faces with so many drawn points each, 50 mm specified and 40 mm the least accepted; one check. */
export function deckPlan(of: { faces: number; pointsOfFace: number }): PlanInput {
  return {
    units: 'mm',
    basis: 'contract',
    decisionRule: { kind: 'simple' },
    validityHours: 24,
    rainLimitMm: 5,
    mix: { id: 'mix-1', name: 'C35 marine', aggregateMm: 20 },
    elements: [
      {
        id: 'deck',
        type: 'deck',
        mark: 'Quay deck D2',
        location: 'Grid C to D',
        level: '',
        thicknessMm: 350,
        effectiveDepthMm: null,
        drawing: { number: 'FL-S-201', revision: 'B' },
        faces: Array.from({ length: of.faces }, (_, index) => ({
          id: `face-${index + 1}`,
          name: `Bay ${index + 1}, top`,
          meeting: 'finished-top' as const,
          soffit: false,
          exposure: 'tidal',
          widthMm: 24_000,
          heightMm: 12_000,
          openings: [],
          recesses: [],
          requirements: [
            {
              id: `face-${index + 1}-bars`,
              steel: 'outermost bar T1',
              barDesignation: '16 mm',
              contractSpecifiedMm: 50,
              contractMinusMm: 10,
              contractPlusMm: null,
              neverLess: false,
            },
          ],
          drawnPoints: of.pointsOfFace,
          chosenPoints: [],
        })),
        layers: [],
      },
    ],
    measurements: [],
    checklist: {
      template: 'Bridge or quay deck',
      version: 1,
      items: [
        {
          id: 'bars',
          group: 'steel',
          question: 'Bars as drawn?',
          basis: 'drawings',
          evidence: 'none',
          critical: true,
          notApplicable: true,
          attendance: 'none',
          closedBy: 'inspector',
          elementId: null,
        },
      ],
    },
    lastWalk: false,
  };
}
