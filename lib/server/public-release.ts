import { readReleasedPage, type ReleasedPage } from '@/db/read/released-page';
import { releaseByToken } from '@/db/stores/release-store';
import { enterProject } from '@/db/stores/session-store';
import { database } from '@/db/connection';
import { checkChain, type ChainCheck } from './check-chain';

/** A release as anybody who holds its address sees it: what it says, whether it stands, whether its chain does. */
export interface PublicRelease extends ReleasedPage {
  /** Not void, and within its validity until placing started. */
  stands: boolean;
  chain: ChainCheck;
}

/**
 * Reads a release by its token, without a session: the token opens this one project, for reading this one page.
 * @param now ISO instant by which validity is judged
 * @returns null when no release has this token
 */
export async function publicRelease(token: string, now: string): Promise<PublicRelease | null> {
  if (!/^[A-Za-z0-9_-]{20,80}$/.test(token)) return null;
  return database().transaction(async (tx) => {
    const found = await releaseByToken(tx, token);
    if (!found) return null;
    await enterProject(tx, found.projectId);
    const page = await readReleasedPage(tx, found.projectId, found.number);
    if (!page) return null;
    const chain = await checkChain(tx, found.projectId, found.pourId);
    const stands = page.voided === null && (page.placedAt ?? now) <= page.validUntil;
    return { ...page, stands, chain };
  });
}
