import { useId } from 'react';
import { spreadLabels } from '@/components/drawings/element-section-layout';
import { HatchPattern } from '@/components/drawings/hatch';
import { withUnit, type LengthUnit } from '@/lib/concrete/length';
import type { SectionPart } from '@/lib/concrete/supports';
import type { SupportScene } from './support-height-calculation';

const left = 66;
const wide = 150;
const top = 20;
const tall = 210;

/** A support: two legs that spread from its head to its feet. */
function Legs({ from, to }: { from: number; to: number }) {
  return [0.3, 0.7].map((share) => {
    const x = left + wide * share;
    return (
      <path
        key={share}
        d={`M${x - 15} ${to}L${x - 6} ${from + 1}H${x + 6}L${x + 15} ${to}`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="2.5"
        strokeLinejoin="round"
      />
    );
  });
}

/** Bars of a slice: discs where the section cuts them, a line where they run along it. */
function Bars({ from, to, cut }: { from: number; to: number; cut: boolean }) {
  const size = Math.max(3, to - from);
  const middle = (from + to) / 2;
  const line = { fill: 'var(--steel)', stroke: 'var(--ink)' };
  if (!cut) return <rect x={left} y={middle - size / 2} width={wide} height={size} {...line} />;
  return (
    <g {...line}>
      {[0.1, 0.36, 0.64, 0.9].map((share) => (
        <circle key={share} cx={left + wide * share} cy={middle} r={size / 2} />
      ))}
    </g>
  );
}

const isBars = (part: SectionPart) => part.kind === 'layer' || part.name.includes('bars');

/** The section cut through a support, to scale: each slice of the arithmetic lettered beside it. */
export function SupportHeightDrawing({ scene }: { scene: SupportScene }) {
  const id = useId();
  const { thicknessMm, parts, units } = scene;
  const y = (mm: number) => top + (mm / thicknessMm) * tall;
  const ends = (part: SectionPart) => [y(part.fromTopMm), y(part.fromTopMm + part.sizeMm)] as const;
  const labels = spreadLabels(
    parts.map((part) => (ends(part)[0] + ends(part)[1]) / 2),
    16,
    top + tall,
  );
  const say = (mm: number, unit: LengthUnit = units) => withUnit(mm, unit);
  const foot = top + tall;
  return (
    <svg
      viewBox={`0 0 440 ${foot + 26}`}
      role="img"
      aria-label={`Section of ${say(thicknessMm)}, from the top: ${parts.map((part) => `${part.name} ${say(part.sizeMm)}`).join(', ')}.`}
      className="block w-full max-w-[34rem]"
    >
      <defs>
        <HatchPattern id={id} ground="formed" />
      </defs>
      <rect x={left} y={foot} width={wide} height="12" fill={`url(#${id})`} />
      {parts.map((part, index) => {
        const [from, to] = ends(part);
        const bars = isBars(part);
        return (
          <g key={`${index}-${part.name}`}>
            {part.kind === 'cover' && (
              <rect x={left} y={from} width={wide} height={to - from} fill="var(--band)" />
            )}
            {part.kind === 'below' && !bars && (
              <rect
                x={left}
                y={from}
                width={wide}
                height={to - from}
                fill={part.name === 'Bottom cover' ? 'var(--band)' : 'var(--rule)'}
              />
            )}
            {part.kind === 'support' && <Legs from={from} to={to} />}
            {bars && <Bars from={from} to={to} cut={part.name.includes('upper')} />}
            <path
              d={`M${left + wide + 4} ${(from + to) / 2}L${left + wide + 16} ${labels[index] ?? 0}h5`}
              stroke="var(--pencil)"
              fill="none"
            />
            <text
              x={left + wide + 25}
              y={(labels[index] ?? 0) + 4}
              className="font-label"
              fontSize="14"
              fontWeight={part.kind === 'support' ? 700 : 500}
              fill="var(--ink)"
            >
              {part.name} <tspan className="font-figure">{say(part.sizeMm)}</tspan>
            </text>
          </g>
        );
      })}
      <g stroke="var(--ink)" strokeWidth="3">
        <line x1={left} x2={left + wide} y1={top} y2={top} />
        <line x1={left} x2={left + wide} y1={foot} y2={foot} />
      </g>
      <path
        d={`M${left} ${top - 3}V${foot + 3}M${left + wide} ${top - 3}V${foot + 3}`}
        stroke="var(--pencil)"
        strokeDasharray="7 3 2 3"
      />
      <path
        d={`M${left - 16} ${top}h8M${left - 16} ${foot}h8M${left - 12} ${top}V${foot}`}
        stroke="var(--pencil)"
      />
      <text
        x={left - 18}
        y={top + tall / 2 + 4}
        textAnchor="end"
        className="font-figure"
        fontSize="12.5"
        fontWeight="500"
        fill="var(--ink)"
      >
        {say(thicknessMm)}
      </text>
    </svg>
  );
}
