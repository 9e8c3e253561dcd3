import { v7 as uuid } from 'uuid';
import { revisePlan } from '@/lib/server/issue-pour-plan';
import {
  beamLine,
  boatRamp,
  bollardBases,
  pontoonStair,
  pumpPitRoof,
  pumpPitWalls,
  waveWall,
} from './demo-plans';
import { asRead, faceReadings } from './demo-readings';
import {
  answerChecks,
  DAY,
  HOUR,
  instruments,
  MINUTE,
  morning,
  planned,
  walkAndSign,
  type Scene,
} from './demo-scene';

/** P-012: released, and void by rain the same evening. */
export async function seedBollardBases(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 20 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-012',
    title: 'Bollard bases 1 to 3',
    location: 'Quay edge, grid A',
    plannedAt: morning(now, 1),
    issuedAt: start - DAY,
    input: bollardBases(),
  });
  const readings = (faceId: string, meanMm: number, seed: number, at: number) =>
    faceReadings({ plan, faceId, instrumentId: instruments.gauge1, meanMm, spreadMm: 3.5, seed, at });
  await record.say(people.inspector, pourId, [
    ...readings('base-top', 51, 11, start),
    ...readings('base-ground', 79, 12, start + HOUR),
  ]);
  await answerChecks(scene, pourId, plan, start + 2 * HOUR, { photos: true });
  await walkAndSign(scene, pourId, start + 4 * HOUR);
  await record.release(people.superintendent, pourId, start + 5 * HOUR);
  await record.sayOne(
    people.superintendent,
    pourId,
    'site-event',
    {
      kind: 'rain',
      at: new Date(start + 9 * HOUR).toISOString(),
      amountMm: 11,
      text: 'Shower over the river, 40 minutes',
      elementIds: null,
    },
    start + 9 * HOUR,
  );
}

/** P-013: placed yesterday, one reading accepted by the engineer, and read again with the cover meter today. */
export async function seedPontoonStair(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 40 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-013',
    title: 'Pontoon stair',
    location: 'Grid D, 1',
    plannedAt: new Date(start + 16 * HOUR).toISOString(),
    issuedAt: start - 3 * DAY,
    input: pontoonStair(),
  });
  const before = faceReadings({
    plan,
    faceId: 'stair-soffit',
    instrumentId: instruments.gauge1,
    meanMm: 45,
    spreadMm: 4,
    fixed: { A3: 33 },
    seed: 21,
    at: start,
  });
  const ids = await record.say(people.inspector, pourId, before);
  const low = before.findIndex((reading) => reading.body.value?.mm === 33);
  const pointId = before[low]?.body.pointId ?? '';
  const nonconformanceId = await record.sayOne(
    people.inspector,
    pourId,
    'nonconformance',
    {
      title: 'Low cover at the third flight bar',
      about: [{ kind: 'point', id: pointId }],
      where: { elementId: 'stair', faceId: 'stair-soffit', text: 'Pontoon stair, soffit, A3' },
      extent: 'One bar over 700 mm',
      description: 'The spacer sank into a soft spot of the form lining.',
      proposal: 'Leave the bar and seal the soffit',
      neededBy: new Date(start + 6 * HOUR).toISOString(),
    },
    start + HOUR,
  );
  await record.photo(
    people.inspector,
    pourId,
    { kind: 'nonconformance', id: nonconformanceId },
    { card: 'A3 wide', tapeMm: 33, seed: 61, shot: 'wide', caption: 'Third flight bar from below' },
    start + HOUR + MINUTE,
  );
  await record.photo(
    people.inspector,
    pourId,
    { kind: 'nonconformance', id: nonconformanceId },
    { card: 'A3', tapeMm: 33, seed: 62, shot: 'close', caption: '33 mm at A3' },
    start + HOUR + 3 * MINUTE,
  );
  await record.sayOne(
    people.engineer,
    pourId,
    'disposition',
    {
      nonconformanceId,
      decision: 'use-as-is',
      reason: 'Checked for durability and fire with 33 mm over the length named; strength is not touched.',
      accepts: [ids[low] ?? ''],
      extent: 'One bar at A3, 700 mm',
      licence: people.engineer.licence,
      conditions: [
        {
          id: uuid(),
          text: 'Seal the soffit of the third flight',
          criterion: 'Two coats, record of thickness',
          stage: 'after-pour',
          dueAt: new Date(now + 20 * DAY).toISOString(),
        },
      ],
    },
    start + 3 * HOUR,
  );
  await answerChecks(scene, pourId, plan, start + 4 * HOUR);
  await walkAndSign(scene, pourId, start + 6 * HOUR);
  await record.release(people.superintendent, pourId, start + 7 * HOUR);
  const placed = start + 16 * HOUR;
  await record.sayOne(
    people.superintendent,
    pourId,
    'placement',
    { event: 'started', at: new Date(placed).toISOString(), elementIds: null },
    placed,
  );
  await record.sayOne(
    people.superintendent,
    pourId,
    'placement',
    { event: 'finished', at: new Date(placed + 2 * HOUR).toISOString(), elementIds: null },
    placed + 2 * HOUR,
  );
  const after = faceReadings({
    plan,
    faceId: 'stair-soffit',
    instrumentId: instruments.meter,
    meanMm: 42,
    spreadMm: 4.5,
    fixed: { A3: 31 },
    phase: 'after',
    seed: 22,
    at: now - 3 * HOUR,
  });
  await record.say(people.inspector, pourId, after);
}

/** P-015: walls, all read, released for tomorrow morning. */
export async function seedPumpPitWalls(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 9 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-015',
    title: 'Pump pit, north wall',
    location: 'Pump pit',
    plannedAt: morning(now, 1),
    issuedAt: start - 2 * DAY,
    input: pumpPitWalls(),
  });
  const readings = (faceId: string, seed: number, at: number) =>
    faceReadings({ plan, faceId, instrumentId: instruments.gauge1, meanMm: 46, spreadMm: 3.5, seed, at });
  await record.say(people.secondInspector, pourId, [
    ...readings('outer', 31, start),
    ...readings('inner', 32, start + HOUR),
  ]);
  await answerChecks(scene, pourId, plan, start + 2 * HOUR);
  await walkAndSign(scene, pourId, start + 5 * HOUR);
  await record.release(people.superintendent, pourId, start + 6 * HOUR);
}

/** P-016: a beam line in inches; the engineer is asked about a lap. */
export async function seedBeamLine(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 5 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-016',
    title: 'Beam line C',
    location: 'Piles C1 to C4',
    plannedAt: morning(now, 2),
    issuedAt: start - DAY,
    input: beamLine(),
  });
  const readings = (faceId: string, seed: number, at: number) =>
    faceReadings({ plan, faceId, instrumentId: instruments.tape, meanMm: 42, spreadMm: 3, seed, at });
  await record.say(people.secondInspector, pourId, [
    ...readings('bottom', 51, start),
    ...readings('side', 52, start + 30 * MINUTE),
  ]);
  const measured = (itemId: string, place: string, mm: number, at: number) => ({
    type: 'measurement' as const,
    at,
    body: {
      itemId,
      place,
      stage: 'single' as const,
      value: { quantity: 'length' as const, length: asRead(mm, 'in') },
      measuredAt: new Date(at).toISOString(),
    },
  });
  await record.say(people.secondInspector, pourId, [
    measured('lap-bottom', 'pile C2', 45.125 * 25.4, start + HOUR),
    measured('lap-bottom', 'pile C3', 47.5 * 25.4, start + HOUR + 4 * MINUTE),
    measured('tie-spacing', 'span C1 to C2', 47.25 * 25.4, start + HOUR + 8 * MINUTE),
  ]);
  const nonconformanceId = await record.sayOne(
    people.secondInspector,
    pourId,
    'nonconformance',
    {
      title: 'Lap of two bottom bars short at pile C2',
      about: [{ kind: 'measurement', id: 'lap-bottom' }],
      where: { elementId: 'beam-c', faceId: 'bottom', text: 'Beam line C, bottom bars at pile C2' },
      extent: 'Two of five bars, 45 1/8 in where 47 in are asked for',
      description: '',
      proposal: 'A bar of full lap length beside each',
      neededBy: new Date(now + 6 * HOUR).toISOString(),
    },
    start + 2 * HOUR,
  );
  await record.photo(
    people.secondInspector,
    pourId,
    { kind: 'nonconformance', id: nonconformanceId },
    { card: 'C2 laps', tapeMm: 45, seed: 71, shot: 'wide', caption: 'Bottom bars at pile C2' },
    start + 2 * HOUR + MINUTE,
  );
  await record.photo(
    people.secondInspector,
    pourId,
    { kind: 'nonconformance', id: nonconformanceId },
    { card: 'C2', tapeMm: 45, seed: 72, shot: 'close', caption: 'Tape along the lap' },
    start + 2 * HOUR + 3 * MINUTE,
  );
  await answerChecks(scene, pourId, plan, start + 3 * HOUR, {
    notMet: { 'lap-lengths': 'Two laps at pile C2 are short.' },
    skip: ['trades-done', 'weather'],
  });
}

/** P-018: read and signed, and then the plan was revised. */
export async function seedWaveWall(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 14 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-018',
    title: 'Wave wall, unit 2',
    location: 'Chainage 12 to 24',
    plannedAt: morning(now, 6),
    issuedAt: start - DAY,
    input: waveWall(50),
  });
  await record.say(
    people.inspector,
    pourId,
    faceReadings({
      plan,
      faceId: 'river',
      instrumentId: instruments.gauge1,
      meanMm: 52,
      spreadMm: 4,
      seed: 81,
      at: start,
    }),
  );
  await answerChecks(scene, pourId, plan, start + HOUR);
  await walkAndSign(scene, pourId, start + 3 * HOUR);
  const revision = await revisePlan(
    record.tx,
    people.engineer,
    { id: pourId, projectId: record.projectId },
    { plan: waveWall(55), reason: 'Cover to the river side raised to 55 after the splash survey' },
    new Date(start + 6 * HOUR).toISOString(),
  );
  record.planIssued(pourId, revision);
}

/** P-017 and P-019: planned, and nothing read yet. */
export async function seedUnread(scene: Scene): Promise<void> {
  const { now } = scene;
  const issuedAt = now - 8 * HOUR;
  await planned(scene, {
    number: 'P-017',
    title: 'Boat ramp, upper',
    location: 'Chainage 0 to 9',
    plannedAt: morning(now, 4),
    issuedAt,
    input: boatRamp(),
  });
  await planned(scene, {
    number: 'P-019',
    title: 'Pump pit roof slab',
    location: 'Pump pit',
    plannedAt: morning(now, 3),
    issuedAt,
    input: pumpPitRoof(),
  });
}
