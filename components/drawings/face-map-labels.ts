/** To which side of its mark a label stands: 1 is right, or below; -1 is left, or above. */
export interface LabelSide {
  x: 1 | -1;
  y: 1 | -1;
}

interface Labelled {
  id: string;
  label: string;
  xMm: number;
  yMm: number;
}

interface Box {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

/** Width a face is taken to be drawn at, px: that of a small phone, where labels are nearest to each other. */
const DRAWN_PX = 330;
const MARK_PX = 8;
const LETTER_PX = 6.5;
const LINE_PX = 12;
/** In the order in which they are tried: above right is where a label is looked for. */
const sides: readonly LabelSide[] = [
  { x: 1, y: -1 },
  { x: -1, y: -1 },
  { x: 1, y: 1 },
  { x: -1, y: 1 },
];

const overlap = (a: Box, b: Box): number =>
  Math.max(0, Math.min(a.right, b.right) - Math.max(a.left, b.left)) *
  Math.max(0, Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top));

const around = (x: number, y: number, reach: number): Box => ({
  left: x - reach,
  top: y - reach,
  right: x + reach,
  bottom: y + reach,
});

/**
 * A side for the label of each point, so that it hides no mark and no other label where that can be had: one after
 * another, each where it covers least.
 * @param aspect width over height as drawn
 */
export function labelSides(
  points: readonly Labelled[],
  face: { widthMm: number; heightMm: number; aspect: number },
): Map<string, LabelSide> {
  const height = DRAWN_PX / face.aspect;
  const placed = points.map((point) => ({
    ...point,
    x: (point.xMm / face.widthMm) * DRAWN_PX,
    y: height - (point.yMm / face.heightMm) * height,
  }));
  const taken: Box[] = placed.map(({ x, y }) => around(x, y, MARK_PX));
  const chosen = new Map<string, LabelSide>();
  for (const [index, { id, label, x, y }] of placed.entries()) {
    const width = Math.min(label.length, 8) * LETTER_PX;
    const boxOf = (side: LabelSide): Box => {
      const near = MARK_PX + 1;
      const left = side.x === 1 ? x + near : x - near - width;
      const top = side.y === 1 ? y + 2 : y - 2 - LINE_PX;
      return { left, top, right: left + width, bottom: top + LINE_PX };
    };
    const cost = (side: LabelSide): number => {
      const box = boxOf(side);
      const inside = overlap(box, { left: 0, top: 0, right: DRAWN_PX, bottom: height });
      const outside = width * LINE_PX - inside;
      return outside + taken.reduce((sum, other, at) => (at === index ? sum : sum + overlap(box, other)), 0);
    };
    const best = sides.reduce((least, side) => (cost(side) < cost(least) - 1e-6 ? side : least));
    chosen.set(id, best);
    taken.push(boxOf(best));
  }
  return chosen;
}
