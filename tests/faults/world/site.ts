import type { BodyOf } from '@/lib/inspection/entry';
import { gauge, people, pourId, projectId, smallPlan, uuid } from '@/tests/stories/pour-story';
import { ModelServer, type ModelFlaws, type ModelPerson } from './model-server';
import type { RunningDevice } from '@/lib/device/create-device';
import { Clock, Phone, until, type Line } from './phone';

export { pourId, projectId };
export const inspector: ModelPerson = { id: people.inspector, name: 'Ada', role: 'inspector' };
export const superintendent: ModelPerson = { id: people.superintendent, name: 'Ben', role: 'superintendent' };
export const at = { projectId, pourId };

/** A site: one project with one pour, a server, and a phone of the inspector's. */
export interface Site {
  clock: Clock;
  server: ModelServer;
  phone: Phone;
  /** Requests as they were made, newest last. */
  requests: string[];
  /** A straight line to the server for another phone. */
  straight: Line;
}

export function site(flaws: ModelFlaws = {}): Site {
  const clock = new Clock();
  const server = new ModelServer({
    projectId,
    pours: [{ id: pourId, number: 'P-14', plan: smallPlan() }],
    people: [inspector, superintendent],
    clockMs: clock.now,
    flaws,
  });
  server.writes(null, 'instrument-status', {
    instrumentId: gauge,
    name: 'DG-2',
    kind: 'depth-gauge',
    serial: 'Q-118',
    calibrationDue: null,
    uncertaintyMm: 1,
    inService: true,
  });
  const requests: string[] = [];
  const straight: Line = (address, init) => {
    requests.push(`${init.method} ${address}`);
    return server.handle(address, init);
  };
  return { clock, server, requests, straight, phone: new Phone(clock, straight) };
}

/** A second pour of the same project. */
export const otherPourId = uuid(2, 2);

export const note = (text: string): BodyOf<'note'> => ({ about: { kind: 'pour', id: pourId }, text });

export const reading = (label: string, mm: number): BodyOf<'reading'> => ({
  faceId: 'soffit',
  requirementId: 'outer',
  steel: 'outermost bar B1',
  pointId: `soffit.${label}`,
  spot: null,
  value: { text: String(mm), unit: 'mm', mm },
  goNoGo: null,
  instrumentId: gauge,
  phase: 'before',
  measuredAt: '2026-12-01T07:00:00.000Z',
  asFoundBar: null,
  measurer: null,
});

/** Opens the pour on a tab, as its screen does, and waits until it has been read from the store. */
export async function opened(tab: RunningDevice): Promise<void> {
  await until(() => tab.pour(pourId) !== undefined, 'the pour is open');
}
