import type { DevicePour } from '@/lib/device/device-types';
import { holdsInScope } from '@/lib/inspection/holds';
import { placesMeasured } from '@/lib/inspection/judge-measurements';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { roleWords } from '@/lib/inspection/roles';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';

const count = (number: number, one: string, many: string) => `${number} ${number === 1 ? one : many}`;
const parts = (...list: (string | false)[]) => list.filter(Boolean).join(', ');

/** The sheet of some elements: with what belongs to none of them in particular. */
function partOf(sheet: Sheet, elementIds: readonly string[]): Sheet {
  const within = (elementId: string | null) => elementId === null || elementIds.includes(elementId);
  return {
    ...sheet,
    faces: sheet.faces.filter((face) => within(face.elementId)),
    checks: sheet.checks.filter((check) => within(check.item.elementId)),
    measurements: sheet.measurements.filter((state) => within(state.item.elementId)),
    nonconformances: sheet.nonconformances.filter((state) => within(state.entry.body.where.elementId)),
  };
}

/** What a signature covers, in figures: one line each, as the person reads it before signing. */
export function signatureFigures(
  whole: Sheet,
  elementIds: readonly string[] | null,
): { label: string; value: string }[] {
  const sheet = elementIds === null ? whole : partOf(whole, elementIds);
  const points = sheet.faces.flatMap((face) => face.points);
  const spots = sheet.faces.flatMap((face) => face.spots);
  const read = points.filter((point) => point.governing.length > 0);
  const failing = [...points, ...spots].flatMap((point) =>
    point.governing.filter((reading) => reading.judged.verdict === 'not-met'),
  );
  const accepted = failing.filter((reading) => reading.acceptedBy !== null).length;
  const notVerified = [...points, ...spots].filter((point) => point.mark === 'not-verified').length;
  const shallow = [...points, ...spots].filter((point) =>
    point.readings.some((reading) => reading.current && reading.depth?.verdict === 'not-met'),
  ).length;
  const answers = (answer: string) =>
    sheet.checks.filter((check) => check.governing?.body.answer === answer).length;
  const open = sheet.checks.filter((check) => check.governing === null).length;
  const measured = sheet.measurements.filter((state) => placesMeasured(state) >= state.item.required).length;
  const out = sheet.measurements.filter((state) =>
    state.governing.some((place) => place.verdict === 'not-met' && place.acceptedBy === null),
  ).length;
  const nonconformances = sheet.nonconformances.filter((state) => !state.withdrawn);
  const closed = nonconformances.filter(
    (state) => state.status === 'closed' || state.status === 'accepted',
  ).length;
  return [
    {
      label: 'Cover',
      value: parts(
        `${read.length} of ${count(points.length, 'point', 'points')} read on ${count(sheet.faces.length, 'face', 'faces')}`,
        spots.length > 0 && `${count(spots.length, 'spot reading', 'spot readings')} besides`,
        failing.length === 0 ? 'none not met' : `${failing.length} not met`,
        accepted > 0 && `of which ${accepted} accepted by the engineer`,
        shallow > 0 && `effective depth low at ${count(shallow, 'point', 'points')}`,
        notVerified > 0 && `${notVerified} not verified`,
      ),
    },
    {
      label: 'Checks',
      value: parts(
        `${answers('met')} met`,
        answers('not-met') > 0 && `${answers('not-met')} not met`,
        answers('not-applicable') > 0 && `${answers('not-applicable')} not applicable`,
        open > 0 && `${open} open`,
      ),
    },
    ...(sheet.measurements.length > 0
      ? [
          {
            label: 'Measurements',
            value: parts(
              `${measured} of ${sheet.measurements.length} done`,
              out > 0 && `${out} out of limits`,
            ),
          },
        ]
      : []),
    {
      label: 'Nonconformances',
      value:
        nonconformances.length === 0
          ? 'none raised'
          : parts(`${nonconformances.length} raised`, `${closed} closed or accepted`),
    },
    {
      label: 'Photos',
      value: `${sheet.photos.length} taken, ${sheet.photos.filter((photo) => photo.stored).length} stored`,
    },
  ];
}

/**
 * The words that are signed: who, in which role, for what, with the figures of the sheet, and what they do not cover.
 * @returns at most 2000 characters
 */
export function signatureWords(input: {
  sheet: Sheet;
  pour: Pick<DevicePour, 'number' | 'title'>;
  name: string;
  as: 'inspector' | 'superintendent';
  holds: readonly Hold[];
  /** Null: the whole pour. */
  elementIds: readonly string[] | null;
}): string {
  const { sheet, pour, name, as, elementIds } = input;
  const elements = sheet.plan.elements.filter((one) => elementIds === null || elementIds.includes(one.id));
  const holds = holdsInScope(input.holds, { elementIds: elementIds === null ? null : [...elementIds] });
  const drawings = [...new Set(elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`))];
  const others = holds.filter(
    (hold) => hold.kind !== 'signature-missing' && hold.kind !== 'plan-revised',
  ).length;
  const lines = [
    `${name}, ${roleWords[as].toLowerCase()}, signs the inspection of pour ${pour.number} ${pour.title}${elementIds === null ? '' : `, only ${elements.map((one) => one.mark).join(' and ')},`} to plan revision ${revisionLetter(sheet.plan.revision)}, drawing ${drawings.join(', ')}.`,
    ...signatureFigures(sheet, elementIds).map(({ label, value }) => `${label}: ${value}.`),
    others === 0
      ? 'No hold stands beside the signatures.'
      : `${count(others, 'hold stands', 'holds stand')} beside the signatures.`,
    "At the points read and for the items checked. Formwork, shoring and the authority's own inspection are not covered unless signed for.",
  ];
  return lines.join(' ').slice(0, 2000);
}
