import { issuePlan } from '@/lib/inspection/issue-plan';
import { foldSheet, newFoldMemo, type RecordedEntry } from '@/lib/inspection/sheet';
import { v7 as uuid } from 'uuid';
import type { Line } from '../bench';
import { limitRow, median } from '../row';
import { readingBody } from '../world/readings';
import { deckPlan } from '../world/site';

const ENTRIES = 10_000;
const TIMES = 9;

/** A pour of 2,000 points, each read five times in sight of what was read before. */
function readDeck(): { plan: ReturnType<typeof issuePlan>; recorded: RecordedEntry[] } {
  const pourId = uuid();
  const [projectId, authorId, deviceId, gauge] = [uuid(), uuid(), uuid(), uuid()];
  const issuedAt = '2026-11-30T08:00:00.000Z';
  const plan = issuePlan(deckPlan({ faces: 5, pointsOfFace: 400 }), {
    pourId,
    revision: 1,
    issuedAt,
    authorId,
    reason: 'First issue',
  });
  const points = plan.elements.flatMap((element) =>
    element.faces.flatMap((face) => face.points.map(({ id }) => ({ faceId: face.id, pointId: id }))),
  );
  const recorded = Array.from({ length: ENTRIES + 1 }, (_, index): RecordedEntry => {
    const point = points[index % points.length];
    if (!point) throw new Error('The deck has no points.');
    const at = new Date(Date.parse(issuedAt) + index * 20_000).toISOString();
    return {
      id: uuid(),
      projectId,
      pourId,
      type: 'reading',
      v: 1,
      body: { ...readingBody(point, 46 + (index % 11), gauge), measuredAt: at },
      planRevision: 1,
      authorId,
      authorRole: 'inspector',
      deviceId,
      deviceSeq: index + 1,
      recordedAt: at,
      clockOffsetMs: 0,
      seenSeq: index,
      seq: index + 1,
      receivedAt: at,
      hash: '0'.repeat(64),
      prevHash: null,
    };
  });
  return { plan, recorded };
}

/** Folding a long record afresh, and going on from there by one entry. */
export const fold: Line = async () => {
  const { plan, recorded } = readDeck();
  const timed = (work: () => unknown) => {
    const started = performance.now();
    work();
    return performance.now() - started;
  };
  const afresh: number[] = [];
  const oneMore: number[] = [];
  for (let time = 0; time < TIMES; time += 1) {
    // An entry is typed once for as long as its object lives: a record just read from a store is made of new ones.
    const read = structuredClone(recorded);
    const memo = newFoldMemo();
    afresh.push(timed(() => foldSheet(plan, read.slice(0, ENTRIES), memo)));
    oneMore.push(timed(() => foldSheet(plan, read, memo)));
  }
  const note = `median of ${TIMES}; 2,000 points read five times`;
  return [
    limitRow({ work: 'fold of 10,000 entries', unit: 'ms', value: median(afresh), most: 50, note }),
    limitRow({ work: 'then one entry more', unit: 'ms', value: median(oneMore), most: 1 }),
  ];
};
