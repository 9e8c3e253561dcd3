import { judgeLimits } from '@/lib/concrete/judge-measurement';
import type { Verdict } from '@/lib/concrete/judge-reading';
import { acceptedAsSeen } from './acceptances';
import { amended } from './amendments';
import { headsOf, saw, type Placed } from './causality';
import type { EntryOf } from './entry';
import { subjectKey } from './facts';
import type { JudgingContext } from './judge-point';
import type { MeasurementItem, Plan } from './plan';
import type { MeasurementState } from './sheet-types';

type Body = EntryOf<'measurement'>['body'];
type Place = MeasurementState['places'][number];
const favour: Record<Verdict, number> = { 'not-met': 0, 'not-verified': 1, met: 2 };

const normalised = (text: string) => text.toLowerCase().replace(/[\s#]/g, '');

/** Judges one measured value by the limits that the plan froze for its item. */
export function judgeMeasurement(
  item: MeasurementItem,
  body: Body,
  units: Plan['units'],
): { verdict: Verdict; reason: string } {
  const value = body.value;
  if (value.quantity !== item.quantity)
    return { verdict: 'not-verified', reason: 'The value is not of the kind that the plan asks for.' };
  switch (value.quantity) {
    case 'length': {
      if (value.length.mm === null)
        return { verdict: 'not-verified', reason: 'The unit is missing. State it to have this judged.' };
      const judged = judgeLimits(
        value.length.mm,
        { least: item.least ?? undefined, most: item.most ?? undefined },
        units,
      );
      return { verdict: judged.verdict, reason: judged.reason };
    }
    case 'count':
      return byNumber(value.count, item, String(value.count));
    case 'share': {
      // Compared as whole ties, so that no rounding of a percentage decides.
      const needed = item.least === null ? 0 : Math.ceil((item.least / 100) * value.of - 1e-9);
      const words = `${value.tied} of ${value.of} tied`;
      return value.tied >= needed
        ? { verdict: 'met', reason: `${words}, at least ${needed} asked for.` }
        : { verdict: 'not-met', reason: `${words}, at least ${needed} asked for.` };
    }
    case 'designation': {
      const same = item.expected !== null && normalised(item.expected) === normalised(value.designation);
      return same
        ? { verdict: 'met', reason: `Found ${value.designation}, as planned.` }
        : {
            verdict: 'not-met',
            reason: `Found ${value.designation}, planned ${item.expected ?? 'nothing'}. A larger bar is a departure too.`,
          };
    }
  }
}

function byNumber(count: number, item: MeasurementItem, words: string): { verdict: Verdict; reason: string } {
  if (item.least !== null && count < item.least)
    return { verdict: 'not-met', reason: `${words} found, at least ${item.least} asked for.` };
  if (item.most !== null && count > item.most)
    return { verdict: 'not-met', reason: `${words} found, at most ${item.most} allowed.` };
  return { verdict: 'met', reason: `${words} found, as asked for.` };
}

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
        const was = judgeMeasurement(item, before, plan.units).verdict;
        return was === 'not-met' && judgeMeasurement(item, after, plan.units).verdict !== 'not-met';
      });
      conflict ||= result.conflict;
      const rivals = result.rivals
        .filter((body): body is Body => body !== null)
        .map((body) => ({ body, judged: judgeMeasurement(item, body, plan.units) }))
        .sort((a, b) => favour[a.judged.verdict] - favour[b.judged.verdict]);
      const least = rivals[0];
      const events = eventsByPlace.get(placeKey(entry, entry.body)) ?? [];
      eventsByPlace.set(placeKey(entry, entry.body), [
        ...events,
        entry,
        ...result.amendments.map((one) => one.entry),
      ]);
      const judged = least?.judged ?? judgeMeasurement(item, entry.body, plan.units);
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
    return { item, places, governing, correctedSince, conflict };
  });
}

/** The less favourable of two measurements; equal ones by id, so that order of arrival decides nothing. */
function lessFavourable(one: Place, other: Place): Place {
  const difference = favour[one.verdict] - favour[other.verdict];
  if (difference !== 0) return difference < 0 ? one : other;
  return one.entry.id < other.entry.id ? one : other;
}

function governingPlaces(places: Place[]): Place[] {
  const groups = new Map<string, Place[]>();
  for (const place of places) {
    if (place.current === null || place.verdict === 'not-verified') continue;
    const key = placeKey(place.entry, place.current);
    groups.set(key, [...(groups.get(key) ?? []), place]);
  }
  return [...groups.values()]
    .map((group) => {
      const latest = Math.max(...group.map((place) => place.round));
      return group.filter((place) => place.round === latest).reduce(lessFavourable);
    })
    .sort((a, b) => favour[a.verdict] - favour[b.verdict]);
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
