import { AppError } from '@/lib/inspection/app-error';
import type { Plan } from '@/lib/inspection/plan';
import {
  FOLD_VERSION,
  foldSheet,
  newFoldMemo,
  type FoldMemo,
  type RecordedEntry,
} from '@/lib/inspection/sheet';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { EMPTY_STREAM, readStreams, type StreamHead } from '@/db/stores/entry-store';
import { currentPlanMarks, currentPlans, findPour, type PlanMark } from '@/db/stores/pour-store';
import type { Tx } from '@/db/connection';

/** A pour as this process last folded it: what was read, up to which heads, and what the next fold can build on. */
export interface FoldedPour {
  pourId: string;
  plan: Plan;
  planDigest: string;
  recorded: readonly RecordedEntry[];
  pourHead: StreamHead;
  projectHead: StreamHead;
  memo: FoldMemo;
  sheet: Sheet;
  foldVersion: number;
}

/** Entries that all cached pours together may hold; the pour used longest ago goes first. */
const MOST_ENTRIES = 60_000;

const cache = new Map<string, FoldedPour>();

/** Keeps a fold for the next reader. Call it once what it rests on is committed. */
export function keepFolded(folded: FoldedPour): void {
  cache.delete(folded.pourId);
  cache.set(folded.pourId, folded);
  let held = 0;
  for (const one of cache.values()) held += one.recorded.length;
  for (const [pourId, one] of cache) {
    if (held <= MOST_ENTRIES || cache.size === 1) break;
    cache.delete(pourId);
    held -= one.recorded.length;
  }
}

/** Throws every cached fold away (commands that rebuild, tests that compare). */
export const forgetFolded = (): void => cache.clear();

/**
 * The sheets of several pours of one project, as of one snapshot. A cached fold is extended by what came since; that
 * it still rests on the record is checked by the hash at its heads, so that a restored database is noticed.
 * @returns pours without a plan are left out
 */
export async function loadFolded(
  tx: Tx,
  projectId: string,
  pourIds: readonly string[],
): Promise<Map<string, FoldedPour>> {
  const marks = await currentPlanMarks(tx, projectId, pourIds);
  const unknown = marks.filter((mark) => !cached(mark));
  const plans = await currentPlans(
    tx,
    projectId,
    unknown.map((mark) => mark.pourId),
  );
  const bases = marks.flatMap((mark) => {
    const plan = plans.get(mark.pourId);
    const base = plan ? emptyFold(plan, mark.digest) : cached(mark);
    return base ? [base] : [];
  });
  const loaded = await extend(tx, projectId, bases);
  const stale = loaded
    .filter(({ stands }) => !stands)
    .map(({ base }) => emptyFold(base.plan, base.planDigest));
  const reloaded = stale.length > 0 ? await extend(tx, projectId, stale) : [];
  const folds = [...loaded.filter(({ stands }) => stands), ...reloaded].map(({ folded }) => folded);
  folds.forEach(keepFolded);
  return new Map(folds.map((folded) => [folded.pourId, folded]));
}

/**
 * The sheet of one pour.
 * @throws AppError not-found when the pour is in none of the transaction's projects
 */
export async function loadSheet(tx: Tx, pourId: string): Promise<Sheet> {
  const pour = await findPour(tx, pourId);
  const folded = pour && (await loadFolded(tx, pour.projectId, [pourId])).get(pourId);
  if (!folded) throw new AppError('not-found');
  return folded.sheet;
}

/** The cached fold, if it is one of this very plan: the digest tells a revision from one that was never committed. */
function cached(mark: PlanMark): FoldedPour | undefined {
  const folded = cache.get(mark.pourId);
  return folded?.planDigest === mark.digest && folded.foldVersion === FOLD_VERSION ? folded : undefined;
}

/** The fold of a plan on which nothing has been recorded. */
function emptyFold(plan: Plan, planDigest: string): FoldedPour {
  const memo = newFoldMemo();
  return {
    pourId: plan.pourId,
    plan,
    planDigest,
    recorded: [],
    pourHead: EMPTY_STREAM,
    projectHead: EMPTY_STREAM,
    memo,
    sheet: foldSheet(plan, [], memo),
    foldVersion: FOLD_VERSION,
  };
}

/** A fold with further entries at its end; the one given stays as it was. */
export function extendFold(folded: FoldedPour, added: readonly RecordedEntry[]): FoldedPour {
  if (added.length === 0) return folded;
  const recorded = [...folded.recorded, ...added];
  return {
    ...folded,
    recorded,
    pourHead: headOf(added, (entry) => entry.pourId !== null) ?? folded.pourHead,
    projectHead: headOf(added, (entry) => entry.pourId === null) ?? folded.projectHead,
    sheet: foldSheet(folded.plan, recorded, folded.memo),
  };
}

function headOf(entries: readonly RecordedEntry[], of: (entry: RecordedEntry) => boolean): StreamHead | null {
  const last = entries.findLast(of);
  return last ? { seq: last.seq ?? 0, hash: last.hash ?? null } : null;
}

interface Extended {
  base: FoldedPour;
  folded: FoldedPour;
  /** False: the record no longer holds what the fold rested on. */
  stands: boolean;
}

async function extend(tx: Tx, projectId: string, bases: readonly FoldedPour[]): Promise<Extended[]> {
  if (bases.length === 0) return [];
  const entries = await readStreams(tx, projectId, [
    ...bases.map((base) => ({ pourId: base.pourId, from: base.pourHead.seq })),
    { pourId: null, from: Math.min(...bases.map((base) => base.projectHead.seq)) },
  ]);
  const streams = new Map<string | null, RecordedEntry[]>();
  for (const entry of entries) {
    const stream = streams.get(entry.pourId);
    if (stream) stream.push(entry);
    else streams.set(entry.pourId, [entry]);
  }
  return bases.map((base) => {
    const pour = after(streams.get(base.pourId) ?? [], base.pourHead);
    const project = after(streams.get(null) ?? [], base.projectHead);
    if (!pour || !project) return { base, folded: base, stands: false };
    const added = [...pour, ...project].sort((a, b) => (a.seq ?? 0) - (b.seq ?? 0));
    return { base, folded: extendFold(base, added), stands: true };
  });
}

/** What a stream holds after a head; null when the head itself is not in it, or is another entry. */
function after(stream: readonly RecordedEntry[], head: StreamHead): RecordedEntry[] | null {
  if (head.seq === 0) return [...stream];
  const at = stream.findIndex((entry) => entry.seq === head.seq);
  if (at < 0 || stream[at]?.hash !== head.hash) return null;
  return stream.slice(at + 1);
}
