export interface CoverSectionScale {
  /** Pixels per millimetre of depth; the bar's disc is drawn to the same scale. */
  perMm: number;
  /** Greatest depth shown, mm; what lies deeper is drawn at it, with a break. */
  deepestMm: number;
  depthPx: number;
  barPx: number;
  /** Least width of one reading's column. */
  columnPx: number;
}

/**
 * The scale of a cover section: one for depth and bar, chosen so that the deepest reading and a bar behind it fit and
 * many readings still make few rows.
 * @param labelLength characters of the longest label or figure
 */
export function coverSectionScale(input: {
  specifiedMm: number;
  mostAcceptedMm: number | null;
  readingsMm: readonly number[];
  barDiameterMm: number;
  labelLength: number;
}): CoverSectionScale {
  const { specifiedMm, mostAcceptedMm, readingsMm, barDiameterMm, labelLength } = input;
  const asked = Math.max(specifiedMm, mostAcceptedMm ?? 0);
  const deepestMm = Math.max(asked * 1.12, Math.min(asked * 1.8, Math.max(asked, ...readingsMm)));
  const count = readingsMm.length;
  const wantedPx = count > 80 ? 104 : count > 36 ? 124 : 150;
  const bar = Math.min(barDiameterMm, deepestMm * 0.9);
  const perMm = wantedPx / (deepestMm + bar);
  const barPx = bar * perMm;
  const textPx = Math.max(3, labelLength) * 7.4 + 6;
  return {
    perMm,
    deepestMm,
    depthPx: deepestMm * perMm,
    barPx,
    columnPx: Math.ceil(Math.max(barPx + 6, textPx, 34)),
  };
}
