import { withUnit } from '@/lib/concrete/length';
import { isOtherBar } from './judge-point';
import type { Face, Plan, Requirement } from './plan';
import type { FaceState, Hold, PointState, ReadingState, Sheet } from './sheet-types';

/** Fewest verified readings that each requirement of a face needs (common practice; the plan may ask for more points). */
export const FEWEST_READINGS = 5;

interface Place {
  plan: Plan;
  face: Face;
  elementId: string;
  where: string;
}

const listed = (labels: string[], most = 8): string =>
  labels.length <= most
    ? labels.join(', ')
    : `${labels.slice(0, most).join(', ')} and ${labels.length - most} more`;

const earliest = (times: string[]): string | null =>
  times.reduce<string | null>((least, time) => (least === null || time < least ? time : least), null);

function placeOf(sheet: Sheet, state: FaceState): Place | null {
  const element = sheet.plan.elements.find((one) => one.id === state.elementId);
  const face = element?.faces.find((one) => one.id === state.faceId);
  return element && face
    ? { plan: sheet.plan, face, elementId: element.id, where: `${element.mark}, ${face.name}` }
    : null;
}

/** Holds that come from cover readings: not met, missing, not verified, to be read again, in conflict. */
export function coverHolds(sheet: Sheet): Hold[] {
  return sheet.faces.flatMap((state) => {
    const place = placeOf(sheet, state);
    if (!place) return [];
    const all = [...state.points, ...state.spots];
    return [
      ...place.face.requirements.flatMap((requirement) => notMet(sheet, place, requirement, all)),
      ...depthNotMet(place, all),
      ...otherBars(place, all),
      ...again(place, all),
      ...notVerified(place, all),
      ...missing(place, state),
      ...conflicts(place, all),
    ];
  });
}

/** Governing readings of a point that fail, are not accepted by a disposition, and are not already sent back for a recheck. */
const failing = (point: PointState): ReadingState[] =>
  point.governing.filter((reading) => reading.judged.verdict === 'not-met' && reading.acceptedBy === null);

function notMet(sheet: Sheet, place: Place, requirement: Requirement, points: PointState[]): Hold[] {
  // What the engineer has been asked about stands apart from what only has to be put right.
  const groups = new Map<
    string,
    { round: number; asked: boolean; found: { point: PointState; reading: ReadingState }[] }
  >();
  for (const point of points) {
    if (point.recheck === 'failed') continue;
    const asked = decisionAskedFor(sheet, point);
    for (const reading of failing(point)) {
      if (reading.requirement?.id !== requirement.id) continue;
      const { round } = reading;
      const key = asked ? `${round}:asked` : `${round}`;
      const group = groups.get(key) ?? { round, asked, found: [] };
      group.found.push({ point, reading });
      groups.set(key, group);
    }
  }
  return [...groups].map(([key, { round, asked, found }]) => {
    const worst = found.reduce((least, one) =>
      (one.reading.judged.marginMm ?? 0) < (least.reading.judged.marginMm ?? 0) ? one : least,
    );
    const mm = worst.reading.current?.value?.mm ?? null;
    const high = worst.reading.judged.side === 'high';
    const limit =
      high && requirement.mostAcceptedMm !== null ? requirement.mostAcceptedMm : requirement.leastAcceptedMm;
    const shown = mm === null ? 'block does not pass' : withUnit(mm, place.plan.units, limit);
    return {
      id: `cover-not-met:${place.face.id}:${requirement.id}:${key}`,
      kind: 'cover-not-met',
      title: `Cover ${shown}, accepted ${high ? 'to' : 'from'} ${withUnit(limit, place.plan.units)}`,
      detail: `${found.length === 1 ? 'One point' : `${found.length} points`} to ${requirement.steel}: ${listed(found.map(({ point }) => point.label))}${round > 1 ? ` (round ${round})` : ''}.`,
      elementId: place.elementId,
      faceId: place.face.id,
      where: `${place.where}, ${listed(found.map(({ point }) => point.label))}`,
      since: earliest(found.map(({ reading }) => reading.entry.recordedAt)),
      clearedBy: asked ? 'engineer' : 'superintendent',
      need: asked
        ? 'The engineer decides on these readings, or they are reworked and read again.'
        : 'Put it right and report the correction, then the inspector reads again; or raise a nonconformance for the engineer.',
      subjects: found.map(({ point }) => ({ kind: 'point', id: point.key })),
    };
  });
}

/** Readings of a point's latest round: the one with most cover decides on depth, which need not be the one that governs cover. */
function latestOf(point: PointState): ReadingState[] {
  const standing = point.readings.filter(
    (reading) => reading.current !== null && reading.judged.verdict !== 'not-verified',
  );
  const latest = Math.max(...standing.map((reading) => reading.round));
  return standing.filter((reading) => reading.round === latest);
}

/** Low effective depth is a hold of its own: a swapped layer can pass the cover and fail this. */
function depthNotMet(place: Place, points: PointState[]): Hold[] {
  const isLow = (reading: ReadingState) =>
    reading.depth?.verdict === 'not-met' && reading.acceptedBy === null;
  const low = points.filter((point) => point.recheck !== 'failed' && latestOf(point).some(isLow));
  const first = low[0] && latestOf(low[0]).find(isLow);
  if (!first) return [];
  return [
    {
      id: `effective-depth:${place.face.id}:${Math.max(...low.map((point) => point.roundAsked))}`,
      kind: 'effective-depth',
      title: 'Effective depth is low',
      detail: first.depth?.reason ?? '',
      ...placed(place, low),
      clearedBy: 'superintendent',
      need: 'Put the steel right and have it read again, or ask the engineer.',
    },
  ];
}

/** A bar that is not the one drawn departs from the drawing, even where it is larger and its cover is met. */
function otherBars(place: Place, points: PointState[]): Hold[] {
  const departing = (reading: ReadingState) =>
    reading.requirement !== null &&
    reading.acceptedBy === null &&
    isOtherBar(reading.requirement, reading.current?.asFoundBar ?? null);
  const found = points.filter((point) => point.recheck !== 'failed' && latestOf(point).some(departing));
  const first = found[0] && latestOf(found[0]).find(departing);
  if (!first) return [];
  return [
    {
      id: `bar-departs:${place.face.id}:${Math.max(...found.map((point) => point.roundAsked))}`,
      kind: 'bar-departs',
      title: `Bar ${first.current?.asFoundBar ?? ''} found, ${first.requirement?.barDesignation ?? ''} planned`,
      detail: 'Another size is a departure from the drawing, a larger one too.',
      ...placed(place, found),
      clearedBy: 'engineer',
      need: 'The engineer decides on it, or the bar is changed and read again.',
    },
  ];
}

const placed = (place: Place, points: PointState[]) => ({
  elementId: place.elementId,
  faceId: place.face.id,
  where: `${place.where}, ${listed(points.map((point) => point.label))}`,
  since: earliest(points.flatMap((point) => point.readings.map((one) => one.entry.recordedAt))),
  subjects: points.map((point) => ({ kind: 'point' as const, id: point.key })),
});

function decisionAskedFor(sheet: Sheet, point: PointState): boolean {
  return sheet.nonconformances.some(
    (state) =>
      (state.status === 'decision-asked' || state.status === 'open') &&
      state.entry.body.about.some(
        (about) =>
          (about.kind === 'point' && about.id === point.key) ||
          (about.kind === 'entry' && point.readings.some((reading) => reading.entry.id === about.id)),
      ) &&
      (state.entry.body.proposal ?? '') !== '',
  );
}

function again(place: Place, points: PointState[]): Hold[] {
  const failed = points.filter((point) => point.recheck === 'failed');
  const neighbours = points.filter((point) => point.recheck === 'neighbour');
  if (failed.length + neighbours.length === 0) return [];
  const parts = [
    failed.length > 0 ? `reworked: ${listed(failed.map((one) => one.label))}` : '',
    neighbours.length > 0 ? `next to them: ${listed(neighbours.map((one) => one.label))}` : '',
  ].filter(Boolean);
  const round = Math.max(...points.map((one) => one.roundAsked));
  return [
    {
      id: `recheck-awaited:${place.face.id}:${round}`,
      kind: 'recheck-awaited',
      title: `Read again after the correction: ${failed.length + neighbours.length === 1 ? 'one point' : `${failed.length + neighbours.length} points`}`,
      detail: `Points ${parts.join('; ')}.`,
      elementId: place.elementId,
      faceId: place.face.id,
      where: `${place.where}, ${listed([...failed, ...neighbours].map((one) => one.label))}`,
      since: null,
      clearedBy: 'inspector',
      need: 'Read these points again. What was read before stays in the record.',
      subjects: [...failed, ...neighbours].map((one) => ({ kind: 'point', id: one.key })),
    },
  ];
}

function notVerified(place: Place, points: PointState[]): Hold[] {
  const open = points.filter((point) => point.mark === 'not-verified');
  if (open.length === 0) return [];
  const reasons = [
    ...new Set(
      open.flatMap((point) => point.readings.filter((one) => one.current).map((one) => one.judged.reason)),
    ),
  ];
  return [
    {
      id: `not-verified:${place.face.id}`,
      kind: 'not-verified',
      title: `${open.length === 1 ? `Point ${open[0]?.label} is` : `${open.length} points are`} not verified`,
      detail: listed(reasons, 2),
      elementId: place.elementId,
      faceId: place.face.id,
      where: `${place.where}, ${listed(open.map((one) => one.label))}`,
      since: earliest(open.flatMap((point) => point.readings.map((one) => one.entry.recordedAt))),
      clearedBy: 'inspector',
      need: open.some((point) => point.readings.some((one) => one.onceConfirmed))
        ? 'The person named as having read confirms the readings, or these points are read again.'
        : 'Read these points again with an instrument in order, or give what is missing.',
      subjects: open.map((one) => ({ kind: 'point', id: one.key })),
    },
  ];
}

function missing(place: Place, state: FaceState): Hold[] {
  const unread = state.points.filter((point) => point.mark === 'unread');
  const drawn = unread.filter((point) => point.point?.kind === 'drawn');
  const chosen = unread.filter((point) => point.point?.kind === 'chosen');
  const short = place.face.requirements.filter((requirement) => {
    const read = [...state.points, ...state.spots].filter((point) =>
      point.governing.some((reading) => reading.requirement?.id === requirement.id),
    ).length;
    return unread.length === 0 && read < Math.min(FEWEST_READINGS, state.points.length);
  });
  if (unread.length === 0 && short.length === 0) return [];
  const words = [
    drawn.length > 0 ? `drawn: ${listed(drawn.map((one) => one.label))}` : '',
    chosen.length > 0
      ? `chosen: ${listed(chosen.map((one) => `${one.label}${one.point?.reason ? ` (${one.point.reason})` : ''}`))}`
      : '',
    ...short.map((requirement) => `too few to ${requirement.steel}`),
  ].filter(Boolean);
  return [
    {
      id: `readings-missing:${place.face.id}`,
      kind: 'readings-missing',
      title:
        unread.length > 0 ? `${unread.length} of ${state.points.length} points not read` : 'Too few readings',
      detail: `${words.join('; ')}.`,
      elementId: place.elementId,
      faceId: place.face.id,
      where: place.where,
      since: null,
      clearedBy: 'inspector',
      need: 'Read the cover at these points.',
      subjects: unread.map((one) => ({ kind: 'point', id: one.key })),
    },
  ];
}

function conflicts(place: Place, points: PointState[]): Hold[] {
  return points
    .filter((point) => point.conflict)
    .map((point) => ({
      id: `conflict:point:${point.key}`,
      kind: 'conflict',
      title: `Two records of ${point.label} that had not seen each other`,
      detail: 'Both are kept; the less favourable governs.',
      elementId: place.elementId,
      faceId: place.face.id,
      where: `${place.where}, ${point.label}`,
      since: earliest(point.readings.map((one) => one.entry.recordedAt)),
      clearedBy: 'inspector',
      need: 'Read the point again in sight of both, or amend the one that was recorded in error.',
      subjects: [{ kind: 'point', id: point.key }],
    }));
}
