import type { Tone } from '@/components/ui/tone';
import type { NonconformanceStatus, PourState } from '@/lib/inspection/sheet-types';
import type { ElementType, Meeting, AcceptanceBasis, DecisionRule } from '@/lib/inspection/plan';

/** The tone of each state; its word is in lib/inspection/pour-state. */
export const pourStateTones: Record<PourState, Tone> = {
  'no-plan': 'plain',
  'not-read': 'plain',
  held: 'hold',
  ready: 'watch',
  released: 'met',
  placing: 'met',
  placed: 'plain',
  'placed-without-release': 'hold',
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

/** The decision rule as every certificate names it. */
export const decisionRuleWords = (rule: DecisionRule): string =>
  rule.kind === 'simple'
    ? 'simple acceptance (a reading is met when it is at or inside the limit)'
    : rule.guardMm === undefined
      ? "guarded acceptance (a reading is met when it is inside the limit by its instrument's uncertainty)"
      : `guarded acceptance (a reading is met when it is inside the limit by ${rule.guardMm} mm)`;
