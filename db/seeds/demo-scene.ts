import type { BodyOf } from '@/lib/inspection/entry';
import type { Plan } from '@/lib/inspection/plan';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { currentPlans } from '@/db/stores/pour-store';
import { createPour } from '@/lib/server/issue-pour-plan';
import { demoPeople, demoPerson } from './demo-people';
import type { DemoRecord } from './demo-record';

export const MINUTE = 60_000;
export const HOUR = 60 * MINUTE;
export const DAY = 24 * HOUR;

/** Instruments of the project: two depth gauges, a tape, a cover meter. */
export const instruments = {
  gauge1: '0193c000-0000-7000-8000-000000000001',
  gauge2: '0193c000-0000-7000-8000-000000000002',
  tape: '0193c000-0000-7000-8000-000000000003',
  meter: '0193c000-0000-7000-8000-000000000004',
} as const;

/** The people by what they do, and the record that they write to. */
export interface Scene {
  record: DemoRecord;
  now: number;
  people: {
    inspector: (typeof demoPeople)[number];
    secondInspector: (typeof demoPeople)[number];
    superintendent: (typeof demoPeople)[number];
    engineer: (typeof demoPeople)[number];
    crew: (typeof demoPeople)[number];
    coordinator: (typeof demoPeople)[number];
  };
}

export function sceneOf(record: DemoRecord, now: number): Scene {
  const find = (role: Parameters<typeof demoPerson>[0]) => demoPerson(role) as (typeof demoPeople)[number];
  return {
    record,
    now,
    people: {
      inspector: find('inspector'),
      secondInspector: demoPeople[1],
      superintendent: find('superintendent'),
      engineer: find('engineer'),
      crew: find('crew'),
      coordinator: find('coordinator'),
    },
  };
}

/** Half past six in the morning, so many days from now, by the clock of a site four hours west of UTC. */
export function morning(now: number, days: number): string {
  const day = new Date(now + days * DAY);
  return new Date(Date.UTC(day.getUTCFullYear(), day.getUTCMonth(), day.getUTCDate(), 10, 30)).toISOString();
}

/** Plans a pour and gives back its id and issued plan. */
export async function planned(
  scene: Scene,
  pour: {
    number: string;
    title: string;
    location: string;
    plannedAt: string;
    issuedAt: number;
    input: PlanInput;
  },
): Promise<{ pourId: string; plan: Plan }> {
  const { tx, projectId } = scene.record;
  const { number, title, location, plannedAt, input } = pour;
  const pourId = await createPour(
    tx,
    scene.people.engineer,
    { projectId, number, title, location, plannedAt, reason: 'First issue', plan: input },
    new Date(pour.issuedAt).toISOString(),
  );
  const plan = (await currentPlans(tx, projectId, [pourId])).get(pourId);
  if (!plan) throw new Error(`No plan of ${number}.`);
  scene.record.planIssued(pourId, plan.revision);
  const assigned = [
    scene.people.inspector,
    scene.people.secondInspector,
    scene.people.superintendent,
    scene.people.engineer,
    scene.people.crew,
  ];
  await tx('assignments').insert(
    assigned.map((person) => ({ project_id: projectId, pour_id: pourId, person_id: person.id })),
  );
  return { pourId, plan };
}

/** Answers every check of a plan, all met but those named; those that need one get a photograph. */
export async function answerChecks(
  scene: Scene,
  pourId: string,
  plan: Plan,
  at: number,
  over: { notMet?: Record<string, string>; skip?: string[]; photos?: boolean } = {},
): Promise<void> {
  const items = plan.checklist.items.filter((item) => !over.skip?.includes(item.id));
  const answer = (item: (typeof items)[number]): BodyOf<'answer'> => {
    const note = over.notMet?.[item.id];
    if (note) return { checkId: item.id, answer: 'not-met', note };
    if (item.id === 'bar-coating' || item.id === 'couplers' || item.id === 'waterstop') {
      return { checkId: item.id, answer: 'not-applicable', reason: 'None in this pour' };
    }
    return { checkId: item.id, answer: 'met' };
  };
  await scene.record.say(
    scene.people.inspector,
    pourId,
    items.map((item, index) => ({ type: 'answer' as const, body: answer(item), at: at + index * MINUTE })),
  );
  if (over.photos === false) return;
  for (const [index, item] of items.filter((one) => one.evidence === 'photo').entries()) {
    await scene.record.photo(
      scene.people.inspector,
      pourId,
      { kind: 'check', id: item.id },
      {
        card: `${plan.elements[0]?.drawing.number ?? ''} ${index + 1}`,
        tapeMm: 48,
        seed: 40 + index,
        shot: 'wide',
        caption: item.question.slice(0, 120),
      },
      at + (items.length + index) * MINUTE,
    );
  }
}

/** The last walk and both signatures. */
export async function walkAndSign(scene: Scene, pourId: string, at: number): Promise<void> {
  await scene.record.sayOne(
    scene.people.inspector,
    pourId,
    'last-walk',
    { outcome: 'met', places: 'Runways, edges and openings; nothing moved', elementIds: null },
    at,
  );
  await scene.record.sign(scene.people.inspector, pourId, 'inspector', at + 10 * MINUTE);
  await scene.record.sign(scene.people.superintendent, pourId, 'superintendent', at + 20 * MINUTE);
}
