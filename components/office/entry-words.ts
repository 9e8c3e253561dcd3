import type { BodyOf, Entry, EntryType, UnknownEntry } from '@/lib/inspection/entry';
import { bodies } from '@/lib/inspection/entry-bodies';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { asEntered } from '@/lib/inspection/length-as-entered';
import { measuredText } from '@/lib/inspection/measured-words';
import type { Plan } from '@/lib/inspection/plan';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { roleWords } from '@/lib/inspection/roles';
import { mmText } from './length-words';
import { fullTime } from './project-time';
import { decisionWords, stageWords } from './state-words';

/** An entry in words: what was recorded, and the lines under it. */
export interface EntryWording {
  title: string;
  lines: string[];
}

/** What the words need to know of the pour: its plan, its entries, and people's names. */
export interface WordContext {
  plan: Plan | null;
  entries: ReadonlyMap<string, Entry>;
  people: ReadonlyMap<string, string>;
  timeZone: string;
}

const answerWords = { met: 'met', 'not-met': 'not met', 'not-applicable': 'not applicable' } as const;
const eventWords: Record<BodyOf<'site-event'>['kind'], string> = {
  rain: 'Rain',
  'washed-soil': 'Washed soil',
  ice: 'Ice or snow in the form',
  'bar-changed': 'A bar was changed',
  'form-changed': 'The form was changed',
  'embed-changed': 'An embedded item was changed',
  traffic: 'Traffic or storage on the mat',
  'ticket-differs': 'A delivery ticket differs from the mix',
  'no-light': 'No light to inspect by',
  other: 'Something happened on site',
};
const shotWords = {
  wide: 'from a distance',
  close: 'from close up',
  before: 'before',
  after: 'after',
} as const;
const instrumentKinds = {
  tape: 'tape',
  'depth-gauge': 'depth gauge',
  'cover-meter': 'cover meter',
  calliper: 'calliper',
  block: 'block',
} as const;

const given = (...lines: (string | null | undefined | false)[]): string[] =>
  lines.filter((line): line is string => typeof line === 'string' && line.trim() !== '');

/** The name of a person, or what is true when there is none. */
export const personName = (id: string, people: ReadonlyMap<string, string>): string =>
  people.get(id) ?? 'someone no longer in this project';

const faceWords = (context: WordContext, faceId: string): string => {
  for (const element of context.plan?.elements ?? []) {
    const face = element.faces.find((one) => one.id === faceId);
    if (face) return `${element.mark}, ${face.name}`;
  }
  return 'a face that is no longer in the plan';
};

const pointWords = (context: WordContext, pointId: string): string => {
  for (const element of context.plan?.elements ?? []) {
    for (const face of element.faces) {
      const point = face.points.find((one) => one.id === pointId);
      if (point) return `${point.label}, ${face.name} of ${element.mark}`;
    }
  }
  return 'a point that is no longer in the plan';
};

const elementWords = (context: WordContext, ids: string[] | null): string =>
  ids === null
    ? 'the whole pour'
    : ids
        .map(
          (id) =>
            context.plan?.elements.find((element) => element.id === id)?.mark ??
            'an element no longer in the plan',
        )
        .join(', ');

const whereWords = (context: WordContext, where: BodyOf<'hold'>['where']): string =>
  where.text ||
  (where.faceId
    ? faceWords(context, where.faceId)
    : where.elementId
      ? elementWords(context, [where.elementId])
      : '');

/** What an entry is about, in the words of the plan. */
export function subjectWords(context: WordContext, subject: SubjectRef): string {
  switch (subject.kind) {
    case 'pour':
      return 'the pour';
    case 'element':
      return elementWords(context, [subject.id]);
    case 'face':
      return faceWords(context, subject.id);
    case 'point':
      return `point ${pointWords(context, subject.id)}`;
    case 'check':
      return (
        context.plan?.checklist.items.find((item) => item.id === subject.id)?.question ??
        'a check no longer in the plan'
      );
    case 'measurement':
      return (
        context.plan?.measurements.find((item) => item.id === subject.id)?.title ??
        'a measurement no longer in the plan'
      );
    case 'nonconformance':
    case 'entry': {
      const entry = context.entries.get(subject.id);
      return entry ? entryWords(entry, context).title : 'an entry that is not here';
    }
  }
}

const entryTitle = (context: WordContext, id: string): string => subjectWords(context, { kind: 'entry', id });
const subjects = (context: WordContext, about: SubjectRef[]): string =>
  about.map((one) => subjectWords(context, one)).join('; ');

type Wording = { [T in EntryType]: (body: BodyOf<T>, context: WordContext) => EntryWording };

const coverValue = (body: BodyOf<'reading'>): string =>
  body.value
    ? asEntered(body.value)
    : body.goNoGo
      ? `${body.goNoGo.passes ? 'at least' : 'less than'} ${mmText(body.goNoGo.blockMm)} mm (go/no-go)`
      : 'nothing';

const wording: Wording = {
  answer: (body, context) => ({
    title: `Check ${answerWords[body.answer]}`,
    lines: given(
      subjectWords(context, { kind: 'check', id: body.checkId }),
      body.reason && `Reason: ${body.reason}`,
      body.note,
    ),
  }),
  reading: (body, context) => ({
    title: `Cover ${coverValue(body)} at ${
      body.pointId
        ? pointWords(context, body.pointId)
        : `a spot on ${faceWords(context, body.faceId)} (${mmText(body.spot?.xMm ?? 0)}, ${mmText(body.spot?.yMm ?? 0)} mm)`
    }`,
    lines: given(
      `To ${body.steel}${body.phase === 'after' ? ', after placing' : ''}, measured ${fullTime(body.measuredAt, context.timeZone)}`,
      body.asFoundBar && `Bar found: ${body.asFoundBar}`,
      body.measurer &&
        `Measured by ${personName(body.measurer.personId, context.people)}${body.measurer.confirmed ? '' : ', not confirmed by them yet'}`,
    ),
  }),
  measurement: (body, context) => ({
    title: `Measured ${measuredText(body.value)}${body.place ? ` at ${body.place}` : ''}`,
    lines: given(
      subjectWords(context, { kind: 'measurement', id: body.itemId }),
      body.stage !== 'single' &&
        { before: 'Before load', under: "Under a person's weight", after: 'After load' }[body.stage],
    ),
  }),
  photo: (body, context) => {
    const about = subjectWords(context, body.about);
    return {
      title: `Photo ${shotWords[body.shot]}`,
      lines: given(`Of: ${about}`, body.caption !== about && body.caption),
    };
  },
  note: (body, context) => ({
    title: 'Note',
    lines: [body.text, `About ${subjectWords(context, body.about)}`],
  }),
  query: (body, context) => ({
    title: 'Query',
    lines: [body.text, `About: ${entryTitle(context, body.entryId)}`],
  }),
  'query-answered': (body, context) => {
    const query = context.entries.get(body.queryId);
    return {
      title: 'Query answered',
      lines: given(body.text, query?.type === 'query' && `To: ${query.body.text}`),
    };
  },
  nonconformance: (body, context) => ({
    title: `Nonconformance: ${body.title}`,
    lines: given(
      subjects(context, body.about),
      whereWords(context, body.where),
      `Extent: ${body.extent}`,
      body.description,
      body.proposal && `Proposed: ${body.proposal}`,
      body.neededBy && `Needed by ${fullTime(body.neededBy, context.timeZone)}`,
    ),
  }),
  correction: (body, context) => ({
    title: 'Correction reported',
    lines: given(body.text, `Of ${subjects(context, body.about)}`, whereWords(context, body.where)),
  }),
  recheck: (body, context) => ({
    title: `Recheck ${answerWords[body.outcome]}`,
    lines: given(subjectWords(context, body.about), body.text),
  }),
  'last-walk': (body, context) => ({
    title: `Last walk ${answerWords[body.outcome]}`,
    lines: [body.places, `Over ${elementWords(context, body.elementIds)}`],
  }),
  'site-event': (body, context) => ({
    title: eventWords[body.kind],
    lines: given(
      `At ${fullTime(body.at, context.timeZone)}, ${elementWords(context, body.elementIds)}`,
      body.kind === 'rain' && (body.amountMm === null ? 'Amount not known' : `${mmText(body.amountMm)} mm`),
      body.text,
    ),
  }),
  'verbal-instruction': (body) => ({
    title: `Verbal instruction from ${body.from}`,
    lines: given(body.text, body.signedBy ? `Signed by ${body.signedBy}` : 'Not signed yet'),
  }),
  'condition-verified': (body, context) => ({
    title: `Condition ${answerWords[body.outcome]}`,
    lines: given(conditionWords(context, body.conditionId), body.text),
  }),
  amendment: (body, context) => ({
    title: body.replacement === null ? 'Withdrawal' : 'Amendment',
    lines: given(
      `Of: ${entryTitle(context, body.rootId)}`,
      replacementWords(context, body),
      `Reason: ${body.reason}`,
    ),
  }),
  hold: (body, context) => ({
    title: `Hold: ${body.title}`,
    lines: given(
      whereWords(context, body.where),
      `Clears it: ${roleWords[body.clearedBy].toLowerCase()}. ${body.need}`,
      body.onBehalfOf && `On behalf of ${body.onBehalfOf}`,
    ),
  }),
  'hold-lifted': (body, context) => {
    const hold = context.entries.get(body.holdId);
    return {
      title:
        hold?.type === 'hold'
          ? `Hold lifted: ${hold.body.title}`
          : hold?.type === 'verbal-instruction'
            ? `Verbal instruction from ${hold.body.from} confirmed in writing`
            : 'Hold lifted',
      lines: [body.reason],
    };
  },
  'inspection-asked': (body, context) => ({
    title: 'Inspection asked for',
    lines: given(`Ready ${fullTime(body.readyAt, context.timeZone)}, ${body.place}`, body.text),
  }),
  placement: (body, context) => ({
    title: body.event === 'started' ? 'Placing started' : 'Placing finished',
    lines: [`At ${fullTime(body.at, context.timeZone)}, ${elementWords(context, body.elementIds)}`],
  }),
  signature: (body, context) => ({
    title: `Signed as ${body.as}`,
    lines: [body.words, `For ${elementWords(context, body.elementIds)}`],
  }),
  disposition: (body, context) => ({
    title: `Decision: ${decisionWords[body.decision].toLowerCase()}`,
    lines: given(
      entryTitle(context, body.nonconformanceId),
      body.reason,
      `Extent: ${body.extent}`,
      body.accepts.length > 0 && `Accepts: ${body.accepts.map((id) => entryTitle(context, id)).join('; ')}`,
      ...body.conditions.map((one) => `Condition ${stageWords[one.stage]}: ${one.text} (${one.criterion})`),
      `Licence ${body.licence}`,
    ),
  }),
  'release-asked': (body, context) => ({
    title: 'Release asked for',
    lines: given(`For ${elementWords(context, body.scope.elementIds)}`, body.scope.limits, body.text),
  }),
  'block-check': (body, context) => ({
    title: `Block check ${Math.abs(body.readMm - body.blockMm) <= body.toleranceMm + 1e-6 ? 'passed' : 'failed'}`,
    lines: [
      `Block ${mmText(body.blockMm)} mm read as ${mmText(body.readMm)} mm, tolerance ${mmText(body.toleranceMm)} mm`,
      `${{ start: 'Start', middle: 'Middle', end: 'End' }[body.when]} of shift, ${fullTime(body.at, context.timeZone)}`,
    ],
  }),
  'instrument-status': (body, context) => ({
    title: `Instrument ${body.name} ${body.inService ? 'in service' : 'out of service'}`,
    lines: given(
      `${instrumentKinds[body.kind]}${body.serial ? `, serial ${body.serial}` : ''}`,
      body.calibrationDue && `Calibration due ${fullTime(body.calibrationDue, context.timeZone)}`,
      body.uncertaintyMm !== null && `Expanded uncertainty ${mmText(body.uncertaintyMm)} mm (k = 2)`,
    ),
  }),
  'drawing-received': (body, context) => ({
    title: `Drawing ${body.number} rev ${body.revision} received`,
    lines: [`At ${fullTime(body.at, context.timeZone)}`],
  }),
  'mix-changed': (body) => ({
    title: `Mix changed to ${body.name}${body.replaces ? `, in place of ${body.replaces}` : ''}`,
    lines: given(body.text),
  }),
  'rules-changed': (body) => ({ title: 'Rules changed', lines: [body.text] }),
  'plan-issued': (body) => ({
    title: `Plan rev ${revisionLetter(body.revision)} issued`,
    lines: [body.reason],
  }),
  'photo-stored': (body) => ({
    title: 'Photo stored',
    lines: [`${body.widthPx} x ${body.heightPx} px, ${Math.round(body.bytes / 1024)} kB, digest checked`],
  }),
  'photo-refused': (body) => ({ title: 'Photo refused', lines: [body.problem] }),
  'signature-confirmed': (body, context) => ({
    title: 'Signature confirmed with the password',
    lines: [entryTitle(context, body.signatureId)],
  }),
  release: (body, context) => ({
    title: `Release ${body.number}`,
    lines: given(
      `For ${elementWords(context, body.scope.elementIds)}`,
      body.scope.limits,
      `Stands until the start of placing, at the latest ${fullTime(body.validUntil, context.timeZone)}`,
      `Rests on plan rev ${revisionLetter(body.planRevision)}, ${body.readings} readings`,
    ),
  }),
  'release-refused': (body, context) => ({
    title: 'Release refused',
    lines: given(
      `For ${elementWords(context, body.scope.elementIds)}`,
      body.reason && `Reason given: ${body.reason}`,
      `${body.holds.length} ${body.holds.length === 1 ? 'hold' : 'holds'} stood against it`,
      ...body.holds.slice(0, 5),
      body.holds.length > 5 && `and ${body.holds.length - 5} more`,
    ),
  }),
  'release-void': (body, context) => {
    const release = context.entries.get(body.releaseId);
    return {
      title: release?.type === 'release' ? `Release ${release.body.number} void` : 'Release void',
      lines: [body.reason, `Since ${fullTime(body.at, context.timeZone)}`],
    };
  },
  'placing-without-release': (body, context) => ({
    title: 'Concrete placed without a release',
    lines: [`At ${fullTime(body.at, context.timeZone)}`],
  }),
  'member-changed': (body, context) => ({
    title: `${personName(body.personId, context.people)} ${body.role ? `is now ${roleWords[body.role].toLowerCase()}` : 'has left the project'}`,
    lines: [],
  }),
};

const conditionWords = (context: WordContext, conditionId: string): string | null => {
  for (const entry of context.entries.values()) {
    if (entry.type !== 'disposition') continue;
    const condition = entry.body.conditions.find((one) => one.id === conditionId);
    if (condition) return condition.text;
  }
  return null;
};

const replacementWords = (context: WordContext, body: BodyOf<'amendment'>): string | null => {
  const root = context.entries.get(body.rootId);
  if (!root || body.replacement === null) return null;
  const parsed = bodies[root.type].safeParse(body.replacement);
  if (!parsed.success) return null;
  const { title, lines } = wordsOf(root.type, parsed.data as never, context);
  // Of what consists of words, the title says only the kind.
  const words = root.type === 'note' || root.type === 'query' ? lines[0] : null;
  const extent = root.type === 'nonconformance' ? lines.find((line) => line.startsWith('Extent: ')) : null;
  return `Now: ${words ?? extent ?? title}`;
};

// The table is indexed by the very type whose body it is given; TypeScript cannot follow that through a union.
const wordsOf = <T extends EntryType>(type: T, body: BodyOf<T>, context: WordContext): EntryWording =>
  wording[type](body, context);

/** One entry in words, as the record shows it. */
export function entryWords(entry: Entry, context: WordContext): EntryWording {
  return wordsOf(entry.type, entry.body as never, context);
}

/** An entry that this program is too old to read is shown, never dropped. */
export const unknownEntryWords = (entry: UnknownEntry): EntryWording => ({
  title: `An entry of a kind this page does not know (${entry.type}, version ${entry.v})`,
  lines: ['It is kept. Load the page again after the program has been brought up to date.'],
});
