import { withUnit } from '@/lib/concrete/length';
import type { ClearDistanceScene } from './clear-distance-calculation';

const wide = 400;

/**
 * Bars at their least clear distance, with the largest stone of the mix in the gap, all to one scale; a gap that was
 * found is drawn beside it. Layers lie above each other, bars of a layer beside each other.
 */
export function ClearDistanceDrawing({ scene }: { scene: ClearDistanceScene }) {
  const { leastMm, foundMm, diameterMm, aggregateMm, units, upright } = scene;
  const gaps = [leastMm, ...(foundMm === null ? [] : [foundMm])];
  const runMm = gaps.reduce((sum, gap) => sum + gap, (gaps.length + 1) * diameterMm);
  const acrossMm = Math.max(diameterMm, aggregateMm);
  const perMm = Math.min((upright ? 230 : 330) / runMm, 96 / acrossMm, 3);
  const run = runMm * perMm;
  const across = acrossMm * perMm;
  const start = upright ? 12 : (wide - run) / 2;
  const middle = upright ? 110 : 18 + across / 2;
  const height = upright ? run + 24 : across + 74;
  const place = (along: number, off = 0) =>
    upright ? { cx: middle + off, cy: start + along } : { cx: start + along, cy: middle + off };
  let along = 0;
  const edges = gaps.map((gap) => {
    const from = along + diameterMm * perMm;
    along = from + gap * perMm;
    return { from, to: along, gap };
  });
  const bars = [0, ...edges.map((edge) => edge.to)].map((at) => at + (diameterMm * perMm) / 2);
  const words = foundMm === null ? '' : ` A gap of ${withUnit(foundMm, units, leastMm)} was found.`;
  return (
    <svg
      viewBox={`0 0 ${wide} ${Math.ceil(height)}`}
      role="img"
      aria-label={`Bars of ${withUnit(diameterMm, units)} at least ${withUnit(leastMm, units, foundMm ?? undefined)} apart, largest aggregate ${withUnit(aggregateMm, units)} in the gap.${words}`}
      className="block w-full max-w-[34rem]"
    >
      {bars.map((at) => (
        <circle
          key={at}
          {...place(at)}
          r={(diameterMm * perMm) / 2}
          fill="var(--steel)"
          stroke="var(--ink)"
          strokeWidth="1.5"
        />
      ))}
      {edges.map(({ from, to, gap }, index) => (
        <g key={index}>
          <circle
            {...place((from + to) / 2)}
            r={(aggregateMm * perMm) / 2}
            fill="none"
            stroke="var(--pencil)"
            strokeDasharray="3 3"
          />
          <Gap
            from={start + from}
            to={start + to}
            at={upright ? middle + across / 2 + 14 : middle + across / 2 + 14}
            upright={upright}
            text={withUnit(gap, units, index === 0 ? (foundMm ?? undefined) : leastMm)}
            word={index === 0 ? 'least' : 'found'}
            low={index === 1 && gap < leastMm - 1e-6}
          />
        </g>
      ))}
    </svg>
  );
}

function Gap(props: {
  from: number;
  to: number;
  at: number;
  upright: boolean;
  text: string;
  word: string;
  low: boolean;
}) {
  const { from, to, at, upright, text, word, low } = props;
  const colour = low ? 'var(--hold)' : 'var(--ink)';
  const middle = (from + to) / 2;
  const path = upright
    ? `M${at - 8} ${from}h16M${at - 8} ${to}h16M${at} ${from}V${to}`
    : `M${from} ${at - 8}v16M${to} ${at - 8}v16M${from} ${at}H${to}`;
  return (
    <g>
      <path d={path} stroke={low ? 'var(--hold)' : 'var(--pencil)'} fill="none" />
      <text
        x={upright ? at + 14 : middle}
        y={upright ? middle + 4 : at + 24}
        textAnchor={upright ? 'start' : 'middle'}
        fill={colour}
        className="font-figure"
        fontSize="12.5"
        fontWeight={low ? 700 : 500}
      >
        {text}
      </text>
      <text
        x={upright ? at + 14 : middle}
        y={upright ? middle + 20 : at + 39}
        textAnchor={upright ? 'start' : 'middle'}
        fill={colour}
        className="font-label"
        fontSize="13"
      >
        {word}
      </text>
    </g>
  );
}
