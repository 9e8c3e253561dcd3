import type { BodyOf } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { DeviceIndex, PushOutcome } from '@/lib/inspection/wire';
import type { DeviceEnvironment, TabChannel, TabMessage } from './device-environment';
import type { DeviceEntryType, DevicePerson } from './device-types';
import type { EntryPlace } from './entry-to-record';
import { loadSchemas } from './load-schemas';
import type { RecordSchemas } from './record-schemas';
import { LossWatch } from './loss-watch';
import { forgetPhoto, forgetPour } from './store/forget-pour';
import {
  openPersonDatabase,
  projectStream,
  streamOf,
  unlessFull,
  writeMeta,
  type OutboxRecord,
  type PersonDatabase,
  type PhotoRecord,
} from './store/person-database';
import { settleOutcomes, type Settled } from './store/settle-outcomes';
import { notSaved } from './store/not-saved';
import { restartStream, storePage, type StoredPage, type StreamPage } from './store/store-page';
import { streamsNotTheirs } from './store/streams-not-theirs';
import { setRoomAside, writeEntry, type PhotoToStore } from './store/write-entry';
import { WorkInMemory } from './work-in-memory';

/**
 * One person's work on this device while it is open: their store, and in memory what the screens show of it. Every
 * change is written first and then taken into memory, and other tabs of the same person are told.
 */
export class PersonWork extends WorkInMemory {
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
    super();
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
    await this.readFrom(this.db);
    await this.loss.read();
    this.#readRefused();
  }

  /** @throws DeviceError where that piece of the program is not on this device */
  async #schemas(): Promise<RecordSchemas> {
    const schemas = await loadSchemas();
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

  isKept(pour: DeviceIndex['projects'][number]['pours'][number]): boolean {
    return this.keeps(pour, this.env.now());
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
      planRevision: place.pourId === null ? 0 : this.planRevisionOf(place.pourId),
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
      this.waits(written.outbox);
      if (photo) this.photos.set(photo.record.photoId, photo.record);
      this.memory.merge(stream, [written.entry]);
      this.#mark();
      this.#tell({ streams: [stream], send: true });
      return written.entry;
    } catch (error) {
      throw notSaved(error);
    }
  }

  /** The next records to send, in the order in which they were made, at most `most`. */
  outboxAfter(deviceSeq: number, most: number): Promise<OutboxRecord[]> {
    return this.db.getAllFromIndex('outbox', 'deviceSeq', IDBKeyRange.lowerBound(deviceSeq, true), most);
  }

  async settle(sent: readonly OutboxRecord[], outcomes: readonly PushOutcome[]): Promise<Settled> {
    const at = new Date(this.env.now()).toISOString();
    const settled = await settleOutcomes(this.db, sent, outcomes, at);
    const streams = [...new Set(sent.map((record) => record.stream))];
    this.takeSettled(settled, streams);
    this.#readRefused();
    this.#mark();
    this.#tell({ streams });
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
    this.takeStored(page, stored);
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
    for (const record of restarted.offeredAgain) this.waits(record);
    this.memory.remove(stream, restarted.strays, 0);
    this.memory.merge(stream, restarted.waiting);
    this.#mark();
    this.#tell({ streams: [stream] });
  }

  async setIndex(index: DeviceIndex): Promise<void> {
    // What cannot be noted on a full device is asked again after the next start; sending goes on, and makes room.
    await writeMeta(this.db, 'index', index).catch(unlessFull);
    this.index = index;
    const notTheirs = await streamsNotTheirs(this.db, index, [...this.crewLists.keys()]);
    for (const stream of notTheirs) await this.#forget(stream);
    this.#tell({ streams: [] });
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
    await forgetPhoto(this.db, photoId);
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
