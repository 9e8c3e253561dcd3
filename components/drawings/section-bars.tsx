import type { SectionLayer, SectionScale } from './element-section-layout';

/** The bars of a section, drawn level: discs where they are cut, a pair of lines where they run along it. */
export function SectionBars({
  layers,
  scale,
  alongPx,
}: {
  layers: readonly SectionLayer[];
  scale: SectionScale;
  alongPx: number;
}) {
  return layers.map((layer) => {
    const v = scale.at(layer.face, layer.depthMm + layer.diameterMm / 2);
    const thick = Math.max(layer.diameterMm * scale.perMm, 3);
    if (layer.run === 'along') {
      return (
        <rect
          key={layer.id}
          y={v - thick / 2}
          width={alongPx}
          height={thick}
          fill="var(--steel)"
          stroke="var(--ink)"
          strokeWidth="1"
        />
      );
    }
    // Bars nearer than they are thick would run together; then the spacing is only hinted at.
    const step = Math.max((layer.spacingMm ?? 200) * scale.perMm, thick * 1.7);
    const count = Math.max(1, Math.floor((alongPx - thick) / step));
    const start = (alongPx - (count - 1) * step) / 2;
    return (
      <g key={layer.id} fill="var(--steel)" stroke="var(--ink)">
        {Array.from({ length: count }, (_, i) => (
          <circle key={i} cx={start + i * step} cy={v} r={thick / 2} />
        ))}
      </g>
    );
  });
}
