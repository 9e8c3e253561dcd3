import { recordedBy } from '@/lib/inspection/entry-access';
import { siteEventKinds, type SubjectRef } from '@/lib/inspection/entry-bodies';
import type { Plan } from '@/lib/inspection/plan';
import { roleWords, type Role } from '@/lib/inspection/roles';
import type { Hold } from '@/lib/inspection/sheet-types';
import { idsIn, textIn, type ActionField, type ActionValues, type EntryAction } from './entry-action';
import { instantFromField, localFieldText } from './project-time';

/** Only who can lift a hold can be named as the one who clears it. */
const clears: readonly Role[] = recordedBy['hold-lifted'];

const elementOptions = (plan: Plan) =>
  plan.elements.map((element) => ({ value: element.id, label: `${element.mark}, ${element.location}` }));

const elementsField = (plan: Plan): ActionField[] =>
  plan.elements.length < 2
    ? []
    : [
        {
          kind: 'many',
          name: 'elements',
          label: 'Which elements',
          hint: 'None ticked: the whole pour.',
          options: elementOptions(plan),
        },
      ];
const elementIds = (values: ActionValues) => {
  const ids = idsIn(values, 'elements');
  return ids.length === 0 ? null : ids;
};

const elementField = (plan: Plan): ActionField => ({
  kind: 'select',
  name: 'element',
  label: 'Where',
  options: elementOptions(plan),
  placeholder: 'The whole pour',
});
const whereOf = (values: ActionValues) => ({
  elementId: textIn(values, 'element') || null,
  faceId: null,
  text: textIn(values, 'place'),
});

const instantOf = (values: ActionValues, name: string, timeZone: string) =>
  instantFromField(textIn(values, name), timeZone) ?? textIn(values, name);

/** A hold is placed by hand, with who clears it and what is needed. */
export const holdAction = (plan: Plan): EntryAction => ({
  type: 'hold',
  label: 'Place a hold',
  title: 'Place a hold',
  says: 'It stands against a release until it is lifted with a reason.',
  submit: 'Place the hold',
  fields: [
    { kind: 'text', name: 'title', label: 'What' },
    elementField(plan),
    { kind: 'text', name: 'place', label: 'Place in words', optional: true },
    {
      kind: 'select',
      name: 'clearedBy',
      label: 'Who clears it',
      options: clears.map((role) => ({ value: role, label: roleWords[role] })),
      placeholder: 'Choose',
    },
    { kind: 'text', name: 'need', label: 'What is needed' },
    { kind: 'text', name: 'onBehalfOf', label: 'On behalf of', optional: true },
  ],
  toBody: (values) => ({
    title: textIn(values, 'title'),
    where: whereOf(values),
    clearedBy: textIn(values, 'clearedBy'),
    need: textIn(values, 'need'),
    onBehalfOf: textIn(values, 'onBehalfOf'),
  }),
});

export const noteAction = (plan: Plan): EntryAction => ({
  type: 'note',
  label: 'Write a note',
  title: 'Write a note',
  submit: 'Record the note',
  fields: [elementField(plan), { kind: 'long', name: 'text', label: 'Note' }],
  toBody: (values) => {
    const element = textIn(values, 'element');
    return {
      about: element ? { kind: 'element', id: element } : { kind: 'pour', id: plan.pourId },
      text: textIn(values, 'text'),
    };
  },
});

const subjectKey = (subject: SubjectRef) => `${subject.kind} ${subject.id}`;

/** A correction answers holds: what was put right is chosen from what stands. Null where nothing can be corrected. */
export function correctionAction(holds: readonly Hold[], plan: Plan): EntryAction | null {
  const correctable = holds.filter(
    (hold) =>
      hold.subjects.some((subject) => subject.kind !== 'entry' && subject.kind !== 'pour') &&
      [
        'cover-not-met',
        'check-not-met',
        'measurement-out',
        'bar-departs',
        'nonconformance-open',
        'recheck-awaited',
      ].includes(hold.kind),
  );
  if (correctable.length === 0) return null;
  return {
    type: 'correction',
    label: 'Report a correction',
    title: 'Report a correction',
    says: 'An inspector reads again after it: the failed points and their neighbours.',
    submit: 'Report the correction',
    fields: [
      {
        kind: 'many',
        name: 'holds',
        label: 'What was put right',
        options: correctable.map((hold) => ({ value: hold.id, label: `${hold.title} · ${hold.where}` })),
      },
      { kind: 'long', name: 'text', label: 'What was done' },
    ],
    toBody: (values) => {
      const chosen = correctable.filter((hold) => idsIn(values, 'holds').includes(hold.id));
      const about = new Map(
        chosen
          .flatMap((hold) => hold.subjects)
          .filter((subject) => subject.kind !== 'pour')
          .map((subject) => [subjectKey(subject), subject]),
      );
      const places = [...new Set(chosen.map((hold) => hold.elementId))];
      const known = plan.elements.some((element) => element.id === places[0]);
      return {
        about: [...about.values()],
        text: textIn(values, 'text'),
        where: {
          elementId: places.length === 1 && known ? places[0] : null,
          faceId: null,
          text: [...new Set(chosen.map((hold) => hold.where))].join('; ').slice(0, 200),
        },
      };
    },
    fieldOf: { about: 'holds' },
  };
}

/** The start or the end of placing; the time is the project's own. */
export const placementAction = (
  event: 'started' | 'finished',
  plan: Plan,
  now: string,
  timeZone: string,
): EntryAction => ({
  type: 'placement',
  label: event === 'started' ? 'Placing has started' : 'Placing is finished',
  title: event === 'started' ? 'Record the start of placing' : 'Record the end of placing',
  says:
    event === 'started'
      ? 'Concrete that is placed without a release goes on record as that, and the engineer is told.'
      : undefined,
  submit: 'Record it',
  fields: [{ kind: 'time', name: 'at', label: 'When' }, ...elementsField(plan)],
  start: { at: localFieldText(now, timeZone), elements: [] },
  toBody: (values) => ({ event, at: instantOf(values, 'at', timeZone), elementIds: elementIds(values) }),
});

const eventLabels: Record<(typeof siteEventKinds)[number], string> = {
  rain: 'Rain',
  'washed-soil': 'Washed soil',
  ice: 'Ice or snow in the form',
  'bar-changed': 'A bar was changed',
  'form-changed': 'The form was changed',
  'embed-changed': 'An embedded item was changed',
  traffic: 'Traffic or storage on the mat',
  'ticket-differs': 'A delivery ticket differs from the mix',
  'no-light': 'No light to inspect by',
  other: 'Something else',
};

export const siteEventAction = (plan: Plan, now: string, timeZone: string): EntryAction => ({
  type: 'site-event',
  label: 'Record a site event',
  title: 'Record a site event',
  says: 'Rain over the limit, a changed bar or form, traffic on the mat and the like make a release void.',
  submit: 'Record it',
  fields: [
    {
      kind: 'select',
      name: 'kind',
      label: 'What',
      options: siteEventKinds.map((kind) => ({ value: kind, label: eventLabels[kind] })),
      placeholder: 'Choose',
    },
    { kind: 'time', name: 'at', label: 'When' },
    {
      kind: 'text',
      name: 'amount',
      label: 'Rain in mm',
      hint: 'Left empty, the amount counts as over the limit.',
      optional: true,
    },
    { kind: 'long', name: 'text', label: 'In words', optional: true },
    ...elementsField(plan),
  ],
  start: { at: localFieldText(now, timeZone), elements: [] },
  toBody: (values) => ({
    kind: textIn(values, 'kind'),
    at: instantOf(values, 'at', timeZone),
    amountMm: textIn(values, 'amount') === '' ? null : Number(textIn(values, 'amount')),
    text: textIn(values, 'text'),
    elementIds: elementIds(values),
  }),
  fieldOf: { amountMm: 'amount' },
});

export const inspectionAskedAction = (now: string, timeZone: string): EntryAction => ({
  type: 'inspection-asked',
  label: 'Ask for an inspection',
  title: 'Ask for an inspection',
  says: 'The notice goes on record with its time.',
  submit: 'Ask for it',
  fields: [
    { kind: 'time', name: 'ready', label: 'Ready when' },
    { kind: 'text', name: 'place', label: 'Where' },
    { kind: 'long', name: 'text', label: 'What else to know', optional: true },
  ],
  start: { ready: localFieldText(now, timeZone) },
  toBody: (values) => ({
    readyAt: instantOf(values, 'ready', timeZone),
    place: textIn(values, 'place'),
    text: textIn(values, 'text'),
  }),
  fieldOf: { readyAt: 'ready' },
});

export const verbalInstructionAction = (): EntryAction => ({
  type: 'verbal-instruction',
  label: 'Verbal instruction',
  title: 'Record a verbal instruction',
  says: 'It holds the pour until it is signed by whoever gave it.',
  submit: 'Record it',
  fields: [
    { kind: 'text', name: 'from', label: 'Who gave it' },
    { kind: 'long', name: 'text', label: 'What was said' },
    { kind: 'text', name: 'signedBy', label: 'Signed by', optional: true },
  ],
  toBody: (values) => ({
    from: textIn(values, 'from'),
    text: textIn(values, 'text'),
    signedBy: textIn(values, 'signedBy') || null,
  }),
});

export const releaseAskedAction = (plan: Plan): EntryAction => ({
  type: 'release-asked',
  label: 'Ask for the release',
  title: 'Ask for the release',
  submit: 'Ask for it',
  fields: [...elementsField(plan), { kind: 'long', name: 'text', label: 'What to know', optional: true }],
  start: { elements: [] },
  toBody: (values) => ({
    scope: { elementIds: elementIds(values), limits: '' },
    text: textIn(values, 'text'),
  }),
});
