/** A rectangle on a face, millimetres from its lower left corner as one looks at it. */
export interface FaceRectangle {
  id: string;
  name: string;
  xMm: number;
  yMm: number;
  widthMm: number;
  heightMm: number;
}

export interface FaceProportion {
  /** Width over height as drawn. */
  aspect: number;
  /** False where the face is so long or so tall that its two sides are drawn to different scales. */
  toScale: boolean;
}

/** The proportion a face is drawn in: true to scale between 1:3 and 4:1, else held at the nearer of the two. */
export function faceProportion(widthMm: number, heightMm: number): FaceProportion {
  const aspect = widthMm / heightMm;
  const drawn = Math.min(4, Math.max(1 / 3, aspect));
  return { aspect: drawn, toScale: Math.abs(drawn - aspect) < 1e-9 };
}

/** Where on the drawn face a place is, in per cent from the left and from the top; y counts upwards on the face. */
export function facePlace(xMm: number, yMm: number, widthMm: number, heightMm: number) {
  return { left: (xMm / widthMm) * 100, top: 100 - (yMm / heightMm) * 100 };
}

/** Offsets of grid lines over a length, in mm: 4 to 12 even steps of 1, 2 or 5 times a power of ten. */
export function gridSteps(lengthMm: number): number[] {
  const raw = lengthMm / 8;
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = [1, 2, 5, 10].map((m) => m * power).find((s) => s >= raw) ?? raw;
  const steps: number[] = [];
  for (let at = step; at < lengthMm - step * 0.05; at += step) steps.push(at);
  return steps;
}
