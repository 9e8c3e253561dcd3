import { parseLength, type Length } from '@/lib/concrete/length';
import { judgeReading } from '@/lib/concrete/judge-reading';
import type { BodyOf, Entry } from '@/lib/inspection/entry';
import { siteBodies } from '@/lib/inspection/entry-bodies';
import { limitsFor } from '@/lib/inspection/judge-point';
import { judgeMeasured } from '@/lib/inspection/judge-measured';
import { asEntered } from '@/lib/inspection/length-as-entered';
import { saidBy } from '@/lib/inspection/measurers';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { faceOfPlan } from './open-sheet';

type Json = NonNullable<BodyOf<'amendment'>['replacement']>;
export type Replacement = { ok: true; body: Json } | { ok: false; problem: string };

/** What the form of an amendment edits: one value, or one choice, or one text. */
export type AmendmentDraft = {
  label: string;
  value: string;
  replacement: () => Replacement;
} & (
  | { kind: 'text'; long: boolean; with: (value: string) => AmendmentDraft }
  | { kind: 'choice'; choices: { value: string; label: string }[]; with: (value: string) => AmendmentDraft }
);

/** A body as it travels; the device checks it once more by the schema of its type. */
export const asJson = (body: object): Json => JSON.parse(JSON.stringify(body)) as Json;

function textDraft(
  label: string,
  value: string,
  long: boolean,
  make: (value: string) => Replacement,
): AmendmentDraft {
  return {
    kind: 'text',
    label,
    value,
    long,
    replacement: () => make(value),
    with: (next) => textDraft(label, next, long, make),
  };
}

function choiceDraft(
  label: string,
  value: string,
  choices: { value: string; label: string }[],
  make: (value: string) => Replacement,
): AmendmentDraft {
  return {
    kind: 'choice',
    label,
    value,
    choices,
    replacement: () => make(value),
    with: (next) => choiceDraft(label, next, choices, make),
  };
}

function lengthChange(text: string, make: (length: Length) => object): Replacement {
  const parsed = parseLength(text);
  if (!parsed.ok) return parsed;
  if (parsed.length.unit === null) return { ok: false, problem: 'State the unit: 38 mm, or 1 3/8 in.' };
  return { ok: true, body: asJson(make(parsed.length)) };
}

/** The draft for an entry as it counts now, as this person may amend it; null where it can be withdrawn and not amended. */
export function amendmentDraft(
  entry: Entry,
  current: Record<string, unknown>,
  personId: string,
): AmendmentDraft | null {
  switch (entry.type) {
    case 'reading': {
      const body = siteBodies.reading.safeParse(current);
      if (!body.success || !body.data.value) return null;
      const shown = asEntered(body.data.value).replace(' (unit not given)', '');
      return textDraft('What the instrument showed', shown, false, (text) =>
        lengthChange(text, (value) => saidBy({ ...body.data, value }, personId)),
      );
    }
    case 'measurement': {
      const body = siteBodies.measurement.safeParse(current);
      return body.success ? measurementDraft(body.data) : null;
    }
    case 'answer': {
      const body = siteBodies.answer.safeParse(current);
      if (!body.success) return null;
      const choices = [
        { value: 'met', label: 'Met' },
        { value: 'not-met', label: 'Not met' },
      ];
      return choiceDraft('The answer is', body.data.answer, choices, (answer) => ({
        ok: true,
        body: asJson({ ...body.data, answer }),
      }));
    }
    case 'nonconformance': {
      const body = siteBodies.nonconformance.safeParse(current);
      if (!body.success) return null;
      return textDraft('How far it reaches', body.data.extent, true, (extent) =>
        extent.trim()
          ? { ok: true, body: asJson({ ...body.data, extent }) }
          : { ok: false, problem: 'Write something here.' },
      );
    }
    case 'note':
    case 'query': {
      const text = typeof current.text === 'string' ? current.text : '';
      return textDraft('Text', text, true, (next) =>
        next.trim()
          ? { ok: true, body: asJson({ ...current, text: next }) }
          : { ok: false, problem: 'Write something here.' },
      );
    }
    default:
      return null;
  }
}

/** The one figure that most errors are made in; what has more than one is withdrawn and recorded once more. */
function measurementDraft(body: BodyOf<'measurement'>): AmendmentDraft | null {
  const { value } = body;
  const changed = (next: object): Replacement => ({ ok: true, body: asJson({ ...body, value: next }) });
  switch (value.quantity) {
    case 'length':
    case 'starter':
    case 'height':
      return textDraft('What was measured', asEntered(value.length), false, (text) =>
        lengthChange(text, (length) => ({ ...body, value: { ...value, length } })),
      );
    case 'count':
    case 'part':
      return textDraft('Count', String(value.count), false, (text) =>
        /^\d+$/.test(text.trim())
          ? changed({ ...value, count: Number(text) })
          : { ok: false, problem: 'Write a whole number.' },
      );
    case 'share':
      return textDraft(`Tied, of ${value.of}`, String(value.tied), false, (text) =>
        /^\d+$/.test(text.trim()) && Number(text) <= value.of
          ? changed({ ...value, tied: Number(text) })
          : { ok: false, problem: `Write a whole number, at most ${value.of}.` },
      );
    case 'designation':
      return textDraft('Bar found', value.designation, false, (text) =>
        text.trim()
          ? changed({ quantity: 'designation', designation: text.trim() })
          : { ok: false, problem: 'Write the bar found.' },
      );
    case 'coupler':
    case 'damage':
    case 'ticket':
      return null;
  }
}

/** Does this amendment go from not met to something else? Then it needs the photograph that shows it. */
export function amendmentNeedsPhoto(sheet: Sheet, entry: Entry, draft: AmendmentDraft): boolean {
  const made = draft.replacement();
  if (!made.ok) return false;
  if (entry.type === 'reading') {
    const state = sheet.faces
      .flatMap((face) => [...face.points, ...face.spots])
      .flatMap((point) => point.readings)
      .find((reading) => reading.entry.id === entry.id);
    const place = faceOfPlan(sheet, entry.body.faceId);
    const body = siteBodies.reading.safeParse(made.body);
    if (!state || !place || !body.success || state.judged.verdict !== 'not-met') return false;
    const after = judgeReading(
      { mm: body.data.value?.mm ?? null, sectionMm: place.element.thicknessMm },
      state.requirement && limitsFor(state.requirement, body.data.asFoundBar),
      { uncertaintyMm: null, status: 'good' },
      sheet.plan.decisionRule.kind === 'guarded' && sheet.plan.decisionRule.guardMm === undefined
        ? { kind: 'simple' }
        : sheet.plan.decisionRule,
      sheet.plan.units,
    );
    return after.verdict !== 'not-met';
  }
  if (entry.type === 'measurement') {
    const state = sheet.measurements.find((one) => one.item.id === entry.body.itemId);
    const place = state?.places.find((one) => one.entry.id === entry.id);
    const body = siteBodies.measurement.safeParse(made.body);
    if (!state || place?.verdict !== 'not-met' || !body.success) return false;
    return judgeMeasured(state.item, body.data.value, sheet.plan).verdict !== 'not-met';
  }
  return false;
}
