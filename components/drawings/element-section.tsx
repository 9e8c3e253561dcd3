import { useId } from 'react';
import { sectionScale, spreadLabels, type SectionLayer } from './element-section-layout';
import { groundWords, HatchPattern, type Ground } from './hatch';
import { SectionBars } from './section-bars';

export type { SectionLayer } from './element-section-layout';

export interface SectionFace {
  name: string;
  meeting: Ground;
  /** Specified cover, mm, and the least accepted: the band. */
  specifiedMm?: number;
  leastAcceptedMm?: number;
}

export interface ElementSectionProps {
  name: string;
  thicknessMm: number;
  /** Level: the near face is on top (slabs, decks). Upright: it is on the left (walls). */
  orientation?: 'level' | 'upright';
  near: SectionFace;
  far: SectionFace;
  layers: readonly SectionLayer[];
  /** Chairs or spacers that stand on the far face. */
  supports?: readonly { id: string; label: string; heightMm: number }[];
  /** Writes a length with its unit. */
  format: (mm: number) => string;
}

const room = { across: 160, along: 182, side: 74 };

/**
 * A piece of an element, cut: both faces with what lies beyond them, its layers as discs where the section cuts them
 * and as lines where they run along it, covers and thickness as dimensions, supports at their height. A section that
 * is drawn level and one that stands upright are the same drawing turned; the lettering stays level.
 */
export function ElementSection(props: ElementSectionProps) {
  const { name, thicknessMm, orientation = 'level', near, far, layers, supports = [], format } = props;
  const id = useId();
  const upright = orientation === 'upright';
  const scale = sectionScale(thicknessMm, layers, room.across);
  const across = scale.acrossPx;
  const inOrder = [...layers].sort((a, b) => scale.at(a.face, a.depthMm) - scale.at(b.face, b.depthMm));
  const middle = (layer: SectionLayer) => scale.at(layer.face, layer.depthMm + layer.diameterMm / 2);
  const height = upright
    ? room.along +
      36 +
      Math.max(...(['near', 'far'] as const).map((f) => layers.filter((l) => l.face === f).length)) * 16
    : across + 52;
  const faces = [
    { ...near, at: 0, into: 1, side: 'near' as const },
    { ...far, at: across, into: -1, side: 'far' as const },
  ];
  const words = [
    `${name}, ${format(thicknessMm)} thick`,
    ...faces.map(
      (f) =>
        `${f.name}: ${groundWords[f.meeting]}${f.specifiedMm === undefined ? '' : `, cover ${format(f.specifiedMm)}`}`,
    ),
    ...inOrder.map(
      (l) => `${l.label}, ${format(l.depthMm)} from ${l.face === 'near' ? near.name : far.name}`,
    ),
    ...supports.map((s) => `${s.label}, ${format(s.heightMm)} high`),
  ];

  return (
    <svg
      viewBox={`0 0 400 ${Math.ceil(height)}`}
      role="img"
      aria-label={`${words.join('. ')}.`}
      className="block w-full max-w-[34rem]"
    >
      <defs>
        <HatchPattern id={`${id}n`} ground={near.meeting} />
        <HatchPattern id={`${id}f`} ground={far.meeting} />
      </defs>
      {/* The cut itself is drawn level, v downwards from the near face; upright it is turned about its corner. */}
      <g
        transform={
          upright
            ? `translate(${200 - across / 2} ${22 + room.along}) rotate(-90)`
            : `translate(${room.side} 22)`
        }
      >
        {faces.map((face) => (
          <g key={face.side}>
            {face.leastAcceptedMm !== undefined && (
              <rect
                y={face.into > 0 ? 0 : across - face.leastAcceptedMm * scale.perMm}
                width={room.along}
                height={face.leastAcceptedMm * scale.perMm}
                fill="var(--band)"
              />
            )}
            <rect
              y={face.into > 0 ? -12 : across}
              width={room.along}
              height="12"
              fill={`url(#${id}${face.side === 'near' ? 'n' : 'f'})`}
            />
          </g>
        ))}
        {supports.map((support, index) => {
          const u = (room.along * (index + 1)) / (supports.length + 1);
          const top = scale.at('far', support.heightMm);
          return (
            <path
              key={support.id}
              d={`M${u - 13} ${across}L${u - 5} ${top}H${u + 5}L${u + 13} ${across}`}
              fill="none"
              stroke="var(--pencil)"
              strokeWidth="2"
              strokeLinejoin="round"
            />
          );
        })}
        <SectionBars layers={layers} scale={scale} alongPx={room.along} />
        {faces.map((face) => (
          <line
            key={face.side}
            x2={room.along}
            y1={face.at}
            y2={face.at}
            stroke="var(--ink)"
            strokeWidth="3"
          />
        ))}
        <path
          d={`M0-3V${across + 3}M${room.along}-3V${across + 3}`}
          stroke="var(--pencil)"
          strokeDasharray="7 3 2 3"
          fill="none"
        />
        {scale.breakPx !== null && (
          <g>
            <rect x="-6" y={scale.breakPx - 5} width={room.along + 12} height="10" fill="var(--sheet)" />
            <path
              d={[-5, 5]
                .map((o) => {
                  const y = (scale.breakPx ?? 0) + o;
                  return `M-6 ${y}H${room.along / 2 - 8}l5-8 6 16 5-8H${room.along + 6}`;
                })
                .join('')}
              stroke="var(--pencil)"
              fill="none"
            />
          </g>
        )}
      </g>
      {upright ? (
        <UprightLettering {...{ near, far, across, format, thicknessMm, inOrder, middle }} />
      ) : (
        <LevelLettering
          {...{ near, far, across, format, thicknessMm, inOrder, middle }}
          perMm={scale.perMm}
        />
      )}
    </svg>
  );
}

interface LetteringProps {
  near: SectionFace;
  far: SectionFace;
  across: number;
  thicknessMm: number;
  format: (mm: number) => string;
  inOrder: readonly SectionLayer[];
  middle: (layer: SectionLayer) => number;
}

const figures = { className: 'font-figure', fontSize: 13, fontWeight: 500, fill: 'var(--pencil)' };
const letters = { className: 'font-label', fontSize: 14, fontWeight: 500, fill: 'var(--ink)' };

/** What does not fit beside the section is cut; the text alternative has it whole. */
function shortLabel(label: string): string {
  return label.length > 19 ? `${label.slice(0, 18)}…` : label;
}

function LevelLettering({
  near,
  far,
  across,
  thicknessMm,
  format,
  inOrder,
  middle,
  perMm,
}: LetteringProps & { perMm: number }) {
  const right = room.side + room.along;
  const labels = spreadLabels(inOrder.map(middle), 15, across);
  const cover = (face: SectionFace, at: number, into: number) =>
    face.specifiedMm === undefined ? null : (
      <g>
        <path
          d={`M${room.side - 10} ${at}h-8M${room.side - 10} ${at + into * face.specifiedMm * perMm}h-8M${room.side - 14} ${at}V${at + into * face.specifiedMm * perMm}`}
          stroke="var(--pencil)"
          fill="none"
        />
        <text
          x={room.side - 21}
          y={at + (into * face.specifiedMm * perMm) / 2 + 4}
          textAnchor="end"
          {...figures}
        >
          {format(face.specifiedMm)}
        </text>
      </g>
    );
  return (
    <g transform="translate(0 22)">
      {cover(near, 0, 1)}
      {cover(far, across, -1)}
      <text x={room.side - 21} y={across / 2 + 4} textAnchor="end" {...figures} fill="var(--ink)">
        {format(thicknessMm)}
      </text>
      <text x={room.side} y={-15} {...letters} fill="var(--pencil)" fontSize="13">
        {near.name}
      </text>
      <text x={room.side} y={across + 27} {...letters} fill="var(--pencil)" fontSize="13">
        {far.name}
      </text>
      {inOrder.map((layer, index) => {
        const y = labels[index] ?? 0;
        return (
          <g key={layer.id}>
            <path
              d={`M${right + 3} ${middle(layer)}L${right + 14} ${y}h5`}
              stroke="var(--pencil)"
              fill="none"
            />
            <text x={right + 23} y={y + 4} {...letters}>
              {shortLabel(layer.label)}
            </text>
          </g>
        );
      })}
    </g>
  );
}

function UprightLettering({ near, far, across, thicknessMm, format, inOrder, middle }: LetteringProps) {
  const left = 200 - across / 2;
  const foot = 22 + room.along;
  const nearLayers = inOrder.filter((layer) => layer.face === 'near');
  const farLayers = inOrder.filter((layer) => layer.face === 'far').reverse();
  const side = (layers: readonly SectionLayer[], anchor: 'end' | 'start') =>
    layers.map((layer, index) => {
      const x = left + middle(layer);
      const y = foot + 20 + index * 16;
      const out = anchor === 'end' ? -1 : 1;
      return (
        <g key={layer.id}>
          <path d={`M${x} ${foot + 3}V${y}h${out * 8}`} stroke="var(--pencil)" fill="none" />
          <text x={x + out * 11} y={y + 4} textAnchor={anchor} {...letters}>
            {shortLabel(layer.label)}
          </text>
        </g>
      );
    });
  const face = (f: SectionFace, x: number, anchor: 'end' | 'start') => (
    <g>
      <text x={x} y={40} textAnchor={anchor} {...letters} fill="var(--pencil)" fontSize="13">
        {f.name}
      </text>
      {f.specifiedMm !== undefined && (
        <text x={x} y={57} textAnchor={anchor} {...figures}>
          {format(f.specifiedMm)}
        </text>
      )}
    </g>
  );
  return (
    <g>
      {face(near, left - 18, 'end')}
      {face(far, left + across + 18, 'start')}
      <text x={200} y={14} textAnchor="middle" {...figures} fill="var(--ink)">
        {format(thicknessMm)}
      </text>
      {side(nearLayers, 'end')}
      {side(farLayers, 'start')}
    </g>
  );
}
