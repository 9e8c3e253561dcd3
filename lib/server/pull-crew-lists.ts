import { crewListOf } from '@/lib/inspection/crew-list';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import { holds } from '@/lib/inspection/holds';
import type { PullRequest } from '@/lib/inspection/wire';
import type { Tx } from '@/db/connection';
import { canonical, sha256 } from './entry-hash';
import { loadFolded } from './load-sheet';

/**
 * The crew's lists of some pours, as of now.
 * @param pours pours that the person is assigned to
 * @returns null for a list that the device holds already; a pour without a plan has none
 */
export async function pullCrewLists(
  tx: Tx,
  projectId: string,
  pours: PullRequest['pours'],
  now: string,
): Promise<Map<string, CrewList | null>> {
  const folded = await loadFolded(
    tx,
    projectId,
    pours.map((pour) => pour.pourId),
  );
  const lists = new Map<string, CrewList | null>();
  for (const { pourId, crewList: held } of pours) {
    const sheet = folded.get(pourId)?.sheet;
    if (!sheet) continue;
    const list = crewListOf(sheet, holds(sheet, now));
    const digest = sha256(canonical(list));
    lists.set(pourId, digest === held ? null : { digest, ...list });
  }
  return lists;
}
