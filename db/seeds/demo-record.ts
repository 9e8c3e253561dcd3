import { v7 as uuid } from 'uuid';
import { ENTRY_VERSION, type BodyOf, type EntryType } from '@/lib/inspection/entry';
import { projectBodies } from '@/lib/inspection/entry-bodies';
import { sheetStatement } from '@/lib/inspection/sheet-statement';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { settlePhoto } from '@/db/stores/photo-store';
import { counterOf } from '@/db/stores/entry-store';
import type { Tx } from '@/db/connection';
import { appendEntries } from '@/lib/server/append-entries';
import { confirmSignature } from '@/lib/server/confirm-signature';
import { sha256 } from '@/lib/server/entry-hash';
import { giveRelease } from '@/lib/server/give-release';
import { OpenRecord } from '@/lib/server/open-record';
import type { DemoPerson } from './demo-people';
import { drawPicture, type Picture } from './draw-picture';
import { storePicture } from './store-picture';

const device = (person: DemoPerson): string => person.id.replace('0193a000', '0193b000');

/** Writes the demo's record through the same door as everybody: each entry is admitted, chained, folded, summarised. */
export class DemoRecord {
  private readonly deviceSeq = new Map<string, number>();
  private readonly planRevisions = new Map<string, number>();

  constructor(
    readonly tx: Tx,
    readonly projectId: string,
  ) {}

  planIssued(pourId: string, revision: number): void {
    this.planRevisions.set(pourId, revision);
  }

  /** Records entries of one person in one batch, having fetched everything before. @returns their ids */
  async say<T extends EntryType>(
    person: DemoPerson,
    pourId: string | null,
    entries: { type: T; body: BodyOf<T>; at: number }[],
  ): Promise<string[]> {
    const seenSeq = await counterOf(this.tx, this.projectId);
    const batch = entries.map(({ type, body, at }) => {
      const deviceSeq = (this.deviceSeq.get(person.id) ?? 0) + 1;
      this.deviceSeq.set(person.id, deviceSeq);
      return {
        id: uuid(),
        projectId: this.projectId,
        pourId: type in projectBodies ? null : pourId,
        type,
        v: ENTRY_VERSION,
        body,
        planRevision: pourId ? (this.planRevisions.get(pourId) ?? 0) : 0,
        authorId: person.id,
        deviceId: device(person),
        deviceSeq,
        recordedAt: new Date(at).toISOString(),
        clockOffsetMs: 0,
        seenSeq,
      };
    });
    const last = Math.max(...entries.map((entry) => entry.at));
    const sender = {
      projectId: this.projectId,
      authorId: person.id,
      role: person.role,
      from: 'office',
    } as const;
    const outcomes = await appendEntries(this.tx, sender, batch, new Date(last + 20_000).toISOString());
    const refused = outcomes.find((outcome) => outcome.outcome === 'refused');
    if (refused) throw new Error(`The demo's own entry was refused: ${JSON.stringify(refused)}`);
    return batch.map((entry) => entry.id);
  }

  async sayOne<T extends EntryType>(
    person: DemoPerson,
    pourId: string | null,
    type: T,
    body: BodyOf<T>,
    at: number,
  ): Promise<string> {
    const [id] = await this.say(person, pourId, [{ type, body, at }]);
    if (!id) throw new Error('Nothing was recorded.');
    return id;
  }

  /** A drawn picture, stored and checked as a photograph of the device would be. @returns the photo's id */
  async photo(
    person: DemoPerson,
    pourId: string,
    about: BodyOf<'photo'>['about'],
    picture: Picture & { shot: BodyOf<'photo'>['shot']; caption: string },
    at: number,
  ): Promise<string> {
    const bytes = await drawPicture(picture);
    const kept = await storePicture(bytes);
    const photoId = uuid();
    const takenAt = new Date(at).toISOString();
    await this.sayOne(
      person,
      pourId,
      'photo',
      {
        photoId,
        sha256: kept.sha256,
        bytes: kept.bytes,
        contentType: 'image/jpeg',
        takenAt,
        about,
        shot: picture.shot,
        caption: picture.caption,
      },
      at,
    );
    const stored = {
      photoId,
      key: kept.key,
      sha256: kept.sha256,
      bytes: kept.bytes,
      contentType: 'image/jpeg',
      widthPx: 1200,
      heightPx: 900,
    };
    await this.write(person, pourId, 'photo-stored', stored, at + 60_000);
    await settlePhoto(this.tx, this.projectId, photoId, {
      state: 'stored',
      objectKey: kept.key,
      widthPx: 1200,
      heightPx: 900,
      at: new Date(at + 60_000).toISOString(),
    });
    return photoId;
  }

  /** An entry that only the server writes. */
  private async write<T extends EntryType>(
    person: DemoPerson,
    pourId: string,
    type: T,
    body: BodyOf<T>,
    at: number,
  ): Promise<void> {
    const record = await OpenRecord.open(this.tx, this.projectId, person, new Date(at).toISOString());
    await record.load([pourId]);
    record.write(pourId, type, body);
    await record.close();
  }

  async sheet(person: DemoPerson, pourId: string): Promise<Sheet> {
    const record = await OpenRecord.open(this.tx, this.projectId, person, new Date().toISOString());
    await record.load([pourId]);
    return record.sheet(pourId);
  }

  /** Signs and confirms with the password, as the person would online. */
  async sign(
    person: DemoPerson,
    pourId: string,
    as: 'inspector' | 'superintendent',
    at: number,
  ): Promise<void> {
    const sheet = await this.sheet(person, pourId);
    const words =
      as === 'inspector'
        ? 'I have inspected this pour at the points read and for the items checked, to the plan revision named.'
        : 'The reinforcement of this pour is ready. I ask for its release.';
    const strokes = [[60, 250, 140, 120, 220, 260, 300, 130, 380, 240, 480, 180, 600, 220, 760, 170]];
    const signatureId = await this.sayOne(
      person,
      pourId,
      'signature',
      { as, elementIds: null, words, strokes, sheetDigest: sha256(sheetStatement(sheet)) },
      at,
    );
    await confirmSignature(
      this.tx,
      person,
      { projectId: this.projectId, pourId, signatureId, authorId: person.id },
      new Date(at + 60_000).toISOString(),
    );
  }

  async release(person: DemoPerson, pourId: string, at: number): Promise<void> {
    const given = await giveRelease(
      this.tx,
      person,
      { id: pourId, projectId: this.projectId },
      { elementIds: null, limits: '' },
      '',
      new Date(at).toISOString(),
    );
    if (given instanceof Error)
      throw new Error(`The demo's release was refused: ${JSON.stringify(given.detail)}`);
  }
}
