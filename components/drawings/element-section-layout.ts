export interface SectionLayer {
  id: string;
  /** "T1 16 at 150", as the drawing letters it. */
  label: string;
  /** Which face the depth counts from: the near one (top, or left) or the far one (bottom, or right). */
  face: 'near' | 'far';
  /** Face to the near side of the bars, mm. */
  depthMm: number;
  diameterMm: number;
  /** The section cuts the bars, or they run along it. */
  run: 'cut' | 'along';
  spacingMm?: number | null;
}

export interface SectionScale {
  /** px per mm, over both depths and lengths. */
  perMm: number;
  /** px across the thickness as drawn. */
  acrossPx: number;
  /** Where the middle is left out, px from the near face; null where the thickness is drawn whole. */
  breakPx: number | null;
  /** px from the near face to a place that lies `mm` inside the near or the far face. */
  at: (face: 'near' | 'far', mm: number) => number;
}

/**
 * The scale of a section: the whole thickness where the covers stay readable, else both faces to scale with the middle
 * left out between them.
 * @param roomPx px that there are for the thickness
 */
export function sectionScale(
  thicknessMm: number,
  layers: readonly SectionLayer[],
  roomPx: number,
): SectionScale {
  const reach = (face: 'near' | 'far') =>
    Math.max(60, ...layers.filter((l) => l.face === face).map((l) => (l.depthMm + l.diameterMm) * 1.35));
  const shownMm = reach('near') + reach('far');
  const broken = thicknessMm > 450 && shownMm < thicknessMm * 0.6;
  const gapPx = 30;
  const perMm = broken ? (roomPx - gapPx) / shownMm : roomPx / thicknessMm;
  const scale = Math.min(perMm, 1.2);
  const acrossPx = broken ? shownMm * scale + gapPx : thicknessMm * scale;
  return {
    perMm: scale,
    acrossPx,
    breakPx: broken ? reach('near') * scale + gapPx / 2 : null,
    at: (face, mm) => {
      const fromNear = face === 'near' ? mm : thicknessMm - mm;
      // Where the middle is left out, what lies past one face's piece is measured from the other.
      const nearPiece = broken ? fromNear < thicknessMm - reach('far') : face === 'near';
      return nearPiece ? fromNear * scale : acrossPx - (thicknessMm - fromNear) * scale;
    },
  };
}

/** Moves labels apart to at least `gap`, in their order, inside 0 to `room` where they fit. */
export function spreadLabels(wanted: readonly number[], gap: number, room: number): number[] {
  const placed: number[] = [];
  for (const at of wanted) placed.push(Math.max(at, (placed.at(-1) ?? -Infinity) + gap));
  const over = (placed.at(-1) ?? 0) - room;
  if (over > 0) {
    for (let i = placed.length - 1; i >= 0; i -= 1) {
      const limit = i === placed.length - 1 ? room : (placed[i + 1] ?? room) - gap;
      placed[i] = Math.min(placed[i] ?? 0, limit);
    }
  }
  return placed;
}
