import { readPourHeader, type PourHeader } from '@/db/read/pour-header';
import { AppError } from '@/lib/inspection/app-error';
import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { recordId } from '@/lib/inspection/primitives';
import type { Role } from '@/lib/inspection/roles';
import type { Hold, PourState, Sheet } from '@/lib/inspection/sheet-types';
import type { Action } from '@/lib/server/access';
import { checkChain, type ChainCheck } from '@/lib/server/check-chain';
import { loadSheet } from '@/lib/server/load-sheet';
import { withAccess, type PageAccess } from '@/lib/server/with-access';

export interface PourPageData {
  header: PourHeader;
  sheet: Sheet;
  holds: Hold[];
  state: PourState;
  chain: ChainCheck;
  viewer: { personId: string; role: Role; now: string; licence: string };
}

/** A pour's header, its sheet folded now, its holds, and whether its chain holds; within a page's transaction. */
export async function readPour(page: PageAccess, pourId: string, action: Action): Promise<PourPageData> {
  const { tx, person, now } = page;
  if (!recordId.safeParse(pourId).success) throw new AppError('not-found');
  const header = await readPourHeader(tx, pourId, now);
  if (!header) throw new AppError('not-found');
  const role = page.require(action, header.project.id);
  const sheet = await loadSheet(tx, pourId);
  const standing = holds(sheet, now);
  return {
    header,
    sheet,
    holds: standing,
    state: pourState(sheet, standing, now),
    chain: await checkChain(tx, header.project.id, pourId),
    viewer: { personId: person.id, role, now, licence: person.licence },
  };
}

/** What a page of one pour rests on. */
export const readPourPage = (pourId: string, action: Action = 'pour.read'): Promise<PourPageData> =>
  withAccess((page) => readPour(page, pourId, action));
