import { withUnit } from '@/lib/concrete/length';
import type { LapScene } from './lap-calculation';

const wide = 400;
const lapPx = 250;
const from = (wide - lapPx) / 2;

/** The end of a bar where the drawing stops: a break line across it. */
function Break({ x, y, thick }: { x: number; y: number; thick: number }) {
  const h = thick / 2 + 5;
  return (
    <path
      d={`M${x} ${y - h}V${y - 3}l-4-2 8 6-4-1V${y + h}`}
      stroke="var(--pencil)"
      fill="none"
      strokeLinejoin="round"
    />
  );
}

/** Two bars that lap, lengths and diameters to one scale, with the length required and the least accepted. */
export function LapDrawing({ scene }: { scene: LapScene }) {
  const { lapMm, leastMm, diameterMm, largerMm, units } = scene;
  const perMm = lapPx / lapMm;
  const thick = Math.max(3, Math.min(40, diameterMm * perMm));
  const larger = Math.max(3, Math.min(40, largerMm * perMm));
  const upper = 52 + thick / 2;
  const lower = upper + thick / 2 + larger / 2 + 1;
  const under = lower + larger / 2;
  const to = from + lapPx;
  const least = from + leastMm * perMm;
  const shorter = lapMm - leastMm > 1e-6;
  const height = under + (shorter ? 62 : 22);
  const line = { fill: 'var(--steel)', stroke: 'var(--ink)' };
  const figure = {
    className: 'font-figure',
    fontSize: 12.5,
    fontWeight: 500,
    textAnchor: 'middle' as const,
    stroke: 'var(--sheet)',
    strokeWidth: 4,
    paintOrder: 'stroke',
  };
  return (
    <svg
      viewBox={`0 0 ${wide} ${height}`}
      role="img"
      aria-label={`Two bars lapping over ${withUnit(lapMm, units)}${shorter ? `, least accepted ${withUnit(leastMm, units)}` : ''}.`}
      className="block w-full max-w-[34rem]"
    >
      <rect x={6} y={upper - thick / 2} width={to - 6} height={thick} {...line} />
      <rect x={from} y={lower - larger / 2} width={wide - 6 - from} height={larger} {...line} />
      <Break x={10} y={upper} thick={thick} />
      <Break x={wide - 10} y={lower} thick={larger} />
      <path
        d={`M${from} 20V${upper - thick / 2 - 3}M${to} 20V${upper - thick / 2 - 3}M${from} 28H${to}`}
        stroke="var(--pencil)"
        fill="none"
      />
      <path d={`M${from - 4} 32l8-8M${to - 4} 32l8-8`} stroke="var(--ink)" strokeWidth="1.5" />
      <text x={wide / 2} y={20} {...figure} fill="var(--ink)">
        {withUnit(lapMm, units)}
      </text>
      {shorter && (
        <g>
          <path
            d={`M${from} ${under + 5}V${under + 30}M${least} ${under + 5}V${under + 30}M${from} ${under + 24}H${least}`}
            stroke="var(--hold)"
            strokeDasharray="8 4"
            fill="none"
          />
          <text x={(from + least) / 2} y={under + 44} {...figure} fill="var(--hold)">
            least accepted {withUnit(leastMm, units)}
          </text>
        </g>
      )}
    </svg>
  );
}
