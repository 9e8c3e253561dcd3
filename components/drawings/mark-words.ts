export const markKinds = [
  'met',
  'met-flagged',
  'not-met-low',
  'not-met-high',
  'not-verified',
  'unread',
] as const;
/** The verdict of a point: by shape and word first, by colour second. */
export type MarkKind = (typeof markKinds)[number];

export const markWords: Record<MarkKind, string> = {
  met: 'met',
  'met-flagged': 'met, at limit or inside uncertainty',
  'not-met-low': 'not met, low',
  'not-met-high': 'not met, high',
  'not-verified': 'not verified',
  unread: 'not yet read',
};

/** The token that draws each mark, as a CSS colour. */
export const markColour: Record<MarkKind, string> = {
  met: 'var(--met)',
  'met-flagged': 'var(--watch)',
  'not-met-low': 'var(--hold)',
  'not-met-high': 'var(--hold)',
  'not-verified': 'var(--ink)',
  unread: 'var(--pencil)',
};
