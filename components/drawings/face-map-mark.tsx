import type { LabelSide } from './face-map-labels';
import { Mark } from './mark';
import type { MarkKind } from './mark-words';

export interface FaceMapPoint {
  id: string;
  label: string;
  xMm: number;
  yMm: number;
  mark: MarkKind;
  /** Chosen by the planner where failures live: drawn with corner marks. */
  chosen?: boolean;
  /** A spot reading taken elsewhere: its label is set in slanted letters. */
  spot?: boolean;
}

/** A label that would run over its neighbours is cut; whole when its point is selected. */
function shortLabel(label: string): string {
  return label.length > 8 ? `${label.slice(0, 7)}…` : label;
}

/** One point of a face map, drawn around (0, 0): mark, label, what tells chosen and selected points. */
export function FaceMapMark({
  point,
  r,
  selected,
  labelled,
  side,
}: {
  point: FaceMapPoint;
  r: number;
  selected: boolean;
  labelled: boolean;
  /** Where the label hides least. */
  side: LabelSide;
}) {
  const away = selected ? r + 11 : r + 4;
  return (
    <>
      {selected && (
        <g fill="none" stroke="var(--chalk)" strokeWidth="3">
          <circle r={r + 9} fill="var(--sheet)" fillOpacity="0.85" />
          <path d={`M${-r - 15} 0h6M${r + 9} 0h6M0 ${-r - 15}v6M0 ${r + 9}v6`} />
        </g>
      )}
      {point.chosen && (
        <path
          d={`M${-r - 4} ${-r}v-4h4M${r + 4} ${r}v4h-4`}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="1.4"
        />
      )}
      <Mark kind={point.mark} r={r} />
      {labelled && (
        <text
          x={side.x * away}
          y={side.y === 1 ? away + 8 : -away + 3}
          textAnchor={side.x === -1 ? 'end' : 'start'}
          className="font-label"
          fontStyle={point.spot ? 'italic' : undefined}
          fontSize={selected ? 15 : 12}
          fontWeight={selected ? 600 : 500}
          fill={selected ? 'var(--chalk)' : 'var(--ink)'}
          stroke="var(--sheet)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {selected ? point.label : shortLabel(point.label)}
        </text>
      )}
    </>
  );
}
