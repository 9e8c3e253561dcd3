import type { CrewList } from '@/lib/inspection/fix-list-item';
import { PROTOCOL } from '@/lib/inspection/protocol';
import type { PullRequest, PullResponse } from '@/lib/inspection/wire';
import type { DeviceEnvironment } from '../device-environment';
import type { PersonWork } from '../person-work';
import { projectStream } from '../store/person-database';
import { askServer, type Trouble } from './ask-server';

const MOST_POURS_IN_A_PULL = 60;

export type Pulled =
  { kind: 'complete'; offeredAgain: boolean; problem: string | null } | { kind: 'stopped' } | Trouble;

/**
 * Fetches what is new in the streams of every pour kept here, page by page, until each is complete. (SPEC 20 to 24)
 * @param goOn asked before each page
 */
export async function pullStreams(
  env: DeviceEnvironment,
  work: PersonWork,
  goOn: () => boolean,
): Promise<Pulled> {
  let problem: string | null = null;
  const waitingBefore = work.outbox.size;
  for (const project of work.index?.projects ?? []) {
    const pours = project.pours.filter((pour) => work.isKept(pour)).map((pour) => pour.id);
    const groups = chunks(pours, MOST_POURS_IN_A_PULL);
    for (const group of groups.length > 0 ? groups : [[]]) {
      const answer = await pullGroup(env, work, project.id, group, goOn);
      if (answer === 'stopped') return { kind: 'stopped' };
      if (answer === null) continue;
      if (!answer.aboutRequest) return answer;
      problem = answer.sentence;
    }
  }
  return { kind: 'complete', offeredAgain: work.outbox.size > waitingBefore, problem };
}

async function pullGroup(
  env: DeviceEnvironment,
  work: PersonWork,
  projectId: string,
  pourIds: readonly string[],
  goOn: () => boolean,
): Promise<Trouble | 'stopped' | null> {
  let asked = [...pourIds];
  for (;;) {
    if (!goOn()) return 'stopped';
    const answer = await askServer(
      env,
      {
        method: 'POST',
        path: '/api/sync/pull',
        json: await requestFor(work, projectId, asked),
        timeoutMs: 60_000,
      },
      'pullResponse',
    );
    if (answer.kind === 'trouble') return answer;
    await work.setClockOffset(answer.clockOffsetMs);
    const again = await take(work, projectId, answer.data);
    if (!again.project && again.pours.length === 0) return null;
    asked = again.pours;
  }
}

async function requestFor(
  work: PersonWork,
  projectId: string,
  pourIds: readonly string[],
): Promise<PullRequest> {
  const cursorOf = async (stream: string) => {
    const cursor = await work.db.get('cursors', stream);
    return {
      after: cursor?.after ?? 0,
      headHash: cursor?.headHash ?? null,
      planRevision: cursor?.planRevision ?? 0,
    };
  };
  const { after, headHash } = await cursorOf(projectStream(projectId));
  return {
    protocol: PROTOCOL,
    projectId,
    project: { after, headHash },
    pours: await Promise.all(
      pourIds.map(async (pourId) => ({
        pourId,
        ...(await cursorOf(pourId)),
        crewList: work.crewLists.get(pourId)?.digest ?? null,
      })),
    ),
  };
}

/** Stores each stream's page; tells which have to be asked for again. */
async function take(
  work: PersonWork,
  projectId: string,
  data: PullResponse,
): Promise<{ project: boolean; pours: string[] }> {
  const takeStream = async (
    stream: string,
    page: PullResponse['project'],
    plan: PullResponse['pours'][number]['plan'],
    crewList: CrewList | null,
  ) => {
    if (!page.headKnown) {
      await work.restart(stream);
      return true;
    }
    const { entries, head, headHash, more } = page;
    await work.takePage({ stream, entries, head, headHash, complete: !more, plan, crewList });
    return more;
  };
  const project = await takeStream(projectStream(projectId), data.project, null, null);
  const pours: string[] = [];
  for (const pour of data.pours) {
    if (!pour.found) continue;
    if (await takeStream(pour.pourId, pour, pour.plan, pour.crewList ?? null)) pours.push(pour.pourId);
  }
  return { project, pours };
}

function chunks<T>(items: readonly T[], size: number): T[][] {
  return Array.from({ length: Math.ceil(items.length / size) }, (_, index) =>
    items.slice(index * size, (index + 1) * size),
  );
}
