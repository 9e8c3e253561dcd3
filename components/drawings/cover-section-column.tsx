import { depthY, type CoverSectionLayout } from './cover-section-ground';
import { Mark } from './mark';
import { markColour, markWords, type MarkKind } from './mark-words';

export interface CoverSectionReading {
  id?: string;
  label: string;
  /** Measured cover in mm; null where none has been read, or where its unit is unknown. */
  mm: number | null;
  mark: MarkKind;
  /** It was amended or withdrawn: it stays, struck through. */
  struck?: boolean;
}

interface ColumnProps {
  reading: CoverSectionReading;
  layout: CoverSectionLayout;
  /** The reading as written, without its unit; null where there is none. */
  text: string | null;
  unit: string;
  drop: boolean;
}

/** One reading of a cover section: tick, bar, mark, figure and label, with its text for a screen reader. */
export function CoverSectionColumn({ reading, layout, text, unit, drop }: ColumnProps) {
  const { faceY, faceUp, height } = layout;
  const figure = text === null ? '' : ` ${text} ${unit},`;
  return (
    <li className="relative min-w-0" style={{ height }}>
      <span className="sr-only">
        {`${reading.label}:${figure} ${markWords[reading.mark]}${reading.struck ? ', struck through' : ''}`}
      </span>
      <svg width="100%" height={height} aria-hidden="true" className="absolute inset-0 overflow-visible">
        <svg x="50%" overflow="visible" width="1" height="1">
          {reading.mm !== null && (
            <Tick mm={reading.mm} mark={reading.mark} struck={reading.struck} {...{ layout, text, drop }} />
          )}
          <g transform={`translate(0 ${faceUp ? faceY - 10 : faceY + 22})`}>
            <Mark kind={reading.mark} r={4.5} />
          </g>
        </svg>
      </svg>
      <span
        aria-hidden="true"
        title={reading.label}
        className="absolute inset-x-px truncate text-center font-label text-xs/[14px] font-medium text-pencil"
        style={{ top: faceUp ? faceY - 34 : faceY + 31 }}
      >
        {reading.label}
      </span>
    </li>
  );
}

/** Drawn around the middle of the column; the disc touches the end of the tick, because cover is read to the bar's near side. */
function Tick({
  mm,
  mark,
  struck,
  layout,
  text,
  drop,
}: Pick<ColumnProps, 'layout' | 'text' | 'drop'> & { mm: number; mark: MarkKind; struck?: boolean }) {
  const { faceY, faceUp, barPx, deepestMm } = layout;
  const into = faceUp ? 1 : -1;
  const end = depthY(layout, mm);
  const radius = barPx / 2;
  const centre = end + into * radius;
  const doubtful = mark === 'not-verified' || struck;
  const colour = mark === 'met' || doubtful ? 'var(--ink)' : markColour[mark];
  const figureY = faceUp ? end + barPx + 15 : end - barPx - 5;
  const beyond = mm > deepestMm;
  return (
    <>
      <g
        className={drop ? 'tick-drop' : undefined}
        style={drop ? { transformOrigin: faceUp ? 'top' : 'bottom' } : undefined}
      >
        <line
          y1={faceY}
          y2={end}
          stroke={colour}
          strokeWidth={mark === 'not-met-low' && !doubtful ? 3 : 2}
          strokeDasharray={doubtful ? '3 3' : undefined}
        />
      </g>
      <g className={drop ? 'bar-settle' : undefined}>
        <circle
          cy={centre}
          r={Math.max(radius - 0.75, 1)}
          fill={doubtful || mark === 'not-met-high' ? 'var(--sheet)' : 'var(--steel)'}
          stroke={colour}
          strokeWidth="1.5"
          strokeDasharray={doubtful ? '3 2.4' : undefined}
        />
        {beyond && (
          <path
            d={`M-7 ${end - into * 14}l14-5M-7 ${end - into * 8}l14-5`}
            stroke={colour}
            strokeWidth="1.75"
            fill="none"
          />
        )}
        <text
          y={figureY}
          textAnchor="middle"
          className="font-figure"
          fontSize="13"
          fontWeight={mark === 'not-met-low' || mark === 'not-met-high' ? 700 : 500}
          fill={colour}
          stroke={Math.abs(figureY - 4 - faceY) < layout.bandPx ? 'var(--band)' : 'var(--sheet)'}
          strokeWidth="4"
          paintOrder="stroke"
        >
          {text}
        </text>
        {struck && text !== null && (
          <path
            d={`M${-text.length * 4.4} ${figureY - 4.5}h${text.length * 8.8}`}
            stroke={colour}
            strokeWidth="1.75"
          />
        )}
      </g>
    </>
  );
}
