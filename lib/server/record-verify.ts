import { allPourIds } from '@/db/stores/pour-store';
import { allProjectIds } from '@/db/stores/release-store';
import { counterOf, countEntries } from '@/db/stores/entry-store';
import { enterProject } from '@/db/stores/session-store';
import { database } from '@/db/connection';
import { checkChain } from './check-chain';

export interface Verified {
  projects: number;
  streams: number;
  entries: number;
  /** What does not fit, in words, each with its project and pour. Empty: the record is as it was written. */
  problems: string[];
  /** Head of each stream, for comparing with heads printed outside of the database. */
  heads: { projectId: string; pourId: string | null; seq: number; hash: string | null }[];
}

/** Checks every chain of the record, every plan's digest, and that no seq of a project is missing. */
export async function verifyRecord(): Promise<Verified> {
  const verified: Verified = { projects: 0, streams: 0, entries: 0, problems: [], heads: [] };
  const projectIds = await database().transaction((tx) => allProjectIds(tx));
  for (const projectId of projectIds) await verifyProject(projectId, verified);
  return verified;
}

/** One project, in one snapshot, stream after stream. */
async function verifyProject(projectId: string, verified: Verified): Promise<void> {
  await database().transaction(
    async (tx) => {
      await enterProject(tx, projectId);
      verified.projects += 1;
      let entries = 0;
      for (const pourId of [null, ...(await allPourIds(tx, projectId))]) {
        const check = await checkChain(tx, projectId, pourId);
        verified.streams += 1;
        entries += check.entries;
        verified.heads.push({ projectId, pourId, seq: check.headSeq, hash: check.headHash });
        if (check.problem) {
          verified.problems.push(
            `Project ${projectId}, ${pourId ? `pour ${pourId}` : 'own stream'}: ${check.problem}`,
          );
        }
      }
      verified.entries += entries;
      const counted = await countEntries(tx, projectId);
      const lastSeq = await counterOf(tx, projectId);
      if (counted !== lastSeq) {
        verified.problems.push(
          `Project ${projectId}: ${lastSeq} entries were written, ${counted} are there.`,
        );
      }
      if (counted !== entries) {
        verified.problems.push(
          `Project ${projectId}: ${counted - entries} entries are in no stream that is known.`,
        );
      }
    },
    { isolationLevel: 'repeatable read' },
  );
}
