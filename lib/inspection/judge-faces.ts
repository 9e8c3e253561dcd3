import { neighboursOf } from '@/lib/concrete/reading-points';
import { saw } from './causality';
import { subjectKey, type Facts } from './facts';
import { judgePoint, type JudgingContext, type PointPlace } from './judge-point';
import type { Plan } from './plan';
import type { FaceState, PointState } from './sheet-types';

/** Judgements of the last fold, by place: what has no new fact is not judged again. */
export type PointMemo = Map<string, { version: string; state: PointState }>;

/** What all points depend on beside their own readings; a change of one of these judges every point again. */
function sharedVersion(facts: Facts, plan: Plan): string {
  const of = (subject: string) => facts.versions.get(subject) ?? 0;
  return [
    plan.revision,
    of('correction'),
    of('block-check'),
    of('instrument-status'),
    of('disposition'),
    of('nonconformance'),
    of('photo'),
  ].join('.');
}

/** Judges every face of the plan: its points, and the spot readings taken on it. */
export function judgeFaces(context: JudgingContext, memo: PointMemo): FaceState[] {
  const { plan, facts } = context;
  const shared = sharedVersion(facts, plan);
  const judge = (place: PointPlace): PointState => {
    const version = `${shared}/${facts.versions.get(subjectKey({ kind: 'point', id: place.key })) ?? 0}`;
    const known = memo.get(place.key);
    if (known?.version === version) return known.state;
    const state = judgePoint(context, place);
    memo.set(place.key, { version, state });
    return state;
  };
  const spotsByFace = spotPlaces(context);
  return plan.elements.flatMap((element) =>
    element.faces.map((face) => {
      const points = face.points.map((point) =>
        judge({ element, face, point, key: point.id, label: point.label, xMm: point.xMm, yMm: point.yMm }),
      );
      const spots = (spotsByFace.get(face.id) ?? []).map(judge);
      const asked = askNeighbours(context, points);
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
  for (const entry of facts.listed.reading ?? []) {
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

/**
 * A correction moves more than the bar it mends: the nearest points of what it reached are asked for again. Their
 * readings stay in their round, so that nothing less favourable is erased by being a neighbour.
 */
function askNeighbours(context: JudgingContext, points: PointState[]): PointState[] {
  if (context.corrections.length === 0) return points;
  const asked = new Set<string>();
  for (const { entry, keys } of context.corrections) {
    const reached = points.filter(
      (state) =>
        keys.has(subjectKey({ kind: 'point', id: state.key })) ||
        (keys.has(subjectKey({ kind: 'face', id: state.faceId })) &&
          state.readings.some(
            (reading) => reading.judged.verdict === 'not-met' && saw(entry, reading.entry),
          )),
    );
    const reachedKeys = new Set(reached.map((state) => state.key));
    for (const state of reached) {
      for (const other of neighboursOf(state, points)) {
        if (reachedKeys.has(other.key)) continue;
        const readSince = other.readings.some(
          (reading) =>
            reading.current !== null &&
            reading.judged.verdict !== 'not-verified' &&
            saw(reading.entry, entry),
        );
        if (!readSince) asked.add(other.key);
      }
    }
  }
  return points.map((state) =>
    asked.has(state.key) && state.recheck === null ? { ...state, recheck: 'neighbour' as const } : state,
  );
}
