import type { NonconformanceStatus, PourState } from '@/lib/inspection/sheet-types';
import type { ElementType, Meeting, AcceptanceBasis, CheckGroup, DecisionRule } from '@/lib/inspection/plan';

/** The four colours of meaning; shape and word come first. */
export type Tone = 'met' | 'watch' | 'hold' | 'quiet';

export const pourStateWords: Record<PourState, { word: string; tone: Tone }> = {
  'no-plan': { word: 'plan missing', tone: 'quiet' },
  'not-read': { word: 'not read yet', tone: 'quiet' },
  held: { word: 'held', tone: 'hold' },
  ready: { word: 'no holds', tone: 'watch' },
  released: { word: 'released', tone: 'met' },
  placing: { word: 'placing', tone: 'met' },
  placed: { word: 'placed', tone: 'quiet' },
  'placed-without-release': { word: 'placed without release', tone: 'hold' },
};

export const nonconformanceWords: Record<NonconformanceStatus, { word: string; tone: Tone }> = {
  open: { word: 'open', tone: 'hold' },
  'decision-asked': { word: 'decision asked', tone: 'watch' },
  corrected: { word: 'corrected, recheck awaited', tone: 'watch' },
  accepted: { word: 'accepted', tone: 'met' },
  rejected: { word: 'rejected', tone: 'hold' },
  closed: { word: 'closed', tone: 'met' },
};

export const decisionWords = {
  rework: 'Rework',
  repair: 'Repair',
  'use-as-is': 'Use as is',
  reject: 'Reject',
} as const;

/** What each decision means for the people on site. */
export const decisionMeaning = {
  rework: 'Made to the drawings again, then read again.',
  repair: 'Made fit by other means; it will not be as drawn.',
  'use-as-is': 'Stays as found. Only the readings and answers ticked below are accepted.',
  reject: 'Comes out.',
} as const;

export const stageWords = {
  'before-pour': 'before the pour',
  'during-placing': 'during placing',
  'after-pour': 'after the pour',
} as const;

export const elementTypeWords: Record<ElementType, string> = {
  slab: 'Slab',
  wall: 'Wall',
  column: 'Column',
  beam: 'Beam',
  footing: 'Footing',
  mat: 'Mat',
  pier: 'Pier or shaft',
  stair: 'Stair',
  deck: 'Bridge or quay deck',
};

export const meetingWords: Record<Meeting, string> = {
  formed: 'formed',
  'cast-against-ground': 'cast against ground',
  'finished-top': 'finished top',
  'prepared-ground': 'on prepared ground or blinding',
};

export const basisWords: Record<AcceptanceBasis, string> = {
  'aci-318-19': 'ACI 318-19',
  'en-1992': 'EN 1992-1-1 with EN 13670',
  'is-456': 'IS 456',
  'as-3600': 'AS 3600',
  'csa-a23.1': 'CSA A23.1',
  contract: 'Contract only',
};

export const checkGroupWords: Record<CheckGroup, string> = {
  documents: 'Documents and drawings',
  formwork: 'Formwork',
  steel: 'Steel',
  placing: 'Placing of bars',
  supports: 'Supports and ties',
  cover: 'Cover',
  laps: 'Laps and couplers',
  embedded: 'Embedded items',
  cleanliness: 'Cleanliness',
  access: 'Access and weather',
  'sign-off': "Trades' sign-off",
};

/** The decision rule as every certificate names it. */
export const decisionRuleWords = (rule: DecisionRule): string =>
  rule.kind === 'simple'
    ? 'simple acceptance (a reading is met when it is at or inside the limit)'
    : rule.guardMm === undefined
      ? "guarded acceptance (a reading is met when it is inside the limit by its instrument's uncertainty)"
      : `guarded acceptance (a reading is met when it is inside the limit by ${rule.guardMm} mm)`;

/** Where a trail step's number comes from, in words. */
export const provenanceWords = {
  contract: 'contract documents',
  seen: 'text seen',
  'partly-seen': 'text partly seen',
  memory: 'from memory',
  computed: 'computed',
  'common-practice': 'common practice',
} as const;
