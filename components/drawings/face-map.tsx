import { useId, type ReactNode } from 'react';
import { DimensionLine } from './dimension-line';
import { faceProportion, gridSteps, type FaceRectangle } from './face-map-geometry';
import { labelSides } from './face-map-labels';
import { FaceMapMark, type FaceMapPoint } from './face-map-mark';
import { markWords, type MarkKind } from './mark-words';

export type { FaceMapPoint } from './face-map-mark';

export interface FaceMapProps {
  name?: string;
  /** Size of the face in mm; y counts upwards from its lower edge. */
  widthMm: number;
  heightMm: number;
  points: readonly FaceMapPoint[];
  openings?: readonly FaceRectangle[];
  recesses?: readonly (FaceRectangle & { depthMm?: number })[];
  selectedId?: string | null;
  /** Writes a length: `(mm) => '7 200'`. */
  format?: (mm: number) => string;
  /** How tall the drawn face may get, in rem; a face that would be taller is drawn narrower. */
  maxHeightRem?: number;
  /** Labels at the points; by default where there are at most 60. */
  labels?: boolean;
  /** Laid over the face, edge on edge: what makes it answer to touch (FaceMapInteractive). */
  overlay?: ReactNode;
}

const share = (part: number, whole: number) => `${((part / whole) * 100).toFixed(3)}%`;

/**
 * Where on a face its readings were taken, to scale, as wide as what holds it; marks keep their size at any width.
 * The picture has a text of its own; give it a FaceMapTable beside it.
 */
export function FaceMap(props: FaceMapProps) {
  const {
    name = 'Face',
    widthMm,
    heightMm,
    points,
    format = (mm) => String(Math.round(mm)),
    maxHeightRem = 30,
  } = props;
  const { aspect, toScale } = faceProportion(widthMm, heightMm);
  const counts = new Map<MarkKind, number>();
  for (const point of points) counts.set(point.mark, (counts.get(point.mark) ?? 0) + 1);
  const summary = [...counts].map(([kind, count]) => `${count} ${markWords[kind]}`).join(', ');
  return (
    <figure
      className="grid grid-cols-[minmax(0,1fr)_auto] content-start gap-1.5 p-4"
      style={{ maxWidth: `calc(${(aspect * maxHeightRem).toFixed(2)}rem + 3.5rem)` }}
    >
      <div className="relative w-full self-start" style={{ aspectRatio: String(aspect) }}>
        <svg
          width="100%"
          height="100%"
          className="absolute inset-0 overflow-visible"
          role="img"
          aria-label={`${name}, ${format(widthMm)} by ${format(heightMm)}: ${points.length} points, ${summary || 'none placed'}.`}
        >
          <FaceMapContent {...props} />
        </svg>
        {props.overlay}
      </div>
      <DimensionLine text={format(heightMm)} upright />
      <DimensionLine text={`${format(widthMm)}${toScale ? '' : ' (not to scale)'}`} />
    </figure>
  );
}

function FaceMapContent({
  widthMm,
  heightMm,
  points,
  openings = [],
  recesses = [],
  selectedId,
  labels = points.length <= 60,
}: FaceMapProps) {
  const hatch = useId();
  const x = (mm: number) => share(mm, widthMm);
  const y = (mm: number) => share(heightMm - mm, heightMm);
  const box = (rectangle: FaceRectangle) => ({
    x: x(rectangle.xMm),
    y: y(rectangle.yMm + rectangle.heightMm),
    width: share(rectangle.widthMm, widthMm),
    height: share(rectangle.heightMm, heightMm),
  });
  const r = points.length > 60 ? 4.5 : 6;
  const sides = labelSides(labels ? points : points.filter((point) => point.id === selectedId), {
    widthMm,
    heightMm,
    aspect: faceProportion(widthMm, heightMm).aspect,
  });
  return (
    <>
      <defs>
        <pattern id={hatch} width="6" height="6" patternUnits="userSpaceOnUse">
          <path d="M0 6 6 0" stroke="var(--rule)" />
        </pattern>
      </defs>
      <rect width="100%" height="100%" fill="var(--sheet)" />
      <g stroke="var(--rule)" strokeWidth="1">
        {gridSteps(widthMm).map((mm) => (
          <line key={`x${mm}`} x1={x(mm)} x2={x(mm)} y1="0" y2="100%" />
        ))}
        {gridSteps(heightMm).map((mm) => (
          <line key={`y${mm}`} y1={y(mm)} y2={y(mm)} x1="0" x2="100%" />
        ))}
      </g>
      {recesses.map((recess) => (
        <g key={recess.id}>
          <rect {...box(recess)} fill="var(--sheet)" />
          <rect {...box(recess)} fill={`url(#${hatch})`} stroke="var(--pencil)" strokeDasharray="5 3" />
          <title>{recess.name}</title>
        </g>
      ))}
      {openings.map((opening) => (
        <g key={opening.id}>
          <rect {...box(opening)} fill="var(--paper)" stroke="var(--ink)" strokeWidth="1.5" />
          <svg {...box(opening)} viewBox="0 0 1 1" preserveAspectRatio="none">
            <path d="M0 0 1 1M1 0 0 1" stroke="var(--pencil)" vectorEffect="non-scaling-stroke" />
          </svg>
          <title>{opening.name}</title>
        </g>
      ))}
      <rect width="100%" height="100%" fill="none" stroke="var(--ink)" strokeWidth="3" />
      {points.map((point) => (
        <svg key={point.id} x={x(point.xMm)} y={y(point.yMm)} overflow="visible" width="1" height="1">
          <FaceMapMark
            point={point}
            r={r}
            selected={point.id === selectedId}
            labelled={labels || point.id === selectedId}
            side={sides.get(point.id) ?? { x: 1, y: -1 }}
          />
        </svg>
      ))}
    </>
  );
}
