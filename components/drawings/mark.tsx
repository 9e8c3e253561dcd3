import { markColour, markWords, type MarkKind } from './mark-words';

/**
 * A mark as an SVG group, centred on (0, 0): place it with a transform or inside a nested <svg>. Met is an open ring,
 * met with a flag a ring with a bar through, low a solid square, high an open square, not verified a dashed ring, not
 * yet read a small cross.
 * @param r radius of the ring in the drawing's units
 */
export function Mark({
  kind,
  r = 6,
  ground = 'var(--sheet)',
}: {
  kind: MarkKind;
  r?: number;
  ground?: string;
}) {
  const colour = markColour[kind];
  const width = r * 0.36;
  const side = r * 0.92;
  const line = { stroke: colour, strokeWidth: width, fill: ground };
  switch (kind) {
    case 'met':
      return <circle r={r} {...line} />;
    case 'met-flagged':
      return (
        <g {...line}>
          <circle r={r} />
          <path d={`M${-r * 1.55} 0H${r * 1.55}`} />
        </g>
      );
    case 'not-met-low':
      return (
        <rect
          x={-side}
          y={-side}
          width={2 * side}
          height={2 * side}
          fill={colour}
          stroke={colour}
          strokeWidth={width}
        />
      );
    case 'not-met-high':
      return <rect x={-side} y={-side} width={2 * side} height={2 * side} {...line} />;
    case 'not-verified':
      return (
        <circle r={r} {...line} strokeWidth={width * 0.9} strokeDasharray={`${r * 0.62} ${r * 0.427}`} />
      );
    case 'unread':
      return <path d={`M${-r * 0.8} 0H${r * 0.8}M0 ${-r * 0.8}V${r * 0.8}`} {...line} fill="none" />;
  }
}

/** A mark by itself, as large as the text. `title` gives it a text of its own; without it it is decoration. */
export function MarkIcon({
  kind,
  title,
  className,
  size = '1.25em',
}: {
  kind: MarkKind;
  /** `true` for the mark's own words. */
  title?: string | true;
  className?: string;
  size?: string | number;
}) {
  const text = title === true ? markWords[kind] : title;
  return (
    <svg
      viewBox="-10 -10 20 20"
      width={size}
      height={size}
      className={className}
      style={{ display: 'inline-block', flex: 'none', verticalAlign: '-0.25em' }}
      role={text ? 'img' : undefined}
      aria-label={text}
      aria-hidden={text ? undefined : true}
    >
      <Mark kind={kind} />
    </svg>
  );
}
