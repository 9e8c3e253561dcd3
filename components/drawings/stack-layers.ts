/**
 * Depth of each layer of one face, from the face to the near side of its bars: the outermost lies at the cover, each
 * further one on the bars before it, without a gap.
 * @param coverMm cover to the outermost bar
 * @param layers layers of the face; `order` 1 is outermost
 * @returns the same layers with `depthMm`, outermost first
 */
export function stackLayers<L extends { order: number; diameterMm: number }>(
  coverMm: number,
  layers: readonly L[],
): (L & { depthMm: number })[] {
  let depthMm = coverMm;
  return [...layers]
    .sort((a, b) => a.order - b.order)
    .map((layer) => {
      const at = depthMm;
      depthMm += layer.diameterMm;
      return { ...layer, depthMm: at };
    });
}
