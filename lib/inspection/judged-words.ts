import { formatLength, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { isOtherBar, limitsFor } from './judge-point';
import { limitWords, measuredText } from './measured-words';
import type { MeasurementItem } from './measurement-item';
import type { Plan, Requirement } from './plan';
import type { CheckState, InstrumentState, MeasurementState, ReadingState } from './sheet-types';
import type { TrailStep } from './trail-step';

/** One line of the arithmetic: what it is, the figure, and whether it is the one that decides. */
export interface JudgedLine {
  label: string;
  value: string;
  decides?: boolean;
}

/** Where the limits come from: a heading, warnings, and the steps. */
export interface JudgedSource {
  heading: string;
  warnings: readonly string[];
  trail: readonly TrailStep[];
}

/** How a verdict came about, in plain words: the same on the phone and in the office. */
export interface JudgedWords {
  reason: string;
  /** What a reader has to know beside it. */
  notes: string[];
  lines: JudgedLine[];
  /** By which rule the figures were compared. */
  rule: string;
  sources: JudgedSource[];
}

/** Stands under every verdict that is explained. */
export const judgedClosing =
  'The contract documents and the local code govern. This is at the place looked at, and nothing more.';

const unrounded = 'Compared unrounded; limits belong to what is accepted.';

/** The decision rule in words, with the guard band that this instrument gives it. */
export function ruleWords(rule: Plan['decisionRule'], uncertaintyMm: number | null): string {
  if (rule.kind === 'simple')
    return 'Simple acceptance: met when it is at or inside the limit. Uncertainty is only a flag.';
  const guard = rule.guardMm ?? uncertaintyMm;
  return `Guarded acceptance: met when it is inside the limit by ${guard === null ? 'the instrument’s uncertainty, which is not known' : `${formatLength(guard, 'mm')} mm`}.`;
}

/** How one reading of cover was judged: by the steel it touched, its limits, the rule and the instrument. */
export function judgedReading(
  reading: ReadingState,
  plan: Pick<Plan, 'decisionRule'>,
  instrument: InstrumentState | null,
  unit: LengthUnit,
): JudgedWords {
  const body = reading.current ?? reading.entry.body;
  const { requirement, judged } = reading;
  const uncertaintyMm = instrument?.status?.body.uncertaintyMm ?? null;
  const other =
    requirement !== null && isOtherBar(requirement, body.asFoundBar)
      ? [
          `Bar ${body.asFoundBar ?? ''} found, ${requirement.barDesignation} planned: judged by the stricter of the two.`,
        ]
      : [];
  return {
    reason: judged.reason,
    notes: [...other, ...standing(reading)],
    lines: requirement ? readingLines(body, requirement, uncertaintyMm, unit) : [],
    rule: `${ruleWords(plan.decisionRule, uncertaintyMm)} ${unrounded}`,
    sources: [
      ...(requirement ? [requirementSource(requirement)] : []),
      ...(reading.depth && requirement?.depth
        ? [
            {
              heading: 'Effective depth, judged apart from cover',
              warnings: [reading.depth.reason],
              trail: requirement.depth.trail,
            },
          ]
        : []),
    ],
  };
}

/** Where the limits of one steel's cover come from. */
export const requirementSource = (requirement: Requirement): JudgedSource => ({
  heading: `The requirement: ${requirement.steel}`,
  warnings: requirement.warnings,
  trail: requirement.trail,
});

function readingLines(
  body: ReadingState['entry']['body'],
  requirement: Requirement,
  uncertaintyMm: number | null,
  unit: LengthUnit,
): JudgedLine[] {
  const { leastAcceptedMm: least, mostAcceptedMm: most } = limitsFor(requirement, body.asFoundBar);
  const uncertainty =
    uncertaintyMm === null ? [] : [{ label: 'uncertainty U (k = 2)', value: withUnit(uncertaintyMm, 'mm') }];
  const upper = (beside?: number) =>
    most === null ? [] : [{ label: 'most accepted', value: withUnit(most, unit, beside) }];
  if (body.goNoGo) {
    const { blockMm, passes } = body.goNoGo;
    return [
      { label: 'block', value: withUnit(blockMm, unit, least) },
      { label: 'it', value: passes ? 'passes: at least the block' : 'does not pass: less than the block' },
      { label: 'least accepted', value: withUnit(least, unit, blockMm) },
      ...upper(blockMm),
      ...uncertainty,
    ];
  }
  const mm = body.value?.mm ?? null;
  if (mm === null)
    return [{ label: 'least accepted', value: withUnit(least, unit) }, ...upper(), ...uncertainty];
  return [
    { label: 'read', value: withUnit(mm, unit, least) },
    { label: 'least accepted', value: withUnit(least, unit, mm) },
    marginLine('least', mm - least, (length) => withUnit(length, unit, 0)),
    ...(most === null
      ? []
      : [...upper(mm), marginLine('most', mm - most, (length) => withUnit(length, unit, 0))]),
    ...uncertainty,
  ];
}

/** "below the least: 7 mm": on which side of a limit a value lies, and how far. */
const marginLine = (limit: 'least' | 'most', by: number, show: (size: number) => string): JudgedLine => ({
  label: `${by < 0 ? 'below' : 'above'} the ${limit}`,
  value: show(Math.abs(by)),
  decides: true,
});

/** What was said of it since: its round, and a decision that accepts it. */
function standing(one: {
  round: number;
  acceptedBy: { body: { licence: string } } | null;
  amendments: readonly { counts: boolean; problem: string | null }[];
}): string[] {
  return [
    ...(one.round > 1
      ? [`Round ${one.round}: taken in sight of ${one.round - 1} correction${one.round > 2 ? 's' : ''}.`]
      : []),
    ...(one.acceptedBy
      ? ['Not conforming, accepted by a decision of the engineer. The verdict itself stays.']
      : []),
    ...one.amendments.flatMap((amendment) =>
      amendment.counts
        ? ['Amended since by whoever recorded it; judged as amended.']
        : [`An amendment does not count: ${amendment.problem ?? 'it is not allowed here'}`],
    ),
  ];
}

/** How one measured place was judged: its value, the limits that the plan froze, and where they come from. */
export function judgedMeasurement(
  item: MeasurementItem,
  place: MeasurementState['places'][number],
  unit: LengthUnit,
): JudgedWords {
  const body = place.current ?? place.entry.body;
  return {
    reason: place.reason,
    notes: [
      ...(item.loaded ? ['A bay is met only before, under and after a person’s weight: all three.'] : []),
      ...(place.engineer ? ['More than rework can mend: the engineer decides.'] : []),
      ...standing(place),
    ],
    lines: measurementLines(item, body.value, unit),
    rule: `The least favourable of a place’s latest round governs. ${unrounded}`,
    sources: [{ heading: `The limits: ${limitWords(item, unit)}`, warnings: [], trail: item.trail }],
  };
}

function measurementLines(
  item: MeasurementItem,
  value: MeasurementState['places'][number]['entry']['body']['value'],
  unit: LengthUnit,
): JudgedLine[] {
  const { least, most } = item;
  switch (value.quantity) {
    case 'length':
    case 'starter':
    case 'height': {
      const { mm } = value.length;
      if (mm === null) return [{ label: 'measured', value: measuredText(value) }];
      const show = (length: number, beside: number) => withUnit(length, unit, beside);
      return against(mm, item, show, show(mm, least ?? most ?? 0));
    }
    case 'count':
      return against(value.count, item, (one) => numberText(one));
    case 'part': {
      const percent = (100 * value.count) / value.of;
      const show = (one: number) => `${numberText(one, 3)} %`;
      const found = `${value.count} of ${value.of} = ${show(percent)}`;
      return against(percent, item, show, found);
    }
    case 'share': {
      const found = `${value.tied} of ${value.of} = ${numberText((100 * value.tied) / value.of, 1)} %`;
      return [
        { label: 'tied', value: found },
        ...(least === null
          ? []
          : [{ label: 'asked for', value: `${numberText(least, 1)} %, as whole ties` }]),
      ];
    }
    case 'ticket':
      return value.kgPerM3 === null
        ? [{ label: 'on the ticket', value: measuredText(value) }]
        : against(value.kgPerM3, { least, most }, (one) => `${numberText(one, 3)} kg/m³`);
    case 'designation':
      return [
        { label: 'found', value: value.designation },
        { label: 'planned', value: item.expected ?? 'nothing named' },
      ];
    case 'coupler':
    case 'damage':
      return [
        { label: 'found', value: measuredText(value) },
        { label: 'accepted', value: limitWords(item, unit) },
      ];
  }
}

/** A number beside its limits, each with what is left to it. */
function against(
  value: number,
  { least, most }: Pick<MeasurementItem, 'least' | 'most'>,
  show: (value: number, beside: number) => string,
  found = show(value, least ?? most ?? 0),
): JudgedLine[] {
  return [
    { label: 'measured', value: found },
    ...(least === null
      ? []
      : [
          { label: 'least accepted', value: show(least, value) },
          marginLine('least', value - least, (size) => show(size, 0)),
        ]),
    ...(most === null
      ? []
      : [
          { label: 'most accepted', value: show(most, value) },
          marginLine('most', value - most, (size) => show(size, 0)),
        ]),
  ];
}

const answerWords = { met: 'met', 'not-met': 'not met', 'not-applicable': 'not applicable' } as const;

/** How a question of the checklist stands: what governs of its answers, what it rests on, what evidence it asks for. */
export function judgedCheck(check: CheckState): JudgedWords {
  const { item, governing, answers } = check;
  const answer = governing?.body.answer;
  const evidence =
    item.evidence === 'photo'
      ? `Met asks for a photograph, stored and checked; ${check.photoIds.length === 0 ? 'none is' : `${check.photoIds.length} ${check.photoIds.length === 1 ? 'is' : 'are'}`} on record.`
      : null;
  return {
    reason: answer
      ? `Answered ${answerWords[answer]}${governing?.body.reason ? `: ${governing.body.reason}` : '.'}`
      : 'Nobody has answered it yet: it holds until somebody looks.',
    notes: [
      ...(evidence ? [evidence] : []),
      ...(item.attendance === 'hold-point' ? ['Hold point: work does not go on past it.'] : []),
      ...(item.attendance === 'witness-point' ? ['Witness point: somebody is asked to be there.'] : []),
      ...(check.conflict ? ['Two answers had not seen each other; the less favourable governs.'] : []),
      ...(check.correctedSince ? ['Corrected since: it is looked at again.'] : []),
      ...(check.acceptedBy
        ? ['Not conforming, accepted by a decision of the engineer. The answer itself stays.']
        : []),
    ],
    lines: [
      { label: 'answers on record', value: String(answers.length) },
      { label: 'governs', value: answer ? answerWords[answer] : 'none', decides: true },
    ],
    rule: 'The answer governs that nobody has spoken in sight of since.',
    sources: [{ heading: `Rests on: ${item.basis}`, warnings: [], trail: [] }],
  };
}
