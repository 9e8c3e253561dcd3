import type { CoverSectionScale } from './cover-section-scale';
import { HatchPattern, type Ground } from './hatch';

export interface CoverSectionLayout extends CoverSectionScale {
  /** The face is above and ticks fall (a finished top), or below and they stand on it. */
  faceUp: boolean;
  /** Where the face is in a row, and how tall a row is, px. */
  faceY: number;
  height: number;
  /** How deep the band below the least accepted cover is, px. */
  bandPx: number;
}

/** Where a depth is in a row, px from its top. */
export function depthY(layout: CoverSectionLayout, mm: number): number {
  const px = Math.min(Math.max(mm, 0), layout.deepestMm) * layout.perMm;
  return layout.faceUp ? layout.faceY + px : layout.faceY - px;
}

/** What lies behind the readings, once per row: hatch, face, band, limits and their figures. Decoration. */
export function CoverSectionGround({
  id,
  layout,
  rows,
  meeting,
  specifiedMm,
  leastAcceptedMm,
  mostAcceptedMm,
  format,
  axisPx,
}: {
  id: string;
  layout: CoverSectionLayout;
  rows: number;
  meeting: Ground;
  specifiedMm: number;
  leastAcceptedMm: number;
  mostAcceptedMm: number | null;
  format: (mm: number) => string;
  axisPx: number;
}) {
  const { faceY, faceUp, height } = layout;
  const least = depthY(layout, leastAcceptedMm);
  const specified = depthY(layout, specifiedMm);
  const most = mostAcceptedMm === null ? null : depthY(layout, mostAcceptedMm);
  const hatchPx = 12;
  // Two figures of the scale that would touch: the limit that decides stays, the other gives way.
  const apart = Math.abs(specified - least) >= 12;
  return (
    <svg width="100%" height={rows * height} className="absolute inset-x-0 top-0" aria-hidden="true">
      <defs>
        <HatchPattern id={`${id}h`} ground={meeting} />
        <svg id={`${id}r`} width="100%" height={height} overflow="visible">
          <svg x={axisPx - 6} y="0" width="100%" height={height}>
            <rect
              width="100%"
              height={Math.abs(faceY - least)}
              y={Math.min(faceY, least)}
              fill="var(--band)"
            />
            {meeting !== 'finished-top' && (
              <rect
                width="100%"
                height={hatchPx}
                y={faceUp ? faceY - hatchPx : faceY}
                fill={`url(#${id}h)`}
              />
            )}
            <g strokeWidth="1.25" fill="none">
              <line x2="100%" y1={specified} y2={specified} stroke="var(--pencil)" strokeDasharray="2 5" />
              {most !== null && (
                <line x2="100%" y1={most} y2={most} stroke="var(--hold)" strokeDasharray="8 4 2 4" />
              )}
              <line
                x2="100%"
                y1={least}
                y2={least}
                stroke="var(--hold)"
                strokeWidth="1.75"
                strokeDasharray="8 4"
              />
              <line x2="100%" y1={faceY} y2={faceY} stroke="var(--ink)" strokeWidth="3.5" />
            </g>
          </svg>
          <g className="font-figure" fontSize="12.5" fontWeight="500" textAnchor="end" fill="var(--pencil)">
            {apart && (
              <text x={axisPx - 11} y={specified + 4}>
                {format(specifiedMm)}
              </text>
            )}
            {most !== null && Math.abs(most - specified) >= 12 && (
              <text x={axisPx - 11} y={most + 4}>
                {format(mostAcceptedMm ?? 0)}
              </text>
            )}
            <text x={axisPx - 11} y={least + 4} fill="var(--ink)" fontWeight="700">
              {format(leastAcceptedMm)}
            </text>
            <text x={axisPx - 11} y={faceY + 4}>
              0
            </text>
          </g>
        </svg>
      </defs>
      {Array.from({ length: rows }, (_, row) => (
        <use key={row} href={`#${id}r`} y={row * height} />
      ))}
    </svg>
  );
}
