/** What is on the other side of a face, as the drawing shows it. */
export type Ground = 'formed' | 'cast-against-ground' | 'finished-top' | 'prepared-ground';

export const groundWords: Record<Ground, string> = {
  formed: 'formed face',
  'cast-against-ground': 'cast against ground',
  'finished-top': 'finished top',
  'prepared-ground': 'on prepared ground',
};

/**
 * The hatch of the air side as an SVG pattern: even strokes for formwork, bundles of three that lean to and fro for
 * soil, dots in a bed for prepared ground; a finished top has none. Put it inside <defs>.
 */
export function HatchPattern({ id, ground }: { id: string; ground: Ground }) {
  const stroke = { stroke: 'var(--pencil)', strokeWidth: 1, fill: 'none' };
  switch (ground) {
    case 'formed':
      return (
        <pattern id={id} width="8" height="8" patternUnits="userSpaceOnUse">
          <path d="M-2 2 2-2M0 8 8 0M6 10 10 6" {...stroke} />
        </pattern>
      );
    case 'cast-against-ground':
      return (
        <pattern id={id} width="36" height="12" patternUnits="userSpaceOnUse">
          <path d="M1 12 13 0M6 12 18 0M11 12 23 0" {...stroke} />
          <path d="M24 3l7 7M28 1l7 7M21 6l5 5" {...stroke} />
        </pattern>
      );
    case 'prepared-ground':
      return (
        <pattern id={id} width="18" height="12" patternUnits="userSpaceOnUse">
          <path d="M0 12 9 0M9 12 18 0" {...stroke} opacity="0.5" />
          <g fill="var(--pencil)">
            <circle cx="3" cy="3" r="1" />
            <circle cx="12" cy="5" r="1.2" />
            <circle cx="7" cy="9" r="0.9" />
            <circle cx="16" cy="10" r="1" />
          </g>
        </pattern>
      );
    case 'finished-top':
      return (
        <pattern id={id} width="8" height="8" patternUnits="userSpaceOnUse">
          <path d="M0 0" />
        </pattern>
      );
  }
}
