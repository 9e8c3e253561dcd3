import type { DeviceEnvironment } from '../device-environment';
import type { PersonWork } from '../person-work';
import type { PhotoRecord } from '../store/person-database';
import { backOff } from '../sync/back-off';

/** A photo that was sent and not heard of for this long is sent again. */
const UNHEARD_MS = 10 * 60_000;

interface PhotoHost {
  work(): PersonWork | null;
  /** Is the server's session the own one of whose work this is? */
  ownSession(work: PersonWork): Promise<boolean>;
  /** A photo was sent: the record will soon say what the server found. */
  sentOne(): void;
}

/**
 * Sends photos one after another, in one tab at a time, and only while no entry waits: readings first. (SPEC 25)
 * It has a lane of its own, so that a reading made while a photo crawls over a bad line does not wait for it.
 */
export class PhotoLane {
  #running: Promise<void> | null = null;
  #failures = 0;
  #stopTimer: (() => void) | null = null;
  #stopped = false;

  constructor(
    private readonly env: DeviceEnvironment,
    private readonly host: PhotoHost,
  ) {}

  stop(): void {
    this.#stopped = true;
    this.#stopTimer?.();
  }

  /** Sends what waits; resolves when nothing more can be sent now. */
  run(): Promise<void> {
    if (this.#stopped) return Promise.resolve();
    this.#running ??= this.#send().finally(() => {
      this.#running = null;
    });
    return this.#running;
  }

  async #send(): Promise<void> {
    const work = this.host.work();
    if (!work || !this.#next(work) || !(await this.host.ownSession(work))) return;
    this.#stopTimer?.();
    const failed = await this.env
      .ifFree('cagewright-photos', () => this.#sendAll(work))
      .catch(() => ({ retryAfterMs: null }));
    if (this.#stopped || failed === 'taken' || failed === null) return;
    this.#failures += 1;
    this.#stopTimer = this.env.after(
      backOff(this.#failures, this.env.random(), failed.retryAfterMs),
      () => void this.run(),
    );
  }

  #next(work: PersonWork): PhotoRecord | undefined {
    if (work.outbox.size > 0) return undefined;
    const now = this.env.now();
    return [...work.photos.values()]
      .filter(
        (photo) =>
          photo.progress === 'waiting' ||
          photo.progress === 'sending' ||
          // A clock that was set back must not make it wait until the clock has caught up.
          (photo.progress === 'sent' &&
            Math.abs(now - Date.parse(photo.sentAt ?? photo.takenAt)) > UNHEARD_MS),
      )
      .sort((a, b) => (a.takenAt < b.takenAt ? -1 : 1))[0];
  }

  async #sendAll(work: PersonWork): Promise<{ retryAfterMs: number | null } | null> {
    const goOn = async () =>
      !this.#stopped && this.host.work() === work && !work.closed && (await this.host.ownSession(work));
    for (let photo = this.#next(work); photo && (await goOn()); photo = this.#next(work)) {
      const stored = await work.db.get('photoBytes', photo.photoId);
      if (!stored) {
        await work.setPhoto({
          ...photo,
          progress: 'refused',
          problem: 'The bytes are not on this device any more.',
        });
        continue;
      }
      await work.setPhoto({ ...photo, progress: 'sending', problem: null });
      const { uploadPhoto } = await import('./upload-photo');
      const upload = await uploadPhoto(this.env, { photoId: photo.photoId, bytes: stored.bytes });
      if (work.closed) return null;
      // A pull may have said meanwhile that it is stored: what the record says counts.
      const current = work.photos.get(photo.photoId);
      if (!current || current.progress === 'stored') continue;
      if (upload.kind === 'sent') {
        this.#failures = 0;
        const sentAt = new Date(this.env.now()).toISOString();
        await work.setPhoto({ ...current, progress: 'sent', problem: null, sentAt });
        this.host.sentOne();
      } else if (upload.kind === 'refused') {
        await work.setPhoto({ ...current, progress: 'refused', problem: upload.sentence });
      } else {
        await work.setPhoto({ ...current, progress: 'waiting', problem: upload.sentence });
        return { retryAfterMs: upload.retryAfterMs };
      }
    }
    return null;
  }
}
