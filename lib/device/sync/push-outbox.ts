import { MOST_ENTRIES_IN_A_BATCH, PROTOCOL } from '@/lib/inspection/protocol';
import type { DeviceEnvironment } from '../device-environment';
import type { PersonWork } from '../person-work';
import type { OutboxRecord } from '../store/person-database';
import type { Settled } from '../store/settle-outcomes';
import { askServer, type Trouble } from './ask-server';

/** A batch is cut before it grows beyond this, so that a slow line gets through one at all. */
const MOST_CHARACTERS = 600_000;

export type Pushed =
  | { kind: 'all-offered'; sent: number; problem: string | null }
  | { kind: 'other-person' }
  | { kind: 'stopped' }
  | Trouble;

/**
 * Offers the outbox, oldest first, in batches of one project. Ends at the first trouble with the line; what the server
 * objects to as a whole is offered in halves until the one entry it is about is found. (SPEC 6 to 11)
 * While one batch is on its way, the answer to the one before is written and the one after it is read.
 * @param goOn asked before each batch: false once this person's work is no longer open
 */
export async function pushOutbox(
  env: DeviceEnvironment,
  work: PersonWork,
  goOn: () => boolean,
): Promise<Pushed> {
  const batches = new BatchReader(work);
  let sent = 0;
  let problem: string | null = null;
  let settling: Promise<Settled> | null = null;
  /** @returns false when the answer said that somebody else is signed in */
  const taken = (settled: Settled | null): boolean => {
    sent += settled?.confirmedIds.length ?? 0;
    return !settled?.otherAuthor;
  };
  for (;;) {
    const batch = await batches.next();
    if (!batch || !goOn()) {
      if (!taken(await settling)) return { kind: 'other-person' };
      return batch ? { kind: 'stopped' } : { kind: 'all-offered', sent, problem };
    }
    const [answer, settled] = await Promise.all([sendBatch(env, work, batch), settling]);
    settling = null;
    if (!taken(settled)) return { kind: 'other-person' };
    if (answer.kind === 'trouble') {
      if (!answer.aboutRequest) return answer;
      problem = answer.sentence;
      if (batch.length > 1 && isAboutContent(answer)) batches.inHalves(batch);
      else for (const record of batch) await work.noteProblem(record, answer.sentence);
      continue;
    }
    await work.setClockOffset(answer.clockOffsetMs);
    settling = work.settle(batch, answer.data.outcomes);
    // What it says is heard at the next turn.
    settling.catch(() => undefined);
  }
}

/** Reads the outbox page by page, always one ahead: a read would wait for the answers that are being written. */
class BatchReader {
  #queue: OutboxRecord[][] = [];
  #ahead: Promise<OutboxRecord[]>;

  constructor(private readonly work: PersonWork) {
    this.#ahead = this.#after(0);
  }

  async next(): Promise<OutboxRecord[] | undefined> {
    if (this.#queue.length === 0) {
      const records = await this.#ahead;
      const last = records.at(-1);
      if (!last) return undefined;
      this.#ahead = this.#after(last.deviceSeq);
      this.#queue = batchesOf(records);
    }
    return this.#queue.shift();
  }

  /** Puts a batch back as two. */
  inHalves(batch: OutboxRecord[]): void {
    const middle = Math.ceil(batch.length / 2);
    this.#queue.unshift(batch.slice(0, middle), batch.slice(middle));
  }

  #after(deviceSeq: number): Promise<OutboxRecord[]> {
    const records = this.work.outboxAfter(deviceSeq, MOST_ENTRIES_IN_A_BATCH);
    // Sending may end before anybody asks for it.
    records.catch(() => undefined);
    return records;
  }
}

/** The request as such was not read: one entry in it may be why. */
const isAboutContent = (trouble: Trouble): boolean =>
  trouble.status === 400 || trouble.status === 413 || trouble.status === 422;

function sendBatch(env: DeviceEnvironment, work: PersonWork, batch: readonly OutboxRecord[]) {
  return askServer(
    env,
    {
      method: 'POST',
      path: '/api/sync/push',
      json: {
        protocol: PROTOCOL,
        projectId: batch[0]?.envelope.projectId,
        deviceId: work.deviceId,
        sentAt: new Date(env.now()).toISOString(),
        entries: batch.map((record) => record.envelope),
      },
      timeoutMs: 60_000,
    },
    'pushResponse',
  );
}

/** One project each, in the order in which they were made. */
function batchesOf(records: readonly OutboxRecord[]): OutboxRecord[][] {
  const byProject = new Map<string, OutboxRecord[]>();
  for (const record of records) {
    const list = byProject.get(record.envelope.projectId) ?? [];
    list.push(record);
    byProject.set(record.envelope.projectId, list);
  }
  return [...byProject.values()].flatMap(cutBySize);
}

function cutBySize(records: readonly OutboxRecord[]): OutboxRecord[][] {
  const batches: OutboxRecord[][] = [];
  let batch: OutboxRecord[] = [];
  let characters = 0;
  for (const record of records) {
    // Only drawn signatures and long texts come near: the rest need not be measured to the letter.
    const size = record.envelope.type === 'signature' ? JSON.stringify(record.envelope.body).length : 700;
    if (batch.length > 0 && characters + size > MOST_CHARACTERS) {
      batches.push(batch);
      batch = [];
      characters = 0;
    }
    batch.push(record);
    characters += size;
  }
  if (batch.length > 0) batches.push(batch);
  return batches;
}
