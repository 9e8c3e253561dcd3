import { database } from '@/db/connection';
import { readReleasedPage, type ReleasedPage } from '@/db/read/released-page';
import { planRevisions } from '@/db/stores/pour-store';
import { releaseByToken } from '@/db/stores/release-store';
import { enterProject } from '@/db/stores/session-store';
import type { Plan } from '@/lib/inspection/plan';
import { checkChain, type ChainCheck } from '@/lib/server/check-chain';

export interface Released {
  page: ReleasedPage;
  /** The plan revision that the release rests on. */
  plan: Plan | null;
  chain: ChainCheck;
  now: string;
}

/** What anybody who holds the address of a release may read; null for an address that was never given. */
export async function readReleased(token: string): Promise<Released | null> {
  if (!/^[\w-]{16,100}$/.test(token)) return null;
  return database().transaction(async (tx) => {
    const place = await releaseByToken(tx, token);
    if (!place) return null;
    await enterProject(tx, place.projectId);
    const page = await readReleasedPage(tx, place.projectId, place.number);
    if (!page) return null;
    const plans = await planRevisions(tx, place.projectId, place.pourId);
    return {
      page,
      plan: plans.find((one) => one.revision === page.body.planRevision)?.document ?? null,
      chain: await checkChain(tx, place.projectId, place.pourId),
      now: new Date().toISOString(),
    };
  });
}
