import { finite } from '@/lib/concrete/check-input';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import { seededRandom } from '@/lib/concrete/seeded-random';

interface Rectangle {
  xMm: number;
  yMm: number;
  widthMm: number;
  heightMm: number;
}

export interface DrawPointsInput {
  /** Made of pour and face only, so that devices, years and plan revisions draw the same. */
  seed: string;
  widthMm: number;
  heightMm: number;
  /** How many points, one in each cell. */
  count: number;
  openings?: readonly Rectangle[];
}

export interface DrawnPoint {
  /** Row letter and column number: `A1`. */
  cell: string;
  xMm: number;
  yMm: number;
}

const MOST_POINTS = 500;

/** Row letters as drawings use them: 0 -> A, 25 -> Z, 26 -> AA. */
function rowLetter(index: number): string {
  const tail = String.fromCharCode(65 + (index % 26));
  return index < 26 ? tail : rowLetter(Math.floor(index / 26) - 1) + tail;
}

/** Cells per row for `rows` rows: even, the first rows carrying one more where it does not divide. */
function cellsPerRow(count: number, rows: number): number[] {
  const base = Math.floor(count / rows);
  return Array.from({ length: rows }, (_, row) => base + (row < count % rows ? 1 : 0));
}

/** The number of rows that makes the cells nearest to squares. */
function bestRows(count: number, widthMm: number, heightMm: number): number {
  let best = 1;
  let least = Infinity;
  for (let rows = 1; rows <= count; rows += 1) {
    const rowHeight = heightMm / rows;
    const cost = cellsPerRow(count, rows).reduce(
      (sum, cells) => sum + cells * Math.abs(Math.log(widthMm / cells / rowHeight)),
      0,
    );
    if (cost < least - 1e-9) {
      best = rows;
      least = cost;
    }
  }
  return best;
}

/** The parts of a cell that no opening covers, as rectangles; openings that lie elsewhere leave it whole. */
function freeParts(cell: Rectangle, all: readonly Rectangle[]): Rectangle[] {
  const openings = all.filter(
    (o) =>
      o.xMm < cell.xMm + cell.widthMm &&
      o.xMm + o.widthMm > cell.xMm &&
      o.yMm < cell.yMm + cell.heightMm &&
      o.yMm + o.heightMm > cell.yMm,
  );
  const right = cell.xMm + cell.widthMm;
  const bottom = cell.yMm + cell.heightMm;
  const cuts = (from: number, to: number, values: number[]) =>
    [from, to, ...values.filter((value) => value > from && value < to)].sort((a, b) => a - b);
  const xs = cuts(
    cell.xMm,
    right,
    openings.flatMap((o) => [o.xMm, o.xMm + o.widthMm]),
  );
  const ys = cuts(
    cell.yMm,
    bottom,
    openings.flatMap((o) => [o.yMm, o.yMm + o.heightMm]),
  );
  const parts: Rectangle[] = [];
  for (let row = 0; row + 1 < ys.length; row += 1) {
    for (let column = 0; column + 1 < xs.length; column += 1) {
      const [x0, x1, y0, y1] = [xs[column], xs[column + 1], ys[row], ys[row + 1]] as [
        number,
        number,
        number,
        number,
      ];
      const middleX = (x0 + x1) / 2;
      const middleY = (y0 + y1) / 2;
      const covered = openings.some(
        (o) =>
          middleX > o.xMm && middleX < o.xMm + o.widthMm && middleY > o.yMm && middleY < o.yMm + o.heightMm,
      );
      if (!covered && x1 > x0 && y1 > y0) {
        parts.push({ xMm: x0, yMm: y0, widthMm: x1 - x0, heightMm: y1 - y0 });
      }
    }
  }
  return parts;
}

/** Whole millimetres where the rectangle holds such a place, so that a person can set it out. */
function wholeInside(value: number, from: number, to: number): number {
  const whole = Math.floor(value);
  return whole >= from && whole <= to ? whole : value;
}

function drawIn(parts: readonly Rectangle[], seed: string): { xMm: number; yMm: number } {
  const random = seededRandom(seed);
  let rest = random() * parts.reduce((sum, part) => sum + part.widthMm * part.heightMm, 0);
  const along = random();
  const across = random();
  let chosen = parts[0] as Rectangle;
  for (const part of parts) {
    chosen = part;
    rest -= part.widthMm * part.heightMm;
    if (rest < 0) break;
  }
  return {
    xMm: wholeInside(chosen.xMm + along * chosen.widthMm, chosen.xMm, chosen.xMm + chosen.widthMm),
    yMm: wholeInside(chosen.yMm + across * chosen.heightMm, chosen.yMm, chosen.yMm + chosen.heightMm),
  };
}

/**
 * Draws reading points by stratified random sampling: the face is divided into `count` cells as square as its shape
 * allows, and one point is drawn in each, evenly over the part of the cell that is no opening. The draw depends on the
 * seed and the cell's own outline and openings only: where the number or an opening changes, the points of cells that
 * stay as they were stay too. A cell that lies in an opening altogether gives its point to the nearest cell that does
 * not, under its own label. Coordinates in mm from the face's corner. Refuses impossible sizes, counts, and a face
 * that is all opening (`ConcreteError`).
 */
export function drawPoints(input: DrawPointsInput): DrawnPoint[] {
  const widthMm = requirePositive('widthMm', input.widthMm);
  const heightMm = requirePositive('heightMm', input.heightMm);
  if (!Number.isInteger(input.count) || input.count < 1 || input.count > MOST_POINTS) {
    throw new ConcreteError('count', `The number of points is a whole number from 1 to ${MOST_POINTS}.`);
  }
  for (const opening of input.openings ?? []) {
    if (![opening.xMm, opening.yMm, opening.widthMm, opening.heightMm].every(Number.isFinite)) {
      throw new ConcreteError('openings', 'An opening has a place and a size in finite numbers.');
    }
  }
  const rows = cellsPerRow(input.count, bestRows(input.count, widthMm, heightMm));
  const cells = rows.flatMap((columns, row) =>
    Array.from({ length: columns }, (_, column) => {
      const outline: Rectangle = {
        xMm: (widthMm / columns) * column,
        yMm: (heightMm / rows.length) * row,
        widthMm: widthMm / columns,
        heightMm: heightMm / rows.length,
      };
      return {
        label: `${rowLetter(row)}${column + 1}`,
        outline,
        free: freeParts(outline, input.openings ?? []),
      };
    }),
  );
  const open = cells.filter((cell) => cell.free.length > 0);
  if (open.length === 0) throw new ConcreteError('openings', 'Openings cover the whole face.');
  return cells.map((cell) => {
    const { xMm, yMm, widthMm: w, heightMm: h } = cell.outline;
    const key = [input.seed, ...[xMm, yMm, w, h].map((side) => side.toFixed(3))].join('|');
    const host = cell.free.length > 0 ? cell : nearestCell(cell.outline, open);
    return { cell: cell.label, ...drawIn(host.free, key) };
  });
}

function nearestCell<C extends { outline: Rectangle }>(to: Rectangle, cells: readonly C[]): C {
  const distance = ({ outline }: C) => Math.hypot(outline.xMm - to.xMm, outline.yMm - to.yMm);
  return cells.reduce((best, cell) => (distance(cell) < distance(best) ? cell : best));
}

/** Square metres of face per drawn point, by element type: common practice, denser where the section is small. */
const AREA_PER_POINT_M2: Record<string, number> = {
  slab: 5,
  deck: 4,
  mat: 6,
  wall: 4,
  footing: 3,
  pier: 2,
  column: 1,
  beam: 1.5,
  stair: 1,
};

const FEWEST_POINTS = 5;
const MOST_BY_DEFAULT = 60;

/** How many points a face gets unless the planner says otherwise: by element type and area, 5 to 60. */
export function defaultPointCount(element: string, areaMm2: number): number {
  requirePositive('areaMm2', areaMm2);
  const perPoint = AREA_PER_POINT_M2[element];
  if (perPoint === undefined)
    throw new ConcreteError('element', `"${element}" is no element type known here.`);
  const count = Math.ceil(areaMm2 / 1e6 / perPoint - 1e-9);
  return Math.min(MOST_BY_DEFAULT, Math.max(FEWEST_POINTS, count));
}

/**
 * The nearest other point to each side of `point` (left, right, above, below), at most four, nearest first: these are
 * read again with a point that was put right.
 */
export function neighboursOf<P extends { xMm: number; yMm: number }>(
  point: { xMm: number; yMm: number },
  points: readonly P[],
): P[] {
  const nearest = new Map<string, { point: P; distance: number }>();
  for (const other of points) {
    const dx = finite('xMm', other.xMm) - finite('xMm', point.xMm);
    const dy = finite('yMm', other.yMm) - finite('yMm', point.yMm);
    const distance = Math.hypot(dx, dy);
    if (distance === 0) continue;
    const side = Math.abs(dx) >= Math.abs(dy) ? (dx < 0 ? 'left' : 'right') : dy < 0 ? 'above' : 'below';
    const held = nearest.get(side);
    if (!held || distance < held.distance) nearest.set(side, { point: other, distance });
  }
  return [...nearest.values()].sort((a, b) => a.distance - b.distance).map((held) => held.point);
}
