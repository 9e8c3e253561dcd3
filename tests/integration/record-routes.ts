import type { EntryEnvelope, Receipt } from '@/lib/inspection/entry';
import type { PlanInput } from '@/lib/inspection/plan-input';
import type { PullResponse, PushOutcome } from '@/lib/inspection/wire';
import { deckPour, type Answer, type TestDevice, type TestPerson, type World } from './world';

/** Puts the world's depth gauge on record, in the project's own stream. */
export async function registerGauge(world: World): Promise<void> {
  const office = world.device(world.team.coordinator, null);
  const status = office.entry('instrument-status', {
    instrumentId: world.gaugeId,
    name: 'DG-1',
    kind: 'depth-gauge',
    serial: 'T-1',
    calibrationDue: '2099-01-01T00:00:00.000Z',
    uncertaintyMm: 1,
    inService: true,
  });
  await pushKept(world, office, [status]);
}

/** The routes that most tests use, called as one person. */
export async function planPour(
  world: World,
  number: string,
  as: TestPerson = world.team.engineer,
  more: Partial<PlanInput> = {},
): Promise<string> {
  const { POST } = await import('@/app/api/pours/route');
  const answer = await world.call(POST, { as, body: deckPour(world.projectId, number, more) });
  if (answer.status !== 201) throw new Error(`not planned: ${JSON.stringify(answer.body)}`);
  return String(answer.body.pourId);
}

export async function push(world: World, device: TestDevice, entries: readonly unknown[]): Promise<Answer> {
  const { POST } = await import('@/app/api/sync/push/route');
  return world.call(POST, { as: device.person, body: device.batch(entries) });
}

export const outcomesOf = (answer: Answer): PushOutcome[] => answer.body.outcomes as PushOutcome[];

export function receiptOf(outcome: PushOutcome | undefined): Receipt {
  if (!outcome || outcome.outcome === 'refused') throw new Error(`not kept: ${JSON.stringify(outcome)}`);
  return outcome.receipt;
}

/** Pushes entries that all have to be kept. */
export async function pushKept(
  world: World,
  device: TestDevice,
  entries: readonly EntryEnvelope[],
): Promise<Receipt[]> {
  const answer = await push(world, device, entries);
  if (answer.status !== 200) throw new Error(`not answered: ${JSON.stringify(answer.body)}`);
  return outcomesOf(answer).map(receiptOf);
}

export async function pull(
  world: World,
  as: TestPerson,
  pourId: string,
  from: { after: number; headHash: string | null; planRevision?: number } = { after: 0, headHash: null },
): Promise<PullResponse> {
  const { POST } = await import('@/app/api/sync/pull/route');
  const answer = await world.call(POST, {
    as,
    body: {
      protocol: 1,
      projectId: world.projectId,
      project: { after: 0, headHash: null },
      pours: [{ pourId, planRevision: 0, ...from }],
    },
  });
  if (answer.status !== 200) throw new Error(`not answered: ${JSON.stringify(answer.body)}`);
  return answer.body as unknown as PullResponse;
}

/** The ids of the points that the plan of a pour asks to read. */
export async function pointsOf(world: World, pourId: string): Promise<string[]> {
  const { plan } = (await pull(world, world.team.inspector, pourId)).pours[0]!;
  return plan!.elements.flatMap((element) =>
    element.faces.flatMap((face) => face.points.map((point) => point.id)),
  );
}
