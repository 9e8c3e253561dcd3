import type { BodyOf } from '@/lib/inspection/entry';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { DeviceIndex, PushOutcome } from '@/lib/inspection/wire';
import type { DeviceEnvironment, TabChannel, TabMessage } from './device-environment';
import { DeviceError, type DeviceEntryType, type DevicePerson } from './device-types';
import type { EntryPlace } from './entry-to-record';
import { loadSchemas } from './load-schemas';
import type { RecordSchemas } from './record-schemas';
import { LossWatch } from './loss-watch';
import { SheetMemory } from './sheet-memory';
import { forgetPour } from './store/forget-pour';
import {
  isDeviceFull,
  openPersonDatabase,
  projectStream,
  readMeta,
  streamOf,
  unlessFull,
  writeMeta,
  type OutboxRecord,
  type PersonDatabase,
  type PhotoRecord,
  type RefusedRecord,
} from './store/person-database';
import type { WaitingHere } from './store/settings-store';
import { settleOutcomes, type Settled } from './store/settle-outcomes';
import { restartStream, storePage, type StoredPage, type StreamPage } from './store/store-page';
import { setRoomAside, writeEntry, type PhotoToStore } from './store/write-entry';

/** What is kept in memory of an outbox record: enough to count and to say how old it is. */
export interface Waiting {
  deviceSeq: number;
  stream: string;
  recordedAt: string;
}

const KEPT_DAYS = 14;

/**
 * One person's work on this device while it is open: their store, and in memory what the screens show of it. Every
 * change is written first and then taken into memory, and other tabs of the same person are told.
 */
export class PersonWork {
  readonly memory = new SheetMemory();
  readonly outbox = new Map<string, Waiting>();
  readonly refused = new Map<string, RefusedRecord>();
  readonly photos = new Map<string, PhotoRecord>();
  /** Of crew only, by pour. */
  readonly crewLists = new Map<string, CrewList>();
  index: DeviceIndex | null = null;
  keep: Record<string, boolean> = {};
  lastSuccessAt: string | null = null;
  clockOffsetMs: number | null = null;
  /** Revision of the plan kept here, by pour. */
  readonly planRevisions = new Map<string, number>();
  readonly loss: LossWatch;
  /** Reads an entry by its schemas; null until they were wanted first. */
  reader: RecordSchemas['readEntry'] | null = null;
  readonly #opening = new Map<string, Promise<void>>();
  readonly #channel: TabChannel;
  #closed = false;
  /** Counts what this tab has written. */
  #changes = 0;

  private constructor(
    private readonly env: DeviceEnvironment,
    readonly person: DevicePerson,
    readonly deviceId: string,
    readonly db: PersonDatabase,
    private readonly changed: (wantsSending: boolean) => void,
  ) {
    this.loss = new LossWatch(env, db, { personId: person.id, deviceId });
    this.#channel = env.channel(`cagewright-${person.id}`, (message) => void this.#heard(message));
  }

  /** Opens a person's store, tells an emptied one from a new one, and reads what the screens show first. */
  static async open(
    env: DeviceEnvironment,
    person: DevicePerson,
    deviceId: string,
    changed: (wantsSending: boolean) => void,
  ): Promise<PersonWork> {
    const db = await openPersonDatabase(env.databaseName(`cagewright-${person.id}`));
    const work = new PersonWork(env, person, deviceId, db, changed);
    await work.#readAll();
    await work.loss.compare();
    work.#mark();
    void setRoomAside(db);
    return work;
  }

  get closed(): boolean {
    return this.#closed;
  }

  close(): void {
    this.#closed = true;
    this.#channel.close();
    this.db.close();
  }

  async #readAll(): Promise<void> {
    const [outbox, refused, photos, cursors, crewLists] = await Promise.all([
      this.db.getAll('outbox'),
      this.db.getAll('refused'),
      this.db.getAll('photos'),
      this.db.getAll('cursors'),
      this.db.getAll('crewLists'),
    ]);
    this.crewLists.clear();
    for (const { pourId, list } of crewLists) this.crewLists.set(pourId, list);
    this.outbox.clear();
    for (const record of outbox) this.#waits(record);
    this.refused.clear();
    for (const record of refused) this.refused.set(record.id, record);
    this.photos.clear();
    for (const photo of photos) this.photos.set(photo.photoId, photo);
    this.index = (await readMeta(this.db, 'index')) ?? null;
    this.keep = (await readMeta(this.db, 'keep')) ?? {};
    this.lastSuccessAt = (await readMeta(this.db, 'lastSuccessAt')) ?? null;
    this.clockOffsetMs = (await readMeta(this.db, 'clockOffsetMs')) ?? null;
    this.planRevisions.clear();
    for (const cursor of cursors) this.planRevisions.set(cursor.stream, cursor.planRevision);
    await this.loss.read();
    this.#readRefused();
  }

  /** @throws DeviceError where that piece of the program is not on this device */
  async #schemas(): Promise<RecordSchemas> {
    const schemas = await loadSchemas().catch(() => {
      throw new DeviceError(
        'store-failed',
        'A piece of Cagewright is not on this device yet. Load this page again once there is a network.',
      );
    });
    this.reader = schemas.readEntry;
    return schemas;
  }

  /** What was refused is shown as entries, and those are read by their schemas. */
  #readRefused(): void {
    if (this.refused.size === 0 || this.reader) return;
    void this.#schemas().then(
      () => this.changed(false),
      () => undefined,
    );
  }

  /** How much waits here, and how old it is: what others on this device are told. */
  waiting(): WaitingHere {
    const refused = [...this.refused.values()];
    const photos = [...this.photos.values()].filter(
      (photo) => photo.progress !== 'stored' && photo.progress !== 'refused',
    );
    const pours: Record<string, number> = {};
    for (const { stream } of this.outbox.values()) pours[stream] = (pours[stream] ?? 0) + 1;
    for (const { envelope } of refused) pours[streamOf(envelope)] = (pours[streamOf(envelope)] ?? 0) + 1;
    const times = [
      ...[...this.outbox.values()].map((one) => one.recordedAt),
      ...refused.map((one) => one.envelope.recordedAt),
      ...photos.map((one) => one.takenAt),
    ];
    return {
      entries: this.outbox.size + refused.length,
      photos: photos.length,
      oldestAt: times.reduce<string | null>((least, at) => (least === null || at < least ? at : least), null),
      pours,
    };
  }

  #waits(record: OutboxRecord): void {
    const { deviceSeq, stream, envelope } = record;
    this.outbox.set(record.id, { deviceSeq, stream, recordedAt: envelope.recordedAt });
  }

  #mark(): void {
    const unsent = [...this.outbox.values(), ...this.refused.values()].map((one) => one.deviceSeq);
    const photos = [...this.photos.values()].filter(
      ({ entryId, progress }) =>
        (progress === 'waiting' || progress === 'sending') &&
        !this.outbox.has(entryId) &&
        !this.refused.has(entryId),
    );
    this.loss.mark(unsent, photos.length);
  }

  #tell(message: TabMessage): void {
    if (this.#closed) return;
    this.#changes += 1;
    this.#channel.post(message);
    this.changed(message.send === true);
  }

  /** Another tab has changed the store. What this tab writes meanwhile must not be covered by what was read before. */
  async #heard(message: TabMessage): Promise<void> {
    try {
      for (let before = -1; before !== this.#changes && !this.#closed;) {
        before = this.#changes;
        await this.#readAll();
        for (const stream of message.streams) if (this.memory.has(stream)) await this.#loadStream(stream);
        for (const stream of message.streams) {
          const plan = this.memory.isOpen(stream) ? await this.db.get('plans', stream) : undefined;
          if (plan) this.memory.setPlan(plan);
        }
      }
    } catch (error) {
      // A store closed in the middle of this has nobody left to tell.
      if (!this.#closed) throw error;
      return;
    }
    this.changed(false);
  }

  async #loadStream(stream: string): Promise<void> {
    for (;;) {
      const before = this.#changes;
      const [kept, cursor] = await Promise.all([
        this.db.getAllFromIndex('entries', 'stream', stream),
        this.db.get('cursors', stream),
      ]);
      if (before !== this.#changes) continue;
      this.memory.load(
        stream,
        kept.map((one) => one.entry),
        cursor?.after ?? 0,
      );
      return;
    }
  }

  /** Reads a pour's two streams and its plan into memory. Asked twice, it reads once. */
  openPour(pourId: string, projectId: string): Promise<void> {
    if (this.memory.isOpen(pourId)) return Promise.resolve();
    const known = this.#opening.get(pourId);
    if (known) return known;
    const opening = (async () => {
      const [{ sheetEngine }] = await Promise.all([
        import('./sheet-engine'),
        this.#schemas(),
        this.#loadStream(pourId),
        this.#loadStream(projectStream(projectId)),
      ]);
      this.memory.open(pourId, projectId, (await this.db.get('plans', pourId)) ?? null, sheetEngine);
    })().finally(() => this.#opening.delete(pourId));
    this.#opening.set(pourId, opening);
    return opening;
  }

  /** The project of a pour, as last heard from the server. */
  projectOf(pourId: string): DeviceIndex['projects'][number] | undefined {
    return this.index?.projects.find((project) => project.pours.some((pour) => pour.id === pourId));
  }

  isKept(pour: DeviceIndex['projects'][number]['pours'][number]): boolean {
    const chosen = this.keep[pour.id];
    if (chosen !== undefined) return chosen;
    if (!pour.assigned) return false;
    if (pour.plannedAt === null) return true;
    // By the server's time as last heard: a wrong clock, or a month without a network, takes nothing off the device.
    const heardAt = Date.parse(this.index?.serverTime ?? '') || this.env.now();
    return Math.abs(Date.parse(pour.plannedAt) - heardAt) <= KEPT_DAYS * 86_400_000;
  }

  /**
   * Records an entry: on disk first, then in memory. (SPEC 1, 2, 3)
   * @throws DeviceError `invalid`, `device-full` or `store-failed`; nothing was written then
   */
  async record<T extends DeviceEntryType>(
    place: EntryPlace,
    type: T,
    body: BodyOf<T>,
    photo?: PhotoToStore,
  ): Promise<RecordedEntry> {
    const { checkedBody, entryToRecord } = await this.#schemas();
    const checked = checkedBody(type, body);
    const stream = streamOf(place);
    if (place.pourId !== null) await this.openPour(place.pourId, place.projectId);
    else if (!this.memory.has(stream)) await this.#loadStream(stream);
    const moment = {
      id: photo?.record.entryId ?? this.env.newId(),
      authorId: this.person.id,
      authorRole: this.index?.projects.find((one) => one.id === place.projectId)?.role ?? 'viewer',
      deviceId: this.deviceId,
      now: this.env.now(),
      clockOffsetMs: this.clockOffsetMs,
      planRevision: place.pourId === null ? 0 : this.#planRevisionOf(place.pourId),
      seenSeq: this.memory.headOf(stream) ?? 0,
    };
    try {
      const written = await writeEntry(
        this.db,
        this.loss.made,
        (deviceSeq) => entryToRecord(place, type, checked, moment, deviceSeq),
        photo,
      );
      this.loss.made = Math.max(this.loss.made, written.entry.deviceSeq);
      this.#waits(written.outbox);
      if (photo) this.photos.set(photo.record.photoId, photo.record);
      this.memory.merge(stream, [written.entry]);
      this.#mark();
      this.#tell({ streams: [stream], send: true });
      return written.entry;
    } catch (error) {
      throw isDeviceFull(error)
        ? new DeviceError(
            'device-full',
            'This device has no room left. This was not saved; everything saved before is kept. Send what waits or save it to a file, make room, and enter this again.',
          )
        : new DeviceError(
            'store-failed',
            'This could not be saved on the device. Everything saved before is kept. Load this page again and enter it once more.',
          );
    }
  }

  #planRevisionOf(pourId: string): number {
    return this.memory.planOf(pourId)?.revision ?? this.crewLists.get(pourId)?.planRevision ?? 0;
  }

  /** The next records to send, in the order in which they were made, at most `most`. */
  outboxAfter(deviceSeq: number, most: number): Promise<OutboxRecord[]> {
    return this.db.getAllFromIndex('outbox', 'deviceSeq', IDBKeyRange.lowerBound(deviceSeq, true), most);
  }

  async settle(sent: readonly OutboxRecord[], outcomes: readonly PushOutcome[]): Promise<Settled> {
    const at = new Date(this.env.now()).toISOString();
    const settled = await settleOutcomes(this.db, sent, outcomes, at);
    const streams = new Set(sent.map((record) => record.stream));
    for (const id of settled.confirmedIds) this.outbox.delete(id);
    for (const record of settled.refused) {
      this.outbox.delete(record.id);
      this.refused.set(record.id, record);
    }
    this.#readRefused();
    for (const photo of settled.photos) this.photos.set(photo.photoId, photo);
    for (const stream of streams) {
      this.memory.merge(
        stream,
        settled.confirmed.filter((entry) => streamOf(entry) === stream),
      );
      const gone = settled.refused.filter((record) => streamOf(record.envelope) === stream);
      if (gone.length > 0)
        this.memory.remove(
          stream,
          gone.map((record) => record.id),
        );
    }
    this.#mark();
    this.#tell({ streams: [...streams] });
    return settled;
  }

  /** Notes why an entry could not be sent, so that its author sees it. It stays in the outbox. */
  async noteProblem(record: OutboxRecord, problem: string): Promise<void> {
    await this.db.put('outbox', { ...record, problem });
  }

  async takePage(page: StreamPage): Promise<void> {
    const stored = await storePage(this.db, page);
    await this.loss.found(page.entries);
    const missed = await this.#takeMissed(page.stream, stored);
    // From here on without a pause: what is being read from the store meanwhile is read again (see #loadStream).
    this.memory.merge(page.stream, page.entries, page.head);
    if (page.plan) this.memory.setPlan(page.plan);
    if (page.crewList) this.crewLists.set(page.stream, page.crewList);
    this.planRevisions.set(page.stream, stored.cursor.planRevision);
    for (const photo of stored.photos) this.photos.set(photo.photoId, photo);
    for (const record of stored.offeredAgain) this.#waits(record);
    if (stored.offeredAgain.length + stored.photos.length > 0) this.#mark();
    const news =
      missed ||
      page.entries.length > 0 ||
      page.plan !== null ||
      Boolean(page.crewList) ||
      stored.offeredAgain.length > 0;
    if (news) this.#tell({ streams: [page.stream] });
  }

  /** Takes into memory what another tab wrote before this page and was closed before it could tell. (SPEC 38) */
  async #takeMissed(stream: string, { afterBefore, cursor }: StoredPage): Promise<boolean> {
    const behind = this.memory.has(stream) && this.memory.headOf(stream) !== afterBefore;
    if (behind) await this.#loadStream(stream);
    const plan =
      this.memory.isOpen(stream) && this.memory.planOf(stream)?.revision !== cursor.planRevision
        ? await this.db.get('plans', stream)
        : undefined;
    if (plan) this.memory.setPlan(plan);
    return behind || plan !== undefined;
  }

  async restart(stream: string): Promise<void> {
    const restarted = await restartStream(this.db, stream, {
      personId: this.person.id,
      deviceId: this.deviceId,
    });
    for (const record of restarted.offeredAgain) this.#waits(record);
    this.memory.remove(stream, restarted.strays, 0);
    this.memory.merge(stream, restarted.waiting);
    this.#mark();
    this.#tell({ streams: [stream] });
  }

  async setIndex(index: DeviceIndex): Promise<void> {
    // What cannot be noted on a full device is asked again after the next start; sending goes on, and makes room.
    await writeMeta(this.db, 'index', index).catch(unlessFull);
    this.index = index;
    for (const stream of await this.#notTheirs(index)) await this.#forget(stream);
    this.#tell({ streams: [] });
  }

  /**
   * Streams of which this device holds what the person's role does not give them (any more): a record where they are
   * crew now, a crew's list where they are not, anything of a pour that crew are no longer assigned to.
   */
  async #notTheirs({ projects }: DeviceIndex): Promise<string[]> {
    const crewOf = new Map(
      projects.flatMap(({ role, pours }) => pours.map(({ id }) => [id, role === 'crew'] as const)),
    );
    const cursors = await this.db.getAll('cursors');
    const followed = new Set(cursors.filter(({ after }) => after > 0).map(({ stream }) => stream));
    const withPlan = await this.db.getAllKeys('plans');
    return [
      ...withPlan.filter((pourId) => crewOf.get(pourId) === true),
      ...[...this.crewLists.keys()].filter((pourId) => crewOf.get(pourId) !== true),
      // Crew are given nothing of the project's own stream.
      ...projects
        .filter(({ role }) => role === 'crew')
        .map(({ id }) => projectStream(id))
        .filter((stream) => followed.has(stream)),
    ];
  }

  async setClockOffset(offsetMs: number | null): Promise<void> {
    if (offsetMs === null || offsetMs === this.clockOffsetMs) return;
    this.clockOffsetMs = offsetMs;
    await writeMeta(this.db, 'clockOffsetMs', offsetMs).catch(unlessFull);
  }

  async setLastSuccess(at: string): Promise<void> {
    this.lastSuccessAt = at;
    await writeMeta(this.db, 'lastSuccessAt', at);
  }

  async choose(pourId: string, keep: boolean): Promise<void> {
    this.keep = { ...this.keep, [pourId]: keep };
    await writeMeta(this.db, 'keep', this.keep);
    if (!keep) await this.#forget(pourId);
    this.#tell({ streams: [] });
  }

  async #forget(pourId: string): Promise<void> {
    for (const photoId of await forgetPour(this.db, pourId)) this.photos.delete(photoId);
    this.planRevisions.delete(pourId);
    this.crewLists.delete(pourId);
    this.memory.close(pourId);
  }

  async setPhoto(photo: PhotoRecord): Promise<void> {
    await this.db.put('photos', photo);
    this.photos.set(photo.photoId, photo);
    this.#mark();
    this.#tell({ streams: [] });
  }

  async forgetPhoto(photoId: string): Promise<void> {
    const tx = this.db.transaction(['photos', 'photoBytes'], 'readwrite');
    await Promise.all([
      tx.objectStore('photos').delete(photoId),
      tx.objectStore('photoBytes').delete(photoId),
      tx.done,
    ]);
    this.photos.delete(photoId);
    this.#mark();
    this.#tell({ streams: [] });
  }

  async forgetRefused(entryId: string): Promise<void> {
    await this.db.delete('refused', entryId);
    this.refused.delete(entryId);
    this.#mark();
    this.#tell({ streams: [] });
  }
}
