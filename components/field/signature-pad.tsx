'use client';

import { useRef, type PointerEvent } from 'react';
import { Button } from '@/components/ui/button';
import {
  placeInBox,
  SIGNATURE_HEIGHT,
  SIGNATURE_WIDTH,
  strokeBegun,
  strokeDrawn,
  strokePath,
  type Strokes,
} from './signature-strokes';

/** A place to sign with a finger or a pen. Typing the name is offered beside it. */
export function SignaturePad({
  strokes,
  onChange,
}: {
  strokes: Strokes;
  onChange: (strokes: Strokes) => void;
}) {
  const drawing = useRef(false);
  const place = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return placeInBox({ x: event.clientX - box.left, y: event.clientY - box.top }, box);
  };
  return (
    <div className="grid gap-1">
      <div className="flex items-end justify-between">
        <span className="font-label text-label font-semibold">Your signature</span>
        <Button variant="quiet" disabled={strokes.length === 0} onClick={() => onChange([])}>
          Clear
        </Button>
      </div>
      <svg
        viewBox={`0 0 ${SIGNATURE_WIDTH} ${SIGNATURE_HEIGHT}`}
        role="img"
        aria-label={strokes.length === 0 ? 'Empty signature field' : 'Your drawn signature'}
        className="w-full touch-none border border-ink bg-sheet"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          drawing.current = true;
          onChange(strokeBegun(strokes, place(event)));
        }}
        onPointerMove={(event) => {
          if (drawing.current) onChange(strokeDrawn(strokes, place(event)));
        }}
        onPointerUp={() => (drawing.current = false)}
        onPointerCancel={() => (drawing.current = false)}
      >
        <path
          d={`M60 ${SIGNATURE_HEIGHT * 0.78}H${SIGNATURE_WIDTH - 60}`}
          stroke="var(--rule)"
          strokeWidth="3"
        />
        <path d={`M60 ${SIGNATURE_HEIGHT * 0.66}l24 36m0-36l-24 36`} stroke="var(--pencil)" strokeWidth="4" />
        <path
          d={strokePath(strokes)}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="8"
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      </svg>
    </div>
  );
}
