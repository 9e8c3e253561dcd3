import type { Tone } from '@/components/ui/tone';
import type { MarkKind, NonconformanceStatus, PourState } from '@/lib/inspection/sheet-types';

export const pourStateTone: Record<PourState, Tone> = {
  'no-plan': 'plain',
  'not-read': 'plain',
  held: 'hold',
  ready: 'watch',
  released: 'met',
  placing: 'met',
  placed: 'plain',
  'placed-without-release': 'hold',
};

export const markTone: Record<MarkKind, Tone> = {
  met: 'met',
  'met-flagged': 'watch',
  'not-met-low': 'hold',
  'not-met-high': 'hold',
  'not-verified': 'plain',
  unread: 'plain',
};

export const nonconformanceWords: Record<NonconformanceStatus, { word: string; tone: Tone }> = {
  open: { word: 'open', tone: 'hold' },
  'decision-asked': { word: 'decision asked', tone: 'watch' },
  corrected: { word: 'corrected, recheck awaited', tone: 'watch' },
  accepted: { word: 'accepted', tone: 'met' },
  rejected: { word: 'rejected', tone: 'hold' },
  closed: { word: 'closed', tone: 'met' },
};

export const answerWords = {
  met: 'met',
  'not-met': 'not met',
  'not-applicable': 'not applicable',
} as const;
