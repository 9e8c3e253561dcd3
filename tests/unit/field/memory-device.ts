import { DeviceError, type Device, type DeviceSnapshot, type OpenPour } from '@/lib/device/device-types';
import { bodies } from '@/lib/inspection/entry-bodies';
import { ENTRY_VERSION, readEntry, type BodyOf, type Entry, type EntryType } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/facts';
import { holds } from '@/lib/inspection/holds';
import type { Plan } from '@/lib/inspection/plan';
import { pourState } from '@/lib/inspection/pour-state';
import type { Role } from '@/lib/inspection/roles';
import { foldSheet } from '@/lib/inspection/sheet';
import { people, pourId, projectId, uuid } from '../../stories/pour-story';

const names: Record<keyof typeof people, string> = {
  inspector: 'Imre Kovač',
  secondInspector: 'Odile Brandt',
  superintendent: 'Sana Whitlock',
  engineer: 'Piet Vandenberg',
  coordinator: 'Noor Haddad',
};
const rolesOf: Record<keyof typeof people, Role> = {
  inspector: 'inspector',
  secondInspector: 'inspector',
  superintendent: 'superintendent',
  engineer: 'engineer',
  coordinator: 'coordinator',
};

/** A device without a disk or a network: what is recorded is folded in at once and waits for ever. */
export class MemoryDevice implements Device {
  readonly recorded: RecordedEntry[];
  private readonly listeners = new Set<() => void>();
  private seq = 0;
  private current: OpenPour;
  private shown: DeviceSnapshot;
  /** Thrown by the next `record`, as a full device would. */
  failNext: DeviceError | null = null;

  constructor(
    private readonly plan: Plan,
    recorded: readonly RecordedEntry[],
    private readonly who: keyof typeof people = 'inspector',
    private readonly now = () => '2026-12-01T13:00:00.000Z',
    part: Partial<DeviceSnapshot> = {},
  ) {
    this.recorded = [...recorded];
    this.current = this.fold();
    this.shown = {
      store: 'open',
      deviceId: 'd-1',
      person: { id: people[who], name: names[who], email: `${who.toLowerCase()}@example.test` },
      projects: [this.current.project],
      pours: [this.current.pour],
      sync: {
        phase: 'offline',
        message: 'There is no network. What you record is kept and sent later.',
        lastSuccessAt: '2026-12-01T06:00:00.000Z',
        waitingEntries: 0,
        refusedEntries: 0,
        waitingPhotos: 0,
        oldestWaitingAt: null,
        clockOffsetMs: 0,
        lostEntries: null,
        lostPhotos: null,
        signedInAs: null,
      },
      refused: [],
      photos: [],
      storage: { usedBytes: 4_200_000, quotaBytes: 800_000_000, persisted: true },
      updateReady: false,
      people: [],
      asks: false,
      pin: { set: false, needsCurrent: false },
      ...part,
    };
  }

  private fold(): OpenPour {
    const sheet = foldSheet(this.plan, this.recorded);
    const now = this.now();
    const standing = holds(sheet, now);
    const waiting = this.recorded.filter((entry) => entry.seq === undefined).length;
    return {
      pour: {
        id: pourId,
        projectId,
        number: 'P-014',
        title: 'Quay deck, bay 3',
        location: 'Grids C to D, level +2.40',
        plannedAt: '2026-12-02T09:30:00.000Z',
        kept: true,
        planRevision: this.plan.revision,
        serverPlanRevision: this.plan.revision,
        state: pourState(sheet, standing, now),
        holds: standing.length,
        notSent: waiting,
      },
      project: {
        id: projectId,
        name: 'Skerry Landing ferry berth',
        timeZone: 'America/Halifax',
        role: rolesOf[this.who],
        people: (Object.keys(people) as (keyof typeof people)[]).map((one) => ({
          id: people[one],
          name: names[one],
          role: rolesOf[one],
        })),
      },
      sheet,
      holds: standing,
      state: pourState(sheet, standing, now),
      crew: null,
    };
  }

  private changed(): void {
    this.current = this.fold();
    const waiting = this.recorded.filter((entry) => entry.seq === undefined);
    this.shown = {
      ...this.shown,
      pours: [this.current.pour, ...this.shown.pours.slice(1)],
      sync: {
        ...this.shown.sync,
        waitingEntries: waiting.length,
        oldestWaitingAt: waiting[0]?.recordedAt ?? null,
      },
    };
    this.listeners.forEach((tell) => tell());
  }

  snapshot = () => this.shown;
  subscribe = (listener: () => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  pour = (id: string) => (id === pourId ? this.current : undefined);
  pourFailed = () => false;
  keepPour = async () => undefined;
  dropPour = async () => undefined;

  record = async <T extends EntryType>(
    at: { projectId: string; pourId: string | null },
    type: T,
    body: BodyOf<T>,
  ): Promise<Entry> => {
    if (this.failNext) {
      const failure = this.failNext;
      this.failNext = null;
      throw failure;
    }
    const parsed = bodies[type].safeParse(body);
    if (!parsed.success) throw new DeviceError('invalid', parsed.error.issues[0]?.message ?? 'Not valid.');
    this.seq += 1;
    const recorded: RecordedEntry = {
      id: uuid(7, this.seq),
      ...at,
      type,
      v: ENTRY_VERSION,
      body: parsed.data as RecordedEntry['body'],
      planRevision: this.plan.revision,
      authorId: people[this.who],
      authorRole: rolesOf[this.who],
      deviceId: uuid(6, 1),
      deviceSeq: 1000 + this.seq,
      recordedAt: this.now(),
      clockOffsetMs: 0,
      seenSeq: this.recorded.reduce((head, entry) => Math.max(head, entry.seq ?? 0), 0),
    };
    this.recorded.push(recorded);
    this.changed();
    const read = readEntry(recorded);
    if (read.kind !== 'known') throw new Error('An entry made here is always known here.');
    return read.entry;
  };

  addPhoto: Device['addPhoto'] = async (at, file, photo) =>
    this.record(at, 'photo', {
      photoId: uuid(8, 100 + this.seq),
      sha256: 'c'.repeat(64),
      bytes: Math.max(1, file.size),
      contentType: 'image/jpeg',
      takenAt: this.now(),
      ...photo,
    });
  photoAddress = async () => null;
  forgetPhoto = async () => undefined;
  forgetRefused = async (entryId: string) => {
    this.shown = { ...this.shown, refused: this.shown.refused.filter((one) => one.entry.id !== entryId) };
    this.changed();
  };
  syncNow = async () => undefined;
  exportUnsent = async () =>
    new Blob([JSON.stringify(this.recorded.filter((entry) => entry.seq === undefined))]);
  confirmSignature = async () => ({ ok: false as const, sentence: 'There is no network.' });
  refreshPerson = async () => undefined;
  handOver = async () => undefined;
  openPerson = async () => ({ ok: true as const });
  setPin = async () => ({ ok: true as const });
  applyUpdate = () => undefined;
}
