import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { DeviceIndex } from '@/lib/inspection/wire';
import { SheetMemory } from './sheet-memory';
import {
  readMeta,
  streamOf,
  type OutboxRecord,
  type PersonDatabase,
  type PhotoRecord,
  type RefusedRecord,
} from './store/person-database';
import type { WaitingHere } from './store/settings-store';
import type { Settled } from './store/settle-outcomes';
import type { StoredPage, StreamPage } from './store/store-page';

/** What is kept in memory of an outbox record: enough to count and to say how old it is. */
export interface Waiting {
  deviceSeq: number;
  stream: string;
  recordedAt: string;
}

type IndexedProject = DeviceIndex['projects'][number];

const KEPT_DAYS = 14;

/** What the screens show of one person's store, in memory: read from it once, and changed after it. */
export class WorkInMemory {
  readonly memory = new SheetMemory();
  readonly outbox = new Map<string, Waiting>();
  readonly refused = new Map<string, RefusedRecord>();
  readonly photos = new Map<string, PhotoRecord>();
  /** Of crew only, by pour. */
  readonly crewLists = new Map<string, CrewList>();
  /** Revision of the plan kept here, by pour. */
  readonly planRevisions = new Map<string, number>();
  index: DeviceIndex | null = null;
  keep: Record<string, boolean> = {};
  lastSuccessAt: string | null = null;
  clockOffsetMs: number | null = null;

  /** Reads everything but the pours' own streams, which are read when they are opened. */
  protected async readFrom(db: PersonDatabase): Promise<void> {
    const [outbox, refused, photos, cursors, crewLists] = await Promise.all([
      db.getAll('outbox'),
      db.getAll('refused'),
      db.getAll('photos'),
      db.getAll('cursors'),
      db.getAll('crewLists'),
    ]);
    this.crewLists.clear();
    for (const { pourId, list } of crewLists) this.crewLists.set(pourId, list);
    this.outbox.clear();
    for (const record of outbox) this.waits(record);
    this.refused.clear();
    for (const record of refused) this.refused.set(record.id, record);
    this.photos.clear();
    for (const photo of photos) this.photos.set(photo.photoId, photo);
    this.index = (await readMeta(db, 'index')) ?? null;
    this.keep = (await readMeta(db, 'keep')) ?? {};
    this.lastSuccessAt = (await readMeta(db, 'lastSuccessAt')) ?? null;
    this.clockOffsetMs = (await readMeta(db, 'clockOffsetMs')) ?? null;
    this.planRevisions.clear();
    for (const cursor of cursors) this.planRevisions.set(cursor.stream, cursor.planRevision);
  }

  protected waits(record: OutboxRecord): void {
    const { deviceSeq, stream, envelope } = record;
    this.outbox.set(record.id, { deviceSeq, stream, recordedAt: envelope.recordedAt });
  }

  /** Takes in what became of entries that were sent. */
  protected takeSettled(settled: Settled, streams: readonly string[]): void {
    for (const id of settled.confirmedIds) this.outbox.delete(id);
    for (const record of settled.refused) {
      this.outbox.delete(record.id);
      this.refused.set(record.id, record);
    }
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
  }

  /** Takes in a page of a stream that has been stored. */
  protected takeStored(page: StreamPage, stored: StoredPage): void {
    this.memory.merge(page.stream, page.entries, page.head);
    if (page.plan) this.memory.setPlan(page.plan);
    if (page.crewList) this.crewLists.set(page.stream, page.crewList);
    this.planRevisions.set(page.stream, stored.cursor.planRevision);
    for (const photo of stored.photos) this.photos.set(photo.photoId, photo);
    for (const record of stored.offeredAgain) this.waits(record);
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

  /** The project of a pour, as last heard from the server. */
  projectOf(pourId: string): IndexedProject | undefined {
    return this.index?.projects.find((project) => project.pours.some((pour) => pour.id === pourId));
  }

  /**
   * Is this pour to be on the device: as chosen, else where it is assigned and planned within two weeks?
   * @param now this device's clock, ms, for as long as the server was never heard
   */
  protected keeps(pour: IndexedProject['pours'][number], now: number): boolean {
    const chosen = this.keep[pour.id];
    if (chosen !== undefined) return chosen;
    if (!pour.assigned) return false;
    if (pour.plannedAt === null) return true;
    // By the server's time as last heard: a wrong clock, or a month without a network, takes nothing off the device.
    const heardAt = Date.parse(this.index?.serverTime ?? '') || now;
    return Math.abs(Date.parse(pour.plannedAt) - heardAt) <= KEPT_DAYS * 86_400_000;
  }

  protected planRevisionOf(pourId: string): number {
    return this.memory.planOf(pourId)?.revision ?? this.crewLists.get(pourId)?.planRevision ?? 0;
  }
}
