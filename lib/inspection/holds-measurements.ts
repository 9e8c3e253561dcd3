import { shortLapWaysOut } from '@/lib/concrete/lap-layout';
import { conflictHold } from './conflict-hold';
import { placesMeasured } from './judge-measurements';
import type { Hold, MeasurementState, Sheet } from './sheet-types';

/** The mark of an element on the drawings, or the whole pour. */
export const markOf = (sheet: Sheet, elementId: string | null): string =>
  sheet.plan.elements.find((one) => one.id === elementId)?.mark ?? 'Whole pour';

type Place = MeasurementState['places'][number];
type Base = Pick<Hold, 'elementId' | 'faceId' | 'where' | 'subjects'>;

const placesNamed = (places: Place[]): string =>
  `${places.length === 1 ? 'One place' : `${places.length} places`}: ${places
    .map((one) => (one.current ?? one.entry.body).place || 'place not named')
    .join(', ')}.`;

/** Holds of the measurements that the plan asks for: out of limits, sent back, not verified, missing, in conflict. */
export function measurementHolds(sheet: Sheet): Hold[] {
  return sheet.measurements.flatMap((state) => {
    const { item } = state;
    const base: Base = {
      elementId: item.elementId,
      faceId: null,
      where: `${markOf(sheet, item.elementId)}, ${item.title}`,
      subjects: [{ kind: 'measurement', id: item.id }],
    };
    const failing = state.governing.filter((one) => one.verdict === 'not-met' && one.acceptedBy === null);
    // A failure found in sight of every correction is a failure again; the others wait for the recheck.
    const out = failing.filter((one) => one.round >= state.roundAsked);
    const corrected = failing.filter((one) => one.round < state.roundAsked);
    return [
      ...outOfLimits(state, base, out),
      ...recheckAwaited(state, base, corrected),
      ...notVerified(state, base),
      ...missing(state, base),
      ...(state.conflict ? [conflictHold(`measurement:${item.id}`, item.title, base, base.subjects)] : []),
    ];
  });
}

function outOfLimits({ item }: MeasurementState, base: Base, out: Place[]): Hold[] {
  const worst = out.find((one) => one.engineer) ?? out[0];
  if (!worst) return [];
  const otherBar = item.kind === 'bar-size';
  return [
    {
      id: `${otherBar ? 'bar-departs' : 'measurement-out'}:${item.id}:${Math.max(...out.map((one) => one.round))}`,
      kind: otherBar ? 'bar-departs' : 'measurement-out',
      title: `${item.title}: ${worst.reason}`,
      detail: placesNamed(out),
      ...base,
      since: worst.entry.recordedAt,
      clearedBy: worst.engineer ? 'engineer' : 'superintendent',
      need: needOf(item.kind, worst.engineer ?? false),
    },
  ];
}

const rework = 'Put it right and report the correction, then the inspector measures again';

function needOf(kind: MeasurementState['item']['kind'], engineer: boolean): string {
  if (kind === 'bar-size') return 'The engineer decides on it, or the bar is changed and measured again.';
  if (engineer) return 'The engineer decides on it, or the bar is taken out and the new one is looked at.';
  if (kind === 'lap-length')
    return `${rework}; or ask the engineer. Ways out: ${shortLapWaysOut.join('; ').toLowerCase()}.`;
  return `${rework}; or raise a nonconformance for the engineer.`;
}

function recheckAwaited({ item, correctedSince }: MeasurementState, base: Base, corrected: Place[]): Hold[] {
  if (corrected.length === 0) return [];
  return [
    {
      id: `recheck-awaited:measurement:${item.id}`,
      kind: 'recheck-awaited',
      title: `Measure again: ${item.title}`,
      detail: [correctedSince && `Corrected: ${correctedSince.body.text}.`, placesNamed(corrected)]
        .filter(Boolean)
        .join(' '),
      ...base,
      since: correctedSince?.recordedAt ?? null,
      clearedBy: 'inspector',
      need: 'Measure the corrected places again.',
    },
  ];
}

function notVerified({ item, unverified }: MeasurementState, base: Base): Hold[] {
  const first = unverified[0];
  if (!first) return [];
  return [
    {
      id: `not-verified:measurement:${item.id}`,
      kind: 'not-verified',
      title: `${item.title}: ${unverified.length === 1 ? 'one place is' : `${unverified.length} places are`} not verified`,
      detail: `${placesNamed(unverified)} ${first.reason}`,
      ...base,
      since: first.entry.recordedAt,
      clearedBy: 'inspector',
      need: 'Measure these places again, or give what is missing.',
    },
  ];
}

function missing(state: MeasurementState, base: Base): Hold[] {
  const { item } = state;
  const measured = placesMeasured(state);
  const noEdge =
    item.against?.by === 'tie-pattern' && item.against.oneAtEdge && !state.governing.some(isAtEdge);
  if (measured >= item.required && !noEdge) return [];
  return [
    {
      id: `measurement-missing:${item.id}`,
      kind: 'measurement-missing',
      title:
        measured < item.required
          ? `${item.title}: measured at ${measured} of ${item.required} places`
          : `${item.title}: none of the squares is at an edge`,
      detail: [
        item.loaded ? 'Each place before, under and after a person’s weight.' : '',
        noEdge ? 'One of the squares has to lie at an edge.' : '',
      ]
        .filter(Boolean)
        .join(' '),
      ...base,
      since: null,
      clearedBy: 'inspector',
      need: 'Measure the places that are left.',
    },
  ];
}

const isAtEdge = ({ current }: Place): boolean =>
  current?.value.quantity === 'share' && current.value.atEdge === true;
