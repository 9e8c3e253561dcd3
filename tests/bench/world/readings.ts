import { v7 as uuid } from 'uuid';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { MOST_ENTRIES_IN_A_BATCH, PROTOCOL } from '@/lib/inspection/protocol';
import type { BenchPour, Site } from './site';

/** An hour of 60 readings a face; values as a good cage gives them, all met. */
const BETWEEN_READINGS_MS = 21_000;
const mmOf = (index: number) => 46 + ((index * 7) % 13);

/** One device in the hand of the site's inspector; it numbers what it records. */
export class BenchDevice {
  private deviceSeq = 0;
  private readonly startedAt = Date.now() - 12 * 3_600_000;

  constructor(
    readonly site: Site,
    readonly id: string = uuid(),
  ) {}

  entry(
    pourId: string,
    type: string,
    body: EntryEnvelope['body'],
    seenSeq: number,
    authorId: string,
  ): EntryEnvelope {
    this.deviceSeq += 1;
    return {
      id: uuid(),
      projectId: this.site.projectId,
      pourId,
      type,
      v: 1,
      body,
      planRevision: 1,
      authorId,
      deviceId: this.id,
      deviceSeq: this.deviceSeq,
      recordedAt: new Date(this.startedAt + this.deviceSeq * BETWEEN_READINGS_MS).toISOString(),
      clockOffsetMs: 140,
      seenSeq,
    };
  }

  /** A reading at each point of a pour, in the order of the walk. */
  readingsOf(pour: BenchPour): EntryEnvelope[] {
    return pour.points.map((point, index) => {
      const body = readingBody(point, mmOf(index), this.site.gaugeId);
      const entry = this.entry(pour.id, 'reading', body, 1, this.site.people.inspector.id);
      return { ...entry, body: { ...entry.body, measuredAt: entry.recordedAt } };
    });
  }

  /** A reading at each point of every pour. */
  allReadings(): EntryEnvelope[] {
    return this.site.pours.flatMap((pour) => this.readingsOf(pour));
  }
}

/** What a reading says; `measuredAt` is filled in by whoever records it. */
export function readingBody(
  point: { faceId: string; pointId: string },
  mm: number,
  instrumentId: string,
): EntryEnvelope['body'] {
  return {
    faceId: point.faceId,
    requirementId: `${point.faceId}-bars`,
    steel: 'outermost bar T1',
    pointId: point.pointId,
    spot: null,
    value: { text: String(mm), unit: 'mm', mm },
    goNoGo: null,
    instrumentId,
    phase: 'before',
    measuredAt: new Date().toISOString(),
    asFoundBar: null,
    measurer: null,
  };
}

/** The bodies in which these entries are pushed, 500 at a time. */
export function batchesOf(entries: readonly EntryEnvelope[]): string[] {
  return Array.from({ length: Math.ceil(entries.length / MOST_ENTRIES_IN_A_BATCH) }, (_, index) => {
    const batch = entries.slice(index * MOST_ENTRIES_IN_A_BATCH, (index + 1) * MOST_ENTRIES_IN_A_BATCH);
    return JSON.stringify({
      protocol: PROTOCOL,
      projectId: batch[0]?.projectId,
      deviceId: batch[0]?.deviceId,
      sentAt: new Date().toISOString(),
      entries: batch,
    });
  });
}
