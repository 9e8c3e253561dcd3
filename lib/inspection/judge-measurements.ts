import type { Verdict } from '@/lib/concrete/judge-reading';
import { acceptedAsSeen } from './acceptances';
import { amended } from './amendments';
import { headsOf, saw, type Placed } from './causality';
import type { EntryOf } from './entry';
import { subjectKey } from './facts';
import { judgeMeasured } from './judge-measured';
import type { JudgingContext } from './judge-point';
import type { MeasurementState } from './sheet-types';

type Body = EntryOf<'measurement'>['body'];
type Place = MeasurementState['places'][number];
const favour: Record<Verdict, number> = { 'not-met': 0, 'not-verified': 1, met: 2 };

const placeKey = (entry: EntryOf<'measurement'>, body: Body) =>
  `${body.place.trim().toLowerCase() || entry.id}/${body.stage}`;

/** Judges everything that the plan asks to be measured; per place the least favourable of its latest round governs. */
export function judgeMeasurements(context: JudgingContext): MeasurementState[] {
  const { plan, facts } = context;
  return plan.measurements.map((item) => {
    const key = subjectKey({ kind: 'measurement', id: item.id });
    const corrections = context.corrections.of(key).map(({ entry }) => entry);
    let conflict = false;
    const eventsByPlace = new Map<string, Placed[]>();
    const places: Place[] = (facts.measurementsByItem.get(item.id) ?? []).map((entry) => {
      const result = amended(facts, entry, (before, after) => {
        const was = judgeMeasured(item, before.value, plan).verdict;
        return was === 'not-met' && judgeMeasured(item, after.value, plan).verdict !== 'not-met';
      });
      conflict ||= result.conflict;
      const rivals = result.rivals
        .filter((body): body is Body => body !== null)
        .map((body) => ({ body, judged: judgeMeasured(item, body.value, plan) }))
        .sort(
          (a, b) =>
            favour[a.judged.verdict] - favour[b.judged.verdict] ||
            (a.judged.margin ?? 0) - (b.judged.margin ?? 0),
        );
      const least = rivals[0];
      const events = eventsByPlace.get(placeKey(entry, entry.body)) ?? [];
      eventsByPlace.set(placeKey(entry, entry.body), [
        ...events,
        entry,
        ...result.amendments.map((one) => one.entry),
      ]);
      const judged = least?.judged ?? judgeMeasured(item, entry.body.value, plan);
      return {
        entry,
        current: least?.body ?? null,
        amendments: result.amendments,
        ...judged,
        round:
          entry.authorRole === 'inspector'
            ? 1 + corrections.filter((correction) => saw(entry, correction)).length
            : 1,
        acceptedBy: acceptedAsSeen(facts, entry, context.accepted),
      };
    });
    conflict ||= [...eventsByPlace.values()].some(
      (events) => events.length > 1 && headsOf(events).length > 1,
    );
    const governing = governingPlaces(places);
    const failing = governing.filter((place) => place.verdict === 'not-met');
    const correctedSince =
      corrections.findLast((correction) => failing.some((place) => !saw(place.entry, correction))) ?? null;
    const measured = new Set(governing.map(keyOfPlace));
    const unverified = places.filter(
      (place) =>
        place.current !== null && place.verdict === 'not-verified' && !measured.has(keyOfPlace(place)),
    );
    const roundAsked = 1 + corrections.length;
    return { item, places, governing, unverified, correctedSince, roundAsked, conflict };
  });
}

const keyOfPlace = (place: Place) => placeKey(place.entry, place.current ?? place.entry.body);

/**
 * The less favourable of two measurements: by verdict, then by how far beyond the limit. Where nothing tells which of two
 * failures is worse, one that no decision accepts comes first; equal ones by id, so that order of arrival decides nothing.
 */
function lessFavourable(one: Place, other: Place): Place {
  const difference = favour[one.verdict] - favour[other.verdict];
  if (difference !== 0) return difference < 0 ? one : other;
  if (one.margin !== null && other.margin !== null) {
    if (one.margin !== other.margin) return one.margin < other.margin ? one : other;
  } else if ((one.acceptedBy === null) !== (other.acceptedBy === null)) {
    return one.acceptedBy === null ? one : other;
  }
  return one.entry.id < other.entry.id ? one : other;
}

function governingPlaces(places: Place[]): Place[] {
  const groups = new Map<string, Place[]>();
  for (const place of places) {
    if (place.current === null || place.verdict === 'not-verified') continue;
    const key = keyOfPlace(place);
    groups.set(key, [...(groups.get(key) ?? []), place]);
  }
  return [...groups.values()]
    .map((group) => {
      const latest = Math.max(...group.map((place) => place.round));
      return group.filter((place) => place.round === latest).reduce(lessFavourable);
    })
    .sort((a, b) => favour[a.verdict] - favour[b.verdict] || (a.margin ?? 0) - (b.margin ?? 0));
}

/** Places measured in full: every stage where the item is measured before, under and after load. */
export function placesMeasured(state: MeasurementState): number {
  const stages = state.item.loaded ? ['before', 'under', 'after'] : ['single'];
  const byPlace = new Map<string, Set<string>>();
  for (const { entry, current } of state.governing) {
    if (!current) continue;
    const name = current.place.trim().toLowerCase() || entry.id;
    byPlace.set(name, (byPlace.get(name) ?? new Set()).add(current.stage));
  }
  return [...byPlace.values()].filter((found) => stages.every((stage) => found.has(stage))).length;
}
