interface FaceOnScreen {
  widthPx: number;
  heightPx: number;
  widthMm: number;
  heightMm: number;
}

/** The id of the point nearest to a place on the drawn face, within `reachPx` of it; else null. */
export function nearestPoint(
  points: readonly { id: string; xMm: number; yMm: number }[],
  at: { xPx: number; yPx: number },
  face: FaceOnScreen,
  reachPx: number,
): string | null {
  let nearest: string | null = null;
  let least = reachPx;
  for (const point of points) {
    const x = (point.xMm / face.widthMm) * face.widthPx;
    const y = (1 - point.yMm / face.heightMm) * face.heightPx;
    const distance = Math.hypot(x - at.xPx, y - at.yPx);
    if (distance <= least) {
      least = distance;
      nearest = point.id;
    }
  }
  return nearest;
}

/** A place on the drawn face as millimetres from the lower left corner, whole, and never off the face. */
export function placeOnFace(
  at: { xPx: number; yPx: number },
  face: FaceOnScreen,
): { xMm: number; yMm: number } {
  const within = (mm: number, most: number) => Math.round(Math.min(Math.max(mm, 0), most));
  return {
    xMm: within((at.xPx / face.widthPx) * face.widthMm, face.widthMm),
    yMm: within((1 - at.yPx / face.heightPx) * face.heightMm, face.heightMm),
  };
}
