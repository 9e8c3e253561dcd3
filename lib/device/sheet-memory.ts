import type { Plan } from '@/lib/inspection/plan';
import type { FoldMemo, RecordedEntry } from '@/lib/inspection/sheet';
import type { Hold, PourState, Sheet } from '@/lib/inspection/sheet-types';
import type { SheetEngine } from './sheet-engine';
import { projectStream } from './store/person-database';

interface Stream {
  entries: Map<string, RecordedEntry>;
  /** Highest seq of the stream that has been pulled: what a person looking at this tab can have seen. */
  head: number;
}

/** A pour as folded here, with what is pending on this device. */
export interface FoldedPour {
  sheet: Sheet | null;
  holds: Hold[];
  state: PourState;
}

interface Opened {
  projectId: string;
  engine: SheetEngine;
  memo: FoldMemo;
  sheet: Sheet | null;
  stale: boolean;
  folded: FoldedPour | null;
  /** What the holds were judged at, and a text that tells whether they came out the same. */
  judgedAt: number;
  judgement: string;
}

/** Holds depend on the time only through due times; a minute is as fine as anybody reads them. */
const JUDGE_AGAIN_MS = 60_000;

/** The opened pours of one person in memory: streams as kept on the device, folded when somebody looks. */
export class SheetMemory {
  readonly #streams = new Map<string, Stream>();
  readonly #plans = new Map<string, Plan>();
  readonly #opened = new Map<string, Opened>();

  has(stream: string): boolean {
    return this.#streams.has(stream);
  }

  isOpen(pourId: string): boolean {
    return this.#opened.has(pourId);
  }

  streams(): string[] {
    return [...this.#streams.keys()];
  }

  /** Highest seq pulled of a stream held in memory; undefined when the stream is not held. */
  headOf(stream: string): number | undefined {
    return this.#streams.get(stream)?.head;
  }

  /** The entries of a stream that is held. */
  entriesOf(stream: string): RecordedEntry[] {
    return [...(this.#streams.get(stream)?.entries.values() ?? [])];
  }

  planOf(pourId: string): Plan | null {
    return this.#plans.get(pourId) ?? null;
  }

  /** Takes a stream in as the store holds it. Entries that are unchanged keep their identity, and with it their fold. */
  load(stream: string, entries: readonly RecordedEntry[], head: number): void {
    const before = this.#streams.get(stream)?.entries;
    const now = new Map<string, RecordedEntry>();
    for (const entry of entries) {
      const known = before?.get(entry.id);
      now.set(entry.id, known && known.hash === entry.hash ? known : entry);
    }
    this.#streams.set(stream, { entries: now, head });
    this.#touch(stream);
  }

  /** Opens a pour whose two streams are loaded. */
  open(pourId: string, projectId: string, plan: Plan | null, engine: SheetEngine): void {
    if (plan) this.#plans.set(pourId, plan);
    const known = this.#opened.get(pourId);
    if (known) known.stale = true;
    else {
      this.#opened.set(pourId, {
        projectId,
        engine,
        memo: engine.newFoldMemo(),
        sheet: null,
        stale: true,
        folded: null,
        judgedAt: 0,
        judgement: '',
      });
    }
  }

  setPlan(plan: Plan): void {
    this.#plans.set(plan.pourId, plan);
    this.#touch(plan.pourId);
  }

  /** Adds or replaces entries of a stream that is held; others are read from the store when they are opened. */
  merge(stream: string, entries: readonly RecordedEntry[], head?: number): void {
    const held = this.#streams.get(stream);
    if (!held) return;
    for (const entry of entries) held.entries.set(entry.id, entry);
    if (head !== undefined) held.head = head;
    this.#touch(stream);
  }

  remove(stream: string, ids: readonly string[], head?: number): void {
    const held = this.#streams.get(stream);
    if (!held) return;
    for (const id of ids) held.entries.delete(id);
    if (head !== undefined) held.head = head;
    this.#touch(stream);
  }

  close(pourId: string): void {
    this.#opened.delete(pourId);
    this.#streams.delete(pourId);
    this.#plans.delete(pourId);
  }

  /**
   * The pour with its sheet and holds; undefined while it is not open. The same object as long as nothing in it
   * changed.
   * @param now ms, for due times
   */
  folded(pourId: string, now: number): FoldedPour | undefined {
    const opened = this.#opened.get(pourId);
    if (!opened) return undefined;
    if (opened.folded && !opened.stale && Math.abs(now - opened.judgedAt) < JUDGE_AGAIN_MS)
      return opened.folded;
    if (opened.stale) {
      const plan = this.#plans.get(pourId);
      const recorded = [
        ...(this.#streams.get(pourId)?.entries.values() ?? []),
        ...(this.#streams.get(projectStream(opened.projectId))?.entries.values() ?? []),
      ];
      opened.sheet = plan ? opened.engine.foldSheet(plan, recorded, opened.memo) : null;
    }
    const at = new Date(now).toISOString();
    const found = opened.sheet ? opened.engine.holds(opened.sheet, at) : [];
    const state = opened.sheet ? opened.engine.pourState(opened.sheet, found, at) : 'no-plan';
    const judgement = `${state}:${found.map((hold) => hold.id).join(',')}`;
    if (opened.stale || judgement !== opened.judgement || !opened.folded) {
      opened.folded = { sheet: opened.sheet, holds: found, state };
    }
    opened.stale = false;
    opened.judgedAt = now;
    opened.judgement = judgement;
    return opened.folded;
  }

  #touch(stream: string): void {
    for (const [pourId, opened] of this.#opened) {
      if (pourId === stream || projectStream(opened.projectId) === stream) opened.stale = true;
    }
  }
}
