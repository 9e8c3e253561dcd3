/** A drawn signature: strokes of x, y pairs within 1000 by 400. */
export function SignatureStrokes({ strokes, of }: { strokes: number[][]; of: string }) {
  const path = strokes
    .map((stroke) => {
      const points: string[] = [];
      for (let at = 0; at + 1 < stroke.length; at += 2) points.push(`${stroke[at]} ${stroke[at + 1]}`);
      return points.length > 0 ? `M${points.join('L')}` : '';
    })
    .join('');
  if (path === '') return null;
  return (
    <svg viewBox="0 0 1000 400" className="h-16 w-40" role="img" aria-label={`Drawn signature of ${of}`}>
      <path
        d={path}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="10"
        strokeLinecap="round"
        strokeLinejoin="round"
      />
    </svg>
  );
}
