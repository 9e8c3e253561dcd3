import type { Entry } from '@/lib/inspection/entry';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { measuredText } from '@/lib/inspection/measured-words';
import { readingText } from '@/lib/inspection/reading-text';
import { answerWords } from './state-tone';
import { subjectWords } from './subject-words';

const eventWords = {
  rain: 'Rain',
  'washed-soil': 'Washed soil',
  ice: 'Ice or snow in the form',
  'bar-changed': 'A bar was changed',
  'form-changed': 'The form was changed',
  'embed-changed': 'An embedded item was changed',
  traffic: 'Traffic or storage on the mat',
  'ticket-differs': 'A delivery ticket differs',
  'no-light': 'No light to inspect by',
  other: 'Something else',
} as const;
export const siteEventWords = eventWords;

/** What an entry says, in one line. The sheet names its places where there is one. */
export function entryTitle(entry: Entry, sheet: Sheet | null): string {
  const at = (kind: 'point' | 'check' | 'measurement' | 'face', id: string) =>
    sheet ? subjectWords(sheet, { kind, id }) : '';
  const join = (...parts: string[]) => parts.filter(Boolean).join(': ');
  switch (entry.type) {
    case 'reading':
      return join(
        `Cover ${readingText(entry.body)}`,
        entry.body.pointId
          ? at('point', entry.body.pointId)
          : `a spot on ${at('face', entry.body.faceId) || 'a face'}`,
      );
    case 'answer':
      return join(`Check ${answerWords[entry.body.answer]}`, at('check', entry.body.checkId));
    case 'measurement':
      return join(`Measured ${measuredText(entry.body.value)}`, at('measurement', entry.body.itemId));
    case 'photo':
      return join('Photo', entry.body.caption ?? '');
    case 'note':
      return join('Note', entry.body.text);
    case 'query':
      return join('Query', entry.body.text);
    case 'query-answered':
      return join('Answer to a query', entry.body.text);
    case 'nonconformance':
      return join('Nonconformance', entry.body.title);
    case 'correction':
      return join('Correction', entry.body.text);
    case 'recheck':
      return `Recheck: ${answerWords[entry.body.outcome]}`;
    case 'last-walk':
      return `Last walk: ${answerWords[entry.body.outcome]}`;
    case 'site-event':
      return join(eventWords[entry.body.kind], entry.body.text ?? '');
    case 'verbal-instruction':
      return join(`Verbal instruction by ${entry.body.from}`, entry.body.text);
    case 'condition-verified':
      return `Condition: ${answerWords[entry.body.outcome]}`;
    case 'amendment':
      return join(entry.body.replacement === null ? 'Withdrawal' : 'Amendment', entry.body.reason);
    case 'hold':
      return join('Hold', entry.body.title);
    case 'hold-lifted':
      return join('Hold lifted', entry.body.reason);
    case 'inspection-asked':
      return join('Inspection asked for', entry.body.place);
    case 'placement':
      return `Placing ${entry.body.event}`;
    case 'signature':
      return `Signature as ${entry.body.as}`;
    case 'block-check':
      return `Block check: ${entry.body.readMm} mm on a block of ${entry.body.blockMm} mm`;
    case 'instrument-status':
      return join('Instrument', entry.body.name);
    default:
      return 'Entry';
  }
}
