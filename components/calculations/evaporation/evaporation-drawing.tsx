import { numberText } from '@/lib/concrete/number-text';
import type { EvaporationScene } from './evaporation-calculation';

const left = 16;
const wide = 368;

/** Even steps of 1, 2 or 5 times a power of ten, so that four to ten of them make up the scale. */
function stepOf(most: number): number {
  const raw = most / 6;
  const power = 10 ** Math.floor(Math.log10(raw));
  return [1, 2, 5, 10].map((times) => times * power).find((step) => step >= raw) ?? raw;
}

/**
 * The rate on a ruled line, to scale: from its low to its high end a band, the rate itself a tick, the limit dashed
 * as limits are on every sheet.
 */
export function EvaporationDrawing({ scene }: { scene: EvaporationScene }) {
  const { rate, rateText, low, high, threshold, unit } = scene;
  const from = Math.min(0, low);
  const step = stepOf(Math.max(high, threshold * 1.25) - from);
  const first = Math.floor(from / step) * step;
  const last = Math.ceil(Math.max(high, threshold * 1.25) / step) * step;
  const x = (value: number) => left + ((value - first) / (last - first)) * wide;
  const marks = Array.from({ length: Math.round((last - first) / step) + 1 }, (_, i) => first + i * step);
  const end = (at: number) => (at > 330 ? 'end' : at < 70 ? 'start' : 'middle');
  return (
    <svg
      viewBox="0 0 400 132"
      role="img"
      aria-label={`Evaporation rate ${rateText} ${unit}, from ${numberText(low, 3)} to ${numberText(high, 3)} with its uncertainty; protect from ${numberText(threshold, 2)}.`}
      className="block w-full max-w-[34rem]"
    >
      <g className="font-figure" fontSize="12.5" fontWeight="500">
        <rect x={x(threshold)} y="34" width={x(last) - x(threshold)} height="62" fill="var(--band)" />
        <rect
          x={x(low)}
          y="60"
          width={Math.max(2, x(high) - x(low))}
          height="18"
          fill="var(--steel)"
          stroke="var(--ink)"
        />
        <line
          x1={x(threshold)}
          x2={x(threshold)}
          y1="34"
          y2="96"
          stroke="var(--hold)"
          strokeWidth="1.75"
          strokeDasharray="8 4"
        />
        <line x1={x(rate)} x2={x(rate)} y1="48" y2="96" stroke="var(--ink)" strokeWidth="3" />
        <line x1={left} x2={left + wide} y1="96" y2="96" stroke="var(--ink)" strokeWidth="2" />
        {marks.map((value) => (
          <g key={value}>
            <path d={`M${x(value)} 96v6`} stroke="var(--ink)" />
            <text x={x(value)} y="117" textAnchor="middle" fill="var(--pencil)">
              {numberText(value, 3)}
            </text>
          </g>
        ))}
        <text
          x={x(rate)}
          y="44"
          textAnchor={end(x(rate))}
          fill="var(--ink)"
          fontWeight="700"
          stroke="var(--sheet)"
          strokeWidth="4"
          paintOrder="stroke"
        >
          {rateText}
        </text>
        <text
          x={x(threshold)}
          y="24"
          textAnchor={end(x(threshold))}
          fill="var(--hold)"
          className="font-label"
          fontSize="13"
        >
          protect from {numberText(threshold, 2)}
        </text>
        <text x={left} y="130" fill="var(--pencil)" className="font-label">
          {unit}
        </text>
      </g>
    </svg>
  );
}
