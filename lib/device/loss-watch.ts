import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { DeviceEnvironment } from './device-environment';
import { markName, readMark, writeMark } from './store/high-water-mark';
import { readMeta, writeMeta, type PersonDatabase } from './store/person-database';

/**
 * Keeps the mark outside of the store, and with it tells an emptied store from a new one and which entries went with
 * it. (SPEC 4, 5)
 */
export class LossWatch {
  /** The highest deviceSeq that was ever made here, by the store or by the mark. */
  made = 0;
  #storeId = '';
  #lost = new Set<number>();
  #lostUncounted = 0;
  /** Photos whose bytes went with an emptied store; their entries did not. */
  lostPhotos = 0;

  constructor(
    private readonly env: Pick<DeviceEnvironment, 'marks' | 'newId'>,
    private readonly db: PersonDatabase,
    private readonly own: { personId: string; deviceId: string },
  ) {}

  get lost(): number {
    return this.#lost.size + this.#lostUncounted;
  }

  /** Reads what the store knows; again after another tab has changed it. */
  async read(): Promise<void> {
    this.#lost = new Set((await readMeta(this.db, 'lost')) ?? []);
    this.#lostUncounted = (await readMeta(this.db, 'lostUncounted')) ?? 0;
    this.lostPhotos = (await readMeta(this.db, 'lostPhotos')) ?? 0;
    this.made = Math.max(this.made, (await readMeta(this.db, 'deviceSeq')) ?? 0);
  }

  /** A store without an id is new. If the mark knows another id, that store was emptied behind our back. */
  async compare(): Promise<void> {
    const storeId = await readMeta(this.db, 'storeId');
    const mark = readMark(this.env.marks.read(markName(this.own.personId)));
    if (mark) this.made = Math.max(this.made, mark.made);
    this.#storeId = storeId ?? this.env.newId().slice(-12);
    if (storeId) return;
    await writeMeta(this.db, 'storeId', this.#storeId);
    if (!mark || mark.unsent + mark.unsentPhotos === 0) return;
    this.#lost = new Set(mark.unsentSeqs);
    this.#lostUncounted = Math.max(0, mark.unsent - mark.unsentSeqs.length);
    this.lostPhotos = mark.unsentPhotos;
    await this.#write();
  }

  /** Writes the mark: the highest number made, which entries the server has not confirmed, how many photos wait. */
  mark(unsentSeqs: number[], unsentPhotos: number): void {
    this.env.marks.write(
      markName(this.own.personId),
      writeMark({
        storeId: this.#storeId,
        deviceId: this.own.deviceId,
        made: this.made,
        unsent: unsentSeqs.length,
        unsentSeqs,
        unsentPhotos,
      }),
    );
  }

  /** Own entries that an emptied store had lost and the server turns out to hold. */
  async found(entries: readonly RecordedEntry[]): Promise<void> {
    if (this.#lost.size === 0) return;
    const before = this.#lost.size;
    for (const entry of entries) {
      if (entry.authorId === this.own.personId && entry.deviceId === this.own.deviceId)
        this.#lost.delete(entry.deviceSeq);
    }
    if (this.#lost.size !== before) await this.#write();
  }

  /** The person has read it. */
  async acknowledge(): Promise<void> {
    this.#lost.clear();
    this.#lostUncounted = 0;
    this.lostPhotos = 0;
    await this.#write();
  }

  async #write(): Promise<void> {
    await writeMeta(this.db, 'lost', [...this.#lost]);
    await writeMeta(this.db, 'lostUncounted', this.#lostUncounted);
    await writeMeta(this.db, 'lostPhotos', this.lostPhotos);
  }
}
