import { v7 as uuid } from 'uuid';
import { AppError } from '@/lib/inspection/app-error';
import { ENTRY_VERSION, type BodyOf, type EntryEnvelope, type EntryType } from '@/lib/inspection/entry';
import { holds } from '@/lib/inspection/holds';
import { placedWithoutRelease, voidsFollowing } from '@/lib/inspection/release-voids';
import type { Role } from '@/lib/inspection/roles';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import {
  advanceCounters,
  insertEntries,
  lockRecord,
  streamHead,
  type SealedEntry,
  type StreamHead,
} from '@/db/stores/entry-store';
import { replaceSummaries } from '@/db/stores/summary-store';
import type { Tx } from '@/db/connection';
import { entryHash } from './entry-hash';
import { extendFold, keepFolded, loadFolded, type FoldedPour } from './load-sheet';
import { followUp } from './follow-up';
import { summariseNonconformances, summarisePour } from './summarise';

/** The device that entries name which the server itself writes. */
export const SERVER_DEVICE = '00000000-0000-7000-8000-000000000000';

/** Who a written entry is by: the person whose request causes it, with the role held now. */
export interface Author {
  id: string;
  role: Role;
}

interface PourInHand {
  /** As it was when the record was opened: what is new is told from it. */
  before: FoldedPour;
  folded: FoldedPour;
  /** Sealed, and not folded in yet. */
  pending: SealedEntry[];
}

/**
 * The record of one project, locked for writing until the transaction ends. Entries are sealed into it one after the
 * other (`seq`, hash of their stream's chain) and written together on `close`, with everything that follows from
 * them. Nothing else writes to `entries`.
 */
export class OpenRecord {
  private readonly pours = new Map<string, PourInHand>();
  private readonly sealed: SealedEntry[] = [];
  private projectHead: StreamHead | null = null;

  private constructor(
    readonly tx: Tx,
    readonly projectId: string,
    /** The server's clock, ISO 8601: when what is sealed here was received. */
    readonly now: string,
    private readonly author: Author,
    private lastSeq: number,
    private lastReleaseNumber: number,
  ) {}

  /** @throws AppError not-found when the project is none of the transaction's */
  static async open(tx: Tx, projectId: string, author: Author, now: string): Promise<OpenRecord> {
    const counters = await lockRecord(tx, projectId);
    if (!counters) throw new AppError('not-found');
    return new OpenRecord(tx, projectId, now, author, counters.lastSeq, counters.lastReleaseNumber);
  }

  /** The `seq` that the next sealed entry gets. */
  get nextSeq(): number {
    return this.lastSeq + 1;
  }

  /** Loads the sheets of these pours; those without a plan are left out. */
  async load(pourIds: readonly string[]): Promise<void> {
    const folds = await loadFolded(this.tx, this.projectId, pourIds);
    for (const [pourId, folded] of folds) this.pours.set(pourId, { before: folded, folded, pending: [] });
  }

  /** Loads what entries of the project's own stream need: its head. */
  async loadProjectStream(): Promise<void> {
    this.projectHead ??= await streamHead(this.tx, this.projectId, null);
  }

  has(pourId: string): boolean {
    return this.pours.has(pourId);
  }

  /** The sheet of a loaded pour, with everything sealed so far. */
  sheet(pourId: string): Sheet {
    return this.folded(pourId).sheet;
  }

  /** The sheet as last folded: what was sealed since is not in it. */
  sheetAsFolded(pourId: string): Sheet {
    return this.inHand(pourId).folded.sheet;
  }

  /** Hash of the last entry of a loaded pour's stream. */
  headHash(pourId: string): string | null {
    return this.folded(pourId).pourHead.hash;
  }

  nextReleaseNumber(): number {
    this.lastReleaseNumber += 1;
    return this.lastReleaseNumber;
  }

  /** Gives an entry its place in the record. */
  seal(received: EntryEnvelope, authorRole: Role): SealedEntry {
    const head = this.headOf(received.pourId);
    const receipt = { seq: this.nextSeq, receivedAt: this.now, authorRole, prevHash: head.hash };
    const sealed: SealedEntry = { ...received, ...receipt, hash: entryHash(received, receipt) };
    this.lastSeq = sealed.seq;
    this.sealed.push(sealed);
    if (received.pourId === null) {
      this.projectHead = { seq: sealed.seq, hash: sealed.hash };
      // Every pour's fold merges the project's own stream.
      for (const pour of this.pours.values()) pour.pending.push(sealed);
    } else {
      this.inHand(received.pourId).pending.push(sealed);
    }
    return sealed;
  }

  /** Seals an entry that the server writes of its own accord. */
  write<T extends EntryType>(pourId: string, type: T, body: BodyOf<T>): SealedEntry {
    const sheet = this.sheet(pourId);
    return this.seal(
      {
        id: uuid(),
        projectId: this.projectId,
        pourId,
        type,
        v: ENTRY_VERSION,
        body: body as EntryEnvelope['body'],
        planRevision: sheet.plan.revision,
        authorId: this.author.id,
        deviceId: SERVER_DEVICE,
        deviceSeq: this.nextSeq,
        recordedAt: this.now,
        clockOffsetMs: 0,
        seenSeq: this.lastSeq,
      },
      this.author.role,
    );
  }

  /**
   * Writes what was sealed and all that follows from it: voids, the note that placing began without a release,
   * summaries, registers, jobs. The folds are kept for the next reader once the transaction is committed.
   * @param of `loaded` asks for what follows from the time alone, in pours to which nothing was added
   * @returns how many entries were written
   */
  async close(of: 'touched' | 'loaded' = 'touched'): Promise<number> {
    const touched = [...this.pours.values()].filter(
      (pour) => of === 'loaded' || pour.folded !== pour.before || pour.pending.length > 0,
    );
    for (const { before } of touched) this.writeConsequences(before.pourId);
    if (this.sealed.length === 0) return 0;

    const after = touched.map((pour) => ({
      sheet: this.sheet(pour.before.pourId),
      before: holds(pour.before.sheet, this.now),
      after: holds(this.sheet(pour.before.pourId), this.now),
    }));
    await insertEntries(this.tx, this.sealed);
    await advanceCounters(this.tx, this.projectId, {
      lastSeq: this.lastSeq,
      lastReleaseNumber: this.lastReleaseNumber,
    });
    await replaceSummaries(
      this.tx,
      this.projectId,
      after.map((pour) => summarisePour(pour.sheet, pour.after, this.now)),
      after.flatMap((pour) => summariseNonconformances(pour.sheet)),
    );
    await followUp(this.tx, this.projectId, this.sealed, newHolds(after));
    const folds = touched.map((pour) => pour.folded);
    void this.tx.executionPromise.then(
      () => folds.forEach(keepFolded),
      () => undefined,
    );
    return this.sealed.length;
  }

  private writeConsequences(pourId: string): void {
    // A void sets signatures aside, and a release of another part may rest on the same ones: until none follows.
    for (;;) {
      const [body] = voidsFollowing(this.sheet(pourId), this.now);
      if (!body) break;
      this.write(pourId, 'release-void', body);
    }
    const placement = placedWithoutRelease(this.sheet(pourId));
    if (placement) {
      this.write(pourId, 'placing-without-release', { at: placement.body.at, placementId: placement.id });
    }
  }

  private folded(pourId: string): FoldedPour {
    const pour = this.inHand(pourId);
    if (pour.pending.length > 0) {
      pour.folded = extendFold(pour.folded, pour.pending);
      pour.pending = [];
    }
    return pour.folded;
  }

  private headOf(pourId: string | null): StreamHead {
    if (pourId !== null) {
      const { pending, folded } = this.inHand(pourId);
      const last = pending.findLast((entry) => entry.pourId === pourId);
      return last ? { seq: last.seq, hash: last.hash } : folded.pourHead;
    }
    if (!this.projectHead) throw new Error('The project stream was not loaded.');
    return this.projectHead;
  }

  private inHand(pourId: string): PourInHand {
    const pour = this.pours.get(pourId);
    if (!pour) throw new AppError('not-found');
    return pour;
  }
}

/** Holds that were not there before, by pour. */
function newHolds(pours: { sheet: Sheet; before: Hold[]; after: Hold[] }[]): Map<string, Hold[]> {
  return new Map(
    pours.map(({ sheet, before, after }) => {
      const known = new Set(before.map((hold) => hold.id));
      return [sheet.pourId, after.filter((hold) => !known.has(hold.id))];
    }),
  );
}
