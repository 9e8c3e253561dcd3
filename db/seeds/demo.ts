import { connect, database, closeDatabase } from '@/db/connection';
import { enterProject } from '@/db/stores/session-store';
import { hashPassword } from '@/lib/server/password';
import { DemoRecord } from './demo-record';
import { demoPeople } from './demo-people';
import {
  seedBeamLine,
  seedBollardBases,
  seedPontoonStair,
  seedPumpPitWalls,
  seedUnread,
  seedWaveWall,
} from './demo-pours';
import { seedQuayDeck } from './demo-quay-deck';
import { HOUR, instruments, sceneOf, type Scene } from './demo-scene';

const projectId = '0193d000-0000-7000-8000-000000000001';

/**
 * Makes the demo, once: a ferry landing on an invented river, with every role and pours in every state. Done again, it
 * finds the record there and changes nothing; broken off in the middle, it is made whole the next time.
 * @param ownerUrl of the tables' owner, who alone adds people and projects by hand
 * @returns whether it made anything
 */
export async function seedDemo(ownerUrl: string): Promise<boolean> {
  if (!(await makeProject(ownerUrl))) return false;
  try {
    await database().transaction(async (tx) => {
      await enterProject(tx, projectId);
      const scene = sceneOf(new DemoRecord(tx, projectId), Date.now());
      await registers(scene);
      await seedPontoonStair(scene);
      await seedBollardBases(scene);
      await seedWaveWall(scene);
      await seedPumpPitWalls(scene);
      await seedUnread(scene);
      await seedQuayDeck(scene);
      await seedBeamLine(scene);
      await failedBlockCheck(scene);
    });
  } finally {
    await closeDatabase();
  }
  return true;
}

/** People, project and memberships. @returns false when the project has a record already */
async function makeProject(ownerUrl: string): Promise<boolean> {
  const owner = connect(ownerUrl, 1);
  try {
    const counter = await owner('project_counters')
      .where({ project_id: projectId })
      .first<{ last_seq: number } | undefined>('last_seq');
    if (counter && counter.last_seq > 0) return false;
    const hashes = await Promise.all(demoPeople.map((person) => hashPassword(person.password)));
    await owner.transaction(async (tx) => {
      const add = (table: string, rows: object | object[]) => tx(table).insert(rows).onConflict().ignore();
      await add(
        'users',
        demoPeople.map(({ id, email, name, licence, certification }, index) => ({
          id,
          email,
          name,
          password_hash: hashes[index],
          licence,
          certification,
        })),
      );
      await add('projects', {
        id: projectId,
        name: 'Ferry landing, Oldmere Reach',
        time_zone: 'America/Halifax',
        place: 'Tidal river, both banks',
      });
      await add('project_counters', { project_id: projectId });
      await add(
        'memberships',
        demoPeople.map((person) => ({ project_id: projectId, person_id: person.id, role: person.role })),
      );
    });
    return true;
  } finally {
    await owner.destroy();
  }
}

/** Instruments with their morning block checks, and the drawings on site. */
async function registers(scene: Scene): Promise<void> {
  const { record, people, now } = scene;
  const long = now - 60 * 24 * HOUR;
  const due = (days: number) => new Date(now + days * 24 * HOUR).toISOString();
  const status = (
    instrumentId: string,
    name: string,
    kind: 'depth-gauge' | 'tape' | 'cover-meter',
    serial: string,
    uncertaintyMm: number,
  ) => ({
    type: 'instrument-status' as const,
    at: long,
    body: { instrumentId, name, kind, serial, calibrationDue: due(200), uncertaintyMm, inService: true },
  });
  await record.say(people.coordinator, null, [
    status(instruments.gauge1, 'DG-1', 'depth-gauge', 'Q-1107', 1),
    status(instruments.gauge2, 'DG-2', 'depth-gauge', 'Q-1118', 1),
    status(instruments.tape, 'T-4', 'tape', 'T-0004', 1),
    status(instruments.meter, 'CM-1', 'cover-meter', 'M-3301', 2),
  ]);
  const drawing = (number: string, revision: string) => ({
    type: 'drawing-received' as const,
    at: long,
    body: { number, revision, at: new Date(long).toISOString() },
  });
  await record.say(people.coordinator, null, [
    drawing('S-204', '5'),
    drawing('S-207', '2'),
    drawing('S-211', '3'),
    drawing('S-212', '1'),
    drawing('S-216', '2'),
    drawing('S-220', '1'),
    drawing('S-224', '1'),
    drawing('S-230', '4'),
  ]);
  const at = now - 44 * HOUR;
  await record.say(
    people.inspector,
    null,
    [instruments.gauge1, instruments.gauge2, instruments.meter].map((instrumentId) => ({
      type: 'block-check' as const,
      at,
      body: {
        instrumentId,
        at: new Date(at).toISOString(),
        when: 'start' as const,
        blockMm: 50,
        readMm: 50,
        toleranceMm: 1,
      },
    })),
  );
}

/** DG-2 read its block 3 mm wrong at midday: what was read with it since its last good check is suspect. */
async function failedBlockCheck({ record, people, now }: Scene): Promise<void> {
  const at = now - HOUR;
  await record.sayOne(
    people.inspector,
    null,
    'block-check',
    {
      instrumentId: instruments.gauge2,
      at: new Date(at).toISOString(),
      when: 'middle',
      blockMm: 50,
      readMm: 53,
      toleranceMm: 1,
    },
    at,
  );
}
