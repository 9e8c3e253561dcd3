import type { SubjectRef } from '@/lib/inspection/entry-bodies';

/** Screens of one pour; `part` says which of them a path names. */
export type PourRoute =
  | { part: 'sheet' }
  | { part: 'face'; faceId: string; pointKey: string | null }
  | { part: 'checks'; group: string | null }
  | { part: 'measurements'; itemId: string | null }
  | { part: 'holds' }
  | { part: 'fix-list' }
  | { part: 'photos'; about: SubjectRef | null }
  | { part: 'nonconformance'; about: SubjectRef | null }
  | { part: 'nonconformance-shown'; id: string }
  | { part: 'correction'; about: SubjectRef | null }
  | { part: 'entry'; entryId: string }
  | { part: 'events' }
  | { part: 'confirm' }
  | { part: 'last-walk' }
  | { part: 'instruments' }
  | { part: 'sign' };

export type FieldRoute =
  | { screen: 'pours' }
  | { screen: 'pour'; pourId: string; route: PourRoute }
  | { screen: 'not-sent' }
  | { screen: 'pin' }
  | { screen: 'unknown' };

const subjectKinds: readonly SubjectRef['kind'][] = [
  'pour',
  'element',
  'face',
  'point',
  'check',
  'measurement',
  'nonconformance',
  'entry',
];

function decoded(part: string): string | null {
  try {
    return decodeURIComponent(part);
  } catch {
    return null;
  }
}

function subjectOf(kind: string | undefined, id: string | undefined): SubjectRef | null {
  const known = subjectKinds.find((one) => one === kind);
  return known && id ? { kind: known, id } : null;
}

function readPourRoute(parts: string[]): PourRoute | null {
  const [part, first, second] = parts;
  switch (part) {
    case undefined:
      return { part: 'sheet' };
    case 'faces':
      return first ? { part: 'face', faceId: first, pointKey: second ?? null } : { part: 'sheet' };
    case 'checks':
      return { part: 'checks', group: first ?? null };
    case 'measurements':
      return { part: 'measurements', itemId: first ?? null };
    case 'photos':
      return { part: 'photos', about: subjectOf(first, second) };
    case 'nonconformance':
      return first && !second
        ? { part: 'nonconformance-shown', id: first }
        : { part: 'nonconformance', about: subjectOf(first, second) };
    case 'correction':
      return { part: 'correction', about: subjectOf(first, second) };
    case 'entries':
      return first ? { part: 'entry', entryId: first } : null;
    case 'holds':
    case 'fix-list':
    case 'confirm':
    case 'events':
    case 'last-walk':
    case 'instruments':
    case 'sign':
      return { part };
    default:
      return null;
  }
}

/** Reads the path of the address bar; whatever it does not know is `unknown`, never an error. */
export function readRoute(path: string): FieldRoute {
  const parts = path
    .split('/')
    .filter((part) => part !== '')
    .map(decoded);
  if (parts.some((part) => part === null) || parts[0] !== 'field') return { screen: 'unknown' };
  const [, screen, pourId, ...rest] = parts as string[];
  if (screen === undefined) return { screen: 'pours' };
  if ((screen === 'not-sent' || screen === 'pin') && pourId === undefined) return { screen };
  if (screen !== 'pours') return { screen: 'unknown' };
  if (pourId === undefined) return { screen: 'pours' };
  const route = readPourRoute(rest);
  return route ? { screen: 'pour', pourId, route } : { screen: 'unknown' };
}

const join = (...parts: string[]) => `/${parts.map(encodeURIComponent).join('/')}`;

/** The path of a screen: the inverse of `readRoute`. */
export const fieldPaths = {
  pours: '/field',
  notSent: '/field/not-sent',
  pin: '/field/pin',
  pour: (pourId: string) => join('field', 'pours', pourId),
  /** With a point, that point is lit first. */
  face: (pourId: string, faceId: string, pointKey?: string) =>
    join('field', 'pours', pourId, 'faces', faceId, ...(pointKey ? [pointKey] : [])),
  checks: (pourId: string, group?: string) =>
    group ? join('field', 'pours', pourId, 'checks', group) : join('field', 'pours', pourId, 'checks'),
  measurements: (pourId: string, itemId?: string) =>
    itemId
      ? join('field', 'pours', pourId, 'measurements', itemId)
      : join('field', 'pours', pourId, 'measurements'),
  photos: (pourId: string, about?: SubjectRef) => withSubject(pourId, 'photos', about),
  nonconformance: (pourId: string, about?: SubjectRef) => withSubject(pourId, 'nonconformance', about),
  nonconformanceShown: (pourId: string, id: string) => join('field', 'pours', pourId, 'nonconformance', id),
  correction: (pourId: string, about?: SubjectRef) => withSubject(pourId, 'correction', about),
  entry: (pourId: string, entryId: string) => join('field', 'pours', pourId, 'entries', entryId),
  holds: (pourId: string) => join('field', 'pours', pourId, 'holds'),
  fixList: (pourId: string) => join('field', 'pours', pourId, 'fix-list'),
  /** Readings typed by others in this person's name. */
  confirm: (pourId: string) => join('field', 'pours', pourId, 'confirm'),
  events: (pourId: string) => join('field', 'pours', pourId, 'events'),
  lastWalk: (pourId: string) => join('field', 'pours', pourId, 'last-walk'),
  instruments: (pourId: string) => join('field', 'pours', pourId, 'instruments'),
  sign: (pourId: string) => join('field', 'pours', pourId, 'sign'),
} as const;

function withSubject(pourId: string, part: string, about?: SubjectRef): string {
  return about
    ? join('field', 'pours', pourId, part, about.kind, about.id)
    : join('field', 'pours', pourId, part);
}
