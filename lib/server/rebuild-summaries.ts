import { holds } from '@/lib/inspection/holds';
import { lockRecord } from '@/db/stores/entry-store';
import { allPourIds } from '@/db/stores/pour-store';
import { allProjectIds } from '@/db/stores/release-store';
import { enterProject } from '@/db/stores/session-store';
import { dropSummaries, replaceSummaries } from '@/db/stores/summary-store';
import { database, type Tx } from '@/db/connection';
import { forgetFolded, loadFolded } from './load-sheet';
import { summariseNonconformances, summarisePour } from './summarise';

/** Pours folded at once: what they hold together has to fit into memory. */
const AT_ONCE = 25;

/**
 * Throws all summaries away and derives them anew from plans and entries; each project in one transaction with its
 * record locked, so that nobody reads half of them.
 * @param now ISO instant by which states are judged
 * @returns how many pours were summarised
 */
export async function rebuildSummaries(now: string): Promise<number> {
  forgetFolded();
  let pours = 0;
  for (const projectId of await database().transaction((tx) => allProjectIds(tx))) {
    pours += await database().transaction(async (tx) => {
      await enterProject(tx, projectId);
      await lockRecord(tx, projectId);
      await dropSummaries(tx, projectId);
      return summariseProject(tx, projectId, now);
    });
  }
  return pours;
}

async function summariseProject(tx: Tx, projectId: string, now: string): Promise<number> {
  const pourIds = await allPourIds(tx, projectId);
  for (let from = 0; from < pourIds.length; from += AT_ONCE) {
    const folds = await loadFolded(tx, projectId, pourIds.slice(from, from + AT_ONCE));
    const sheets = [...folds.values()].map(({ sheet }) => sheet);
    await replaceSummaries(
      tx,
      projectId,
      sheets.map((sheet) => summarisePour(sheet, holds(sheet, now), now)),
      sheets.flatMap(summariseNonconformances),
    );
  }
  return pourIds.length;
}
