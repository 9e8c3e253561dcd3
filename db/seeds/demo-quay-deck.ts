import { quayDeck } from './demo-plans';
import { asRead, faceReadings } from './demo-readings';
import { answerChecks, DAY, HOUR, instruments, MINUTE, morning, planned, type Scene } from './demo-scene';

/** P-014: the quay deck, held by most of what can hold a pour. */
export async function seedQuayDeck(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const start = now - 6 * HOUR;
  const { pourId, plan } = await planned(scene, {
    number: 'P-014',
    title: 'Quay deck, bay 3',
    location: 'Grid C to D, 3 to 5',
    plannedAt: morning(now, 1),
    issuedAt: start - 2 * DAY,
    input: quayDeck(),
  });
  await record.sayOne(
    people.superintendent,
    pourId,
    'inspection-asked',
    {
      readyAt: new Date(start).toISOString(),
      place: 'Bay 3, ladder at grid D',
      text: 'Top mat tied this morning',
    },
    start - 4 * HOUR,
  );
  const soffit = faceReadings({
    plan,
    faceId: 'soffit',
    instrumentId: instruments.gauge1,
    meanMm: 49,
    spreadMm: 5,
    fixed: { A4: 38, A5: 31, B3: 36, C1: 46 },
    skip: ['C4', 'C5'],
    other: { C1: instruments.gauge2 },
    seed: 14,
    at: start + 30 * MINUTE,
  });
  await record.say(people.inspector, pourId, soffit);
  const top = faceReadings({
    plan,
    faceId: 'top',
    instrumentId: instruments.gauge1,
    meanMm: 53,
    spreadMm: 4,
    skip: ['C3', 'C4'],
    seed: 15,
    at: start + 80 * MINUTE,
  });
  const topIds = await record.say(people.inspector, pourId, top);
  await measurements(scene, pourId, start + 110 * MINUTE);

  const first = top[1];
  if (first) {
    await record.sayOne(
      people.inspector,
      pourId,
      'amendment',
      {
        rootId: topIds[1] ?? '',
        sawAmendmentId: null,
        reason: 'Recording error: 54 typed as read, the gauge showed 56',
        replacement: { ...first.body, value: { text: '56 mm', unit: 'mm', mm: 56 } },
        photoId: null,
      },
      start + 130 * MINUTE,
    );
  }
  await nonconformance(
    scene,
    pourId,
    soffit.find((reading) => reading.body.value?.mm === 36)?.body.pointId ?? '',
    start + 150 * MINUTE,
  );
  await answerChecks(scene, pourId, plan, start + 180 * MINUTE, {
    notMet: { 'chairs-stand': 'Two chairs tipped between grids 4 and 5.' },
    skip: ['engineer-walk', 'trades-done', 'weather', 'joint-prepared', 'access'],
  });
  await record.sayOne(
    people.engineer,
    pourId,
    'query',
    { entryId: topIds[2] ?? '', text: 'Was this read to T1 or to the bar over it?' },
    start + 210 * MINUTE,
  );
  await record.sayOne(
    people.coordinator,
    pourId,
    'hold',
    {
      title: 'Owner asks to see the drain sleeve before closing',
      where: { elementId: 'deck', faceId: null, text: 'Drain at grid D' },
      clearedBy: 'coordinator',
      need: 'The owner’s visit is noted.',
      onBehalfOf: 'the owner',
    },
    start + 220 * MINUTE,
  );
  await record.sayOne(
    people.inspector,
    pourId,
    'note',
    { about: { kind: 'face', id: 'top' }, text: 'Hose route moved to the river side; boards laid.' },
    start + 230 * MINUTE,
  );
}

async function measurements(scene: Scene, pourId: string, at: number): Promise<void> {
  const length = (itemId: string, place: string, mm: number, minute: number) => ({
    type: 'measurement' as const,
    at: at + minute * MINUTE,
    body: {
      itemId,
      place,
      stage: 'single' as const,
      value: { quantity: 'length' as const, length: asRead(mm, 'mm') },
      measuredAt: new Date(at + minute * MINUTE).toISOString(),
    },
  });
  const ties = (place: string, tied: number, of: number, atEdge: boolean, minute: number) => ({
    type: 'measurement' as const,
    at: at + minute * MINUTE,
    body: {
      itemId: 'ties-top',
      place,
      stage: 'single' as const,
      value: { quantity: 'share' as const, tied, of, atEdge },
      measuredAt: new Date(at + minute * MINUTE).toISOString(),
    },
  });
  await scene.record.say(scene.people.inspector, pourId, [
    length('chair-height', 'grid 3', 146, 0),
    length('chair-height', 'grid 4', 145, 1),
    length('chair-height', 'grid 5', 143, 2),
    length('chair-spacing', 'grid 3 to 4', 1080, 4),
    length('chair-spacing', 'grid 4 to 5', 1420, 5),
    length('chair-spacing', 'edge', 1150, 6),
    length('lap-t1', 'joint, bar 4', 885, 8),
    length('lap-t1', 'joint, bar 11', 870, 9),
    length('gaps-b1', 'mid bay', 1502, 11),
    ties('grid 3, edge', 92, 169, true, 13),
    ties('grid 4', 101, 169, false, 14),
  ]);
}

async function nonconformance(scene: Scene, pourId: string, pointId: string, at: number): Promise<void> {
  const { record, people } = scene;
  const id = await record.sayOne(
    people.inspector,
    pourId,
    'nonconformance',
    {
      title: 'Low cover at B3, chair on a form joint',
      about: [{ kind: 'point', id: pointId }],
      where: { elementId: 'deck', faceId: 'soffit', text: 'Quay deck, bay 3, soffit, B3' },
      extent: 'Two bars of B1 over 900 mm',
      description: 'The joint of the form is 2 mm proud; the block rocks on it.',
      proposal: 'Use as is with a sealer on the soffit, or lift both bars',
      neededBy: new Date(scene.now + 8 * HOUR).toISOString(),
    },
    at,
  );
  const about = { kind: 'nonconformance' as const, id };
  await record.photo(
    people.inspector,
    pourId,
    about,
    { card: 'B3 wide', tapeMm: 36, seed: 31, shot: 'wide', caption: 'B3 from the walkway' },
    at + MINUTE,
  );
  await record.photo(
    people.inspector,
    pourId,
    about,
    { card: 'B3', tapeMm: 36, seed: 32, shot: 'close', caption: '36 mm at B3, to B1' },
    at + 2 * MINUTE,
  );
}
