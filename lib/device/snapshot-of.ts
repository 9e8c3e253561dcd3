import type { PourState } from '@/lib/inspection/sheet-types';
import type { DeviceIndex } from '@/lib/inspection/wire';
import type { DevicePour, DeviceProject, DeviceSnapshot, QueuedPhoto, RefusedEntry } from './device-types';
import type { PersonWork } from './person-work';
import type { PhotoRecord, RefusedRecord } from './store/person-database';
import type { LaneState } from './sync/sync-lane';

type IndexProject = DeviceIndex['projects'][number];

/** What is shown before anything is known, and while nobody is signed in. */
export const emptySnapshot: DeviceSnapshot = {
  store: 'reading',
  deviceId: '',
  person: null,
  projects: [],
  pours: [],
  sync: {
    phase: 'idle',
    message: null,
    lastSuccessAt: null,
    waitingEntries: 0,
    refusedEntries: 0,
    waitingPhotos: 0,
    oldestWaitingAt: null,
    clockOffsetMs: null,
    lostEntries: null,
    lostPhotos: null,
    signedInAs: null,
  },
  refused: [],
  photos: [],
  storage: { usedBytes: null, quotaBytes: null, persisted: null },
  updateReady: false,
  people: [],
  asks: false,
  pin: { set: false, needsCurrent: false },
};

const states: readonly string[] = [
  'no-plan',
  'not-read',
  'held',
  'ready',
  'released',
  'placing',
  'placed',
  'placed-without-release',
] satisfies PourState[];
const isState = (state: string): state is PourState => states.includes(state);

export const projectOf = (project: IndexProject): DeviceProject => ({
  id: project.id,
  name: project.name,
  timeZone: project.timeZone,
  role: project.role,
  people: project.people,
});

/** One pour as the list shows it; where it is open, by its own sheet with what is pending here. */
export function pourOf(
  work: PersonWork,
  projectId: string,
  pourId: string,
  now: number,
  notSent: number = notSentOf(work, pourId),
): DevicePour | undefined {
  const project = work.index?.projects.find((one) => one.id === projectId);
  const pour = project?.pours.find((one) => one.id === pourId);
  if (!pour) return undefined;
  const folded = work.memory.folded(pourId, now);
  return {
    id: pour.id,
    projectId,
    number: pour.number,
    title: pour.title,
    location: pour.location,
    plannedAt: pour.plannedAt,
    kept: work.isKept(pour),
    planRevision: work.planRevisions.get(pourId) ?? 0,
    serverPlanRevision: pour.planRevision,
    state: folded?.sheet ? folded.state : isState(pour.state) ? pour.state : 'held',
    holds: folded?.sheet ? folded.holds.length : pour.holds,
    notSent,
  };
}

function notSentOf(work: PersonWork, pourId: string): number {
  let count = 0;
  for (const one of work.outbox.values()) if (one.stream === pourId) count += 1;
  return count;
}

/** Everything the screens show of one person's work, without what belongs to the device as a whole. */
export function snapshotOf(
  work: PersonWork,
  lane: LaneState,
  now: number,
): Omit<DeviceSnapshot, 'store' | 'deviceId' | 'storage' | 'updateReady' | 'people' | 'asks' | 'pin'> {
  const notSent = new Map<string, number>();
  let oldest: string | null = null;
  for (const one of work.outbox.values()) {
    notSent.set(one.stream, (notSent.get(one.stream) ?? 0) + 1);
    if (oldest === null || one.recordedAt < oldest) oldest = one.recordedAt;
  }
  const projects = work.index?.projects ?? [];
  const photos = [...work.photos.values()].sort((a, b) => (a.takenAt < b.takenAt ? -1 : 1));
  return {
    person: work.person,
    projects: projects.map(projectOf),
    pours: projects
      .flatMap((project) =>
        project.pours.map((pour) => pourOf(work, project.id, pour.id, now, notSent.get(pour.id) ?? 0)),
      )
      .filter((pour) => pour !== undefined)
      .sort((a, b) => (a.plannedAt ?? '9').localeCompare(b.plannedAt ?? '9')),
    sync: {
      phase: lane.phase,
      message: lane.message,
      lastSuccessAt: work.lastSuccessAt,
      waitingEntries: work.outbox.size,
      refusedEntries: work.refused.size,
      waitingPhotos: photos.filter((photo) => photo.progress !== 'stored' && photo.progress !== 'refused')
        .length,
      oldestWaitingAt: oldest,
      clockOffsetMs: work.clockOffsetMs,
      lostEntries: work.loss.lost || null,
      lostPhotos: work.loss.lostPhotos || null,
      signedInAs: lane.signedInAs,
    },
    refused: [...work.refused.values()]
      .sort((a, b) => a.deviceSeq - b.deviceSeq)
      .flatMap((record) => refusedEntry(record, work.reader)),
    photos: photos.map(queuedPhoto),
  };
}

function refusedEntry(record: RefusedRecord, reader: PersonWork['reader']): RefusedEntry[] {
  // The role plays no part in the tray; the server has judged it already.
  const read = reader?.({ ...record.envelope, authorRole: 'viewer' });
  if (read?.kind !== 'known') return [];
  const { code, sentence, field, at } = record;
  return [{ entry: read.entry, code, sentence, field, at }];
}

const queuedPhoto = (photo: PhotoRecord): QueuedPhoto => ({
  photoId: photo.photoId,
  pourId: photo.pourId,
  about: photo.about,
  caption: photo.caption,
  shot: photo.shot,
  bytes: photo.bytes,
  takenAt: photo.takenAt,
  progress: photo.progress,
  problem: photo.problem,
});
