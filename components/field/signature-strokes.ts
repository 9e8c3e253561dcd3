/** The box that a signature is kept in, whatever the size of the screen. */
export const SIGNATURE_WIDTH = 1000;
export const SIGNATURE_HEIGHT = 400;
const MOST_STROKES = 60;
const MOST_NUMBERS = 2000;

/** Strokes as flat lists x, y, x, y … of whole numbers in the box. */
export type Strokes = readonly (readonly number[])[];

const within = (value: number, most: number) => Math.round(Math.min(Math.max(value, 0), most));

/** A place on the pad (px from its corner) as a place in the box. */
export function placeInBox(
  at: { x: number; y: number },
  pad: { width: number; height: number },
): [number, number] {
  return [
    within((at.x / pad.width) * SIGNATURE_WIDTH, SIGNATURE_WIDTH),
    within((at.y / pad.height) * SIGNATURE_HEIGHT, SIGNATURE_HEIGHT),
  ];
}

/** Strokes with one begun at a place; unchanged once there are as many as are kept. */
export function strokeBegun(strokes: Strokes, place: [number, number]): Strokes {
  return strokes.length >= MOST_STROKES ? strokes : [...strokes, place];
}

/** Strokes with the last one drawn on to a place. A place nearer than three units adds nothing to see. */
export function strokeDrawn(strokes: Strokes, place: [number, number]): Strokes {
  const last = strokes.at(-1);
  if (!last || last.length + 2 > MOST_NUMBERS) return strokes;
  const [x = 0, y = 0] = last.slice(-2);
  if (Math.hypot(place[0] - x, place[1] - y) < 3) return strokes;
  return [...strokes.slice(0, -1), [...last, ...place]];
}

/** The outline of the strokes as an SVG path. */
export function strokePath(strokes: Strokes): string {
  return strokes
    .map((stroke) => {
      const points: string[] = [];
      for (let index = 0; index + 1 < stroke.length; index += 2)
        points.push(`${stroke[index]} ${stroke[index + 1]}`);
      return points.length === 1 ? `M${points[0]}h1` : `M${points.join('L')}`;
    })
    .join('');
}

/** Has enough been drawn to be a signature rather than a touch? */
export const isDrawn = (strokes: Strokes): boolean =>
  strokes.reduce((sum, stroke) => sum + stroke.length, 0) >= 16;
