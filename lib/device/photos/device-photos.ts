import type { BodyOf } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { DeviceEnvironment } from '../device-environment';
import type { Device } from '../device-types';
import type { PersonWork } from '../person-work';
import { askServer } from '../sync/ask-server';

/** Adds photos to a person's work, and says from where each can be shown. */
export class DevicePhotos {
  readonly #urls = new Map<string, string>();

  constructor(private readonly env: DeviceEnvironment) {}

  /** Compresses a picture and keeps the bytes with the entry that names them. */
  async add(work: PersonWork, ...[at, file, photo]: Parameters<Device['addPhoto']>): Promise<RecordedEntry> {
    const prepared = await this.env.preparePhoto(file);
    const now = this.env.now();
    const shotAt = file instanceof File && file.lastModified > 0 ? Math.min(file.lastModified, now) : now;
    const photoId = this.env.newId();
    const entryId = this.env.newId();
    const body: BodyOf<'photo'> = {
      photoId,
      sha256: prepared.sha256,
      bytes: prepared.bytes.byteLength,
      contentType: prepared.contentType,
      takenAt: new Date(shotAt).toISOString(),
      ...photo,
    };
    return work.record(at, 'photo', body, {
      record: { ...body, ...at, entryId, progress: 'waiting', problem: null, sentAt: null, refusals: [] },
      bytes: prepared.bytes,
    });
  }

  /** The local bytes while they are here, the server's short-lived address otherwise; null without either. */
  async address(work: PersonWork, photoId: string): Promise<string | null> {
    const known = this.#urls.get(photoId);
    if (known) return known;
    const stored = await work.db.get('photoBytes', photoId);
    if (stored) {
      const type = work.photos.get(photoId)?.contentType ?? 'image/jpeg';
      const url = this.env.photoUrl(stored.bytes, type);
      this.#urls.set(photoId, url);
      return url;
    }
    const answer = await askServer(
      this.env,
      { method: 'GET', path: `/api/photos/${photoId}/address` },
      'photoAddress',
    );
    return answer.kind === 'answered' ? answer.data.url : null;
  }
}
