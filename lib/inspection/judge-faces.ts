import { neighboursOf } from '@/lib/concrete/reading-points';
import { saw } from './causality';
import type { EntryOf } from './entry';
import { subjectKey, type Facts } from './facts';
import { judgePoint, type JudgingContext, type PointPlace } from './judge-point';
import type { Plan } from './plan';
import type { FaceState, PointState } from './sheet-types';

/** Judgements of the last fold, by place: what has no new fact is not judged again. */
export interface PointMemo {
  states: Map<string, { version: string; state: PointState }>;
  /** Keys of the points next to a point, which only a plan can change. */
  neighbours: Map<string, readonly string[]>;
  revision: number;
}
export const newPointMemo = (): PointMemo => ({ states: new Map(), neighbours: new Map(), revision: 0 });

/** What all points depend on beside their own readings; a change of one of these judges every point again. */
function sharedVersion(facts: Facts, plan: Plan): string {
  const of = (type: string) => facts.versions.get(type) ?? 0;
  return [
    plan.revision,
    of('block-check'),
    of('instrument-status'),
    of('disposition'),
    // A withdrawn nonconformance takes its disposition with it.
    of('disposition') > 0 ? of('nonconformance') : 0,
    // A photograph changes a judgement only where an amendment rests on one.
    facts.amendmentsWithPhoto > 0 ? facts.photoIds.size : 0,
  ].join('.');
}

/** Judges every face of the plan: its points, and the spot readings taken on it. */
export function judgeFaces(context: JudgingContext, memo: PointMemo): FaceState[] {
  const { plan, facts } = context;
  const shared = sharedVersion(facts, plan);
  if (memo.revision !== plan.revision) {
    memo.neighbours.clear();
    memo.revision = plan.revision;
  }
  const judge = (place: PointPlace): PointState => {
    const corrected = [pointSubject(place.key), faceSubject(place.face.id)].map(
      (key) => context.corrections.of(key).length,
    );
    const version = `${shared}/${corrected.join('.')}/${facts.placeVersions.get(place.key) ?? 0}`;
    const known = memo.states.get(place.key);
    if (known?.version === version) return known.state;
    const state = judgePoint(context, place);
    memo.states.set(place.key, { version, state });
    return state;
  };
  const spotsByFace = spotPlaces(context);
  return plan.elements.flatMap((element) =>
    element.faces.map((face) => {
      const points = face.points.map((point) =>
        judge({ element, face, point, key: point.id, label: point.label, xMm: point.xMm, yMm: point.yMm }),
      );
      const spots = (spotsByFace.get(face.id) ?? []).map(judge);
      const asked = askNeighbours(context, face.id, points, memo.neighbours);
      const read = (kind: 'drawn' | 'chosen') =>
        asked.filter((state) => state.point?.kind === kind && state.governing.length > 0).length;
      const total = (kind: 'drawn' | 'chosen') => face.points.filter((point) => point.kind === kind).length;
      return {
        elementId: element.id,
        faceId: face.id,
        points: asked,
        spots,
        drawnRead: read('drawn'),
        drawnTotal: total('drawn'),
        chosenRead: read('chosen'),
        chosenTotal: total('chosen'),
      };
    }),
  );
}

/** Spot readings make a place of their own; later readings of that place name it as `spot:<id of the first>`. */
function spotPlaces({ plan, facts }: JudgingContext): Map<string, PointPlace[]> {
  const places = new Map<string, PointPlace[]>();
  let count = 0;
  for (const entry of facts.spots) {
    if (entry.body.spot === null) continue;
    const element = plan.elements.find((one) => one.faces.some((face) => face.id === entry.body.faceId));
    const face = element?.faces.find((one) => one.id === entry.body.faceId);
    if (!element || !face) continue;
    count += 1;
    const place = {
      element,
      face,
      point: null,
      key: `spot:${entry.id}`,
      label: `spot ${count}`,
      xMm: entry.body.spot.xMm,
      yMm: entry.body.spot.yMm,
    };
    places.set(face.id, [...(places.get(face.id) ?? []), place]);
  }
  return places;
}

const pointSubject = (key: string) => subjectKey({ kind: 'point', id: key });
const faceSubject = (faceId: string) => subjectKey({ kind: 'face', id: faceId });

/**
 * A correction moves more than the bar it mends: the nearest points of what it reached are asked for again. Their
 * readings stay in their round, so that nothing less favourable is erased by being a neighbour.
 */
function askNeighbours(
  context: JudgingContext,
  faceId: string,
  points: PointState[],
  memo: PointMemo['neighbours'],
): PointState[] {
  const ofFace = context.corrections.of(faceSubject(faceId));
  const reached = new Map<EntryOf<'correction'>, Set<string>>();
  for (const state of points) {
    const own = context.corrections.of(pointSubject(state.key));
    for (const { entry } of [...own, ...ofFace.filter(({ entry }) => putRight(state, entry))]) {
      const known = reached.get(entry);
      if (known) known.add(state.key);
      else reached.set(entry, new Set([state.key]));
    }
  }
  if (reached.size === 0) return points;
  const byKey = new Map(points.map((state) => [state.key, state]));
  const asked = new Set<string>();
  for (const [correction, keys] of reached) {
    for (const key of keys) {
      for (const next of nextTo(key, byKey, points, memo)) {
        if (keys.has(next) || asked.has(next)) continue;
        if (!readSince(byKey.get(next), correction)) asked.add(next);
      }
    }
  }
  return points.map((state) =>
    asked.has(state.key) && state.recheck === null ? { ...state, recheck: 'neighbour' as const } : state,
  );
}

/** A correction of a whole face puts right what its author could see failing there. */
const putRight = (state: PointState, correction: EntryOf<'correction'>): boolean =>
  state.readings.some((reading) => reading.judged.verdict === 'not-met' && saw(correction, reading.entry));

const readSince = (state: PointState | undefined, correction: EntryOf<'correction'>): boolean =>
  state?.readings.findLast(
    (reading) =>
      reading.current !== null && reading.judged.verdict !== 'not-verified' && saw(reading.entry, correction),
  ) !== undefined;

function nextTo(
  key: string,
  byKey: ReadonlyMap<string, PointState>,
  points: readonly PointState[],
  memo: PointMemo['neighbours'],
): readonly string[] {
  const known = memo.get(key);
  if (known) return known;
  const state = byKey.get(key);
  const found = state ? neighboursOf(state, points).map((other) => other.key) : [];
  memo.set(key, found);
  return found;
}
