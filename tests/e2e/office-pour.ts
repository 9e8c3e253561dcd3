import { expect, type Browser, type Page } from '@playwright/test';
import type { BodyOf, EntryType } from '@/lib/inspection/entry';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { DEMO_PASSWORD, laptop, signedIn } from './sign-in';

/** The demo's DG-1, which is in order. */
const DEPTH_GAUGE = '0193c000-0000-7000-8000-000000000001';

/** A small slab with one face of five points, accepted from 40 mm, one check and no last walk: quickly inspected. */
const plan: PlanInput = {
  units: 'mm',
  basis: 'contract',
  decisionRule: { kind: 'simple' },
  validityHours: 24,
  rainLimitMm: 5,
  mix: { id: 'mix-1', name: 'Marine 40/20', aggregateMm: 20 },
  elements: [
    {
      id: 'slab',
      type: 'slab',
      mark: 'Waiting room slab',
      location: 'Grid F to G',
      level: '',
      thicknessMm: 250,
      effectiveDepthMm: null,
      drawing: { number: 'S-250', revision: '1' },
      faces: [
        {
          id: 'slab-top',
          name: 'Top',
          meeting: 'finished-top',
          soffit: false,
          exposure: '',
          widthMm: 6000,
          heightMm: 4000,
          openings: [],
          recesses: [],
          requirements: [
            {
              id: 'top-bars',
              steel: 'outermost bar T1',
              barDesignation: '16 mm',
              contractSpecifiedMm: 50,
              contractMinusMm: 10,
              contractPlusMm: null,
              neverLess: false,
            },
          ],
          drawnPoints: 5,
          chosenPoints: [],
        },
      ],
      layers: [],
    },
  ],
  measurements: [],
  checklist: {
    template: 'Slab on ground',
    version: 1,
    items: [
      {
        id: 'bars',
        group: 'steel',
        question: 'Bars are as drawn',
        basis: 'drawings',
        evidence: 'none',
        critical: true,
        notApplicable: false,
        attendance: 'none',
        closedBy: 'inspector',
        elementId: null,
      },
    ],
  },
  lastWalk: false,
};

interface Answer {
  status: number;
  body: Record<string, unknown>;
}

/** Asks a route of the product from the page itself, as the person who is signed in there. */
export function ask(page: Page, method: 'GET' | 'POST', path: string, body?: unknown): Promise<Answer> {
  return page.evaluate(
    async ([how, where, what]) => {
      const response = await fetch(where, {
        method: how,
        headers: { 'content-type': 'application/json', accept: 'application/json' },
        body: what === null ? undefined : what,
      });
      const text = await response.text();
      let read: unknown = null;
      try {
        read = JSON.parse(text);
      } catch {
        // A page, not an answer of the interface.
      }
      return { status: response.status, body: (read ?? {}) as Record<string, unknown> };
    },
    [method, path, body === undefined ? null : JSON.stringify(body)] as const,
  );
}

/** The project that the demo is made of, as the signed-in person's own account names it. */
export async function projectOf(page: Page): Promise<string> {
  const { body } = await ask(page, 'GET', '/api/sync/index');
  const [project] = body.projects as { id: string }[];
  return project!.id;
}

/** Plans a pour by the interface and gives back its id. */
export async function planPour(
  page: Page,
  number: string,
  title: string,
  projectId?: string,
): Promise<string> {
  const { status, body } = await ask(page, 'POST', '/api/pours', {
    projectId: projectId ?? (await projectOf(page)),
    number,
    title,
    location: 'Grid F to G',
    plannedAt: new Date(Date.now() + 6 * 86_400_000).toISOString(),
    reason: 'First issue',
    plan,
  });
  expect(status, JSON.stringify(body)).toBe(201);
  return body.pourId as string;
}

/** Records one entry as the person who is signed in on the page. */
export async function record<T extends EntryType>(
  page: Page,
  pourId: string,
  type: T,
  body: BodyOf<T>,
): Promise<string> {
  const answer = await ask(page, 'POST', `/api/pours/${pourId}/entries`, { type, body });
  expect(answer.status, JSON.stringify(answer.body)).toBe(201);
  return answer.body.id as string;
}

/** Reads every point of the slab and answers its check, all met, and signs as inspector and as superintendent. */
export async function inspectAndSign(browser: Browser, pourId: string): Promise<void> {
  const inspector = await signedIn(browser, 'inspector', laptop, `/pours/${pourId}`);
  const points = await inspector.page
    .locator('tr[id^="point-"]')
    .evaluateAll((rows) => rows.map((row) => row.id.slice('point-'.length)));
  expect(points).toHaveLength(5);
  for (const pointId of points) await record(inspector.page, pourId, 'reading', reading(pointId, 52));
  await record(inspector.page, pourId, 'answer', { checkId: 'bars', answer: 'met' });
  await sign(inspector.page, pourId, 'inspector');
  await inspector.context.close();
  const boss = await signedIn(browser, 'superintendent', laptop, `/pours/${pourId}`);
  await sign(boss.page, pourId, 'superintendent');
  await boss.context.close();
}

/** A reading of the slab at a point, in mm. */
export const reading = (pointId: string, mm: number): BodyOf<'reading'> => ({
  faceId: 'slab-top',
  requirementId: 'top-bars',
  steel: 'outermost bar T1',
  pointId,
  spot: null,
  value: { text: String(mm), unit: 'mm', mm },
  goNoGo: null,
  instrumentId: DEPTH_GAUGE,
  phase: 'before',
  measuredAt: new Date().toISOString(),
  asFoundBar: null,
  measurer: null,
});

async function sign(page: Page, pourId: string, as: 'inspector' | 'superintendent'): Promise<void> {
  const id = await record(page, pourId, 'signature', {
    as,
    elementIds: null,
    words: 'As listed, at the points read and for the items checked.',
    strokes: [[100, 200, 300, 100, 500, 200]],
    sheetDigest: 'a'.repeat(64),
  });
  const answer = await ask(page, 'POST', `/api/signatures/${id}/confirm`, { password: DEMO_PASSWORD });
  expect(answer.status).toBe(201);
}
