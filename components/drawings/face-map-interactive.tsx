'use client';

import { useRef, type KeyboardEvent, type MouseEvent } from 'react';
import { FaceMap, type FaceMapProps } from './face-map';
import { facePlace } from './face-map-geometry';
import { nearestPoint, placeOnFace } from './face-map-touch';
import { markWords } from './mark-words';

export interface FaceMapInteractiveProps extends FaceMapProps {
  onSelect: (id: string) => void;
  /** A tap away from every point, in mm from the lower left corner: a spot reading. Offer typed places too, for the keyboard. */
  onSpot?: (place: { xMm: number; yMm: number }) => void;
}

/** How near a tap has to be to mean a point, px: half of a target of 44. */
const reachPx = 22;

/**
 * A face map to work on. Each point is a button of at least 44 px; where buttons overlap, the point nearest to the
 * finger is meant. By keyboard it is one stop: the arrows go from point to point, Home and End to the ends.
 */
export function FaceMapInteractive({ onSelect, onSpot, ...map }: FaceMapInteractiveProps) {
  const { points, widthMm, heightMm, selectedId } = map;
  const area = useRef<HTMLDivElement>(null);
  const current = Math.max(
    0,
    points.findIndex((point) => point.id === selectedId),
  );

  const press = (event: MouseEvent, pressed?: string) => {
    const box = area.current?.getBoundingClientRect();
    // A press by keyboard or by a screen reader has no place of its own.
    if (!box || event.detail === 0) return pressed !== undefined && onSelect(pressed);
    const at = { xPx: event.clientX - box.left, yPx: event.clientY - box.top };
    const size = { widthPx: box.width, heightPx: box.height, widthMm, heightMm };
    const near = nearestPoint(points, at, size, reachPx);
    if (near !== null) onSelect(near);
    else onSpot?.(placeOnFace(at, size));
  };

  const move = (event: KeyboardEvent) => {
    const to = {
      ArrowRight: current + 1,
      ArrowDown: current + 1,
      ArrowLeft: current - 1,
      ArrowUp: current - 1,
      Home: 0,
      End: points.length - 1,
    }[event.key];
    const next = to === undefined ? undefined : points[to];
    if (!next) return;
    event.preventDefault();
    onSelect(next.id);
    area.current?.querySelector<HTMLElement>(`[data-point="${CSS.escape(next.id)}"]`)?.focus();
  };

  return (
    <FaceMap
      {...map}
      overlay={
        <div
          ref={area}
          role="group"
          aria-label={`Points of ${map.name ?? 'the face'}; arrow keys go from one to the next`}
          className="absolute inset-0 touch-manipulation"
          onClick={(event) => press(event)}
          onKeyDown={move}
        >
          {points.map((point, index) => {
            const { left, top } = facePlace(point.xMm, point.yMm, widthMm, heightMm);
            return (
              <button
                key={point.id}
                type="button"
                data-point={point.id}
                tabIndex={index === current ? 0 : -1}
                aria-pressed={point.id === selectedId}
                aria-label={`${point.label}, ${markWords[point.mark]}`}
                className="absolute size-11 -translate-1/2 rounded-full"
                style={{ left: `${left}%`, top: `${top}%` }}
                onClick={(event) => {
                  event.stopPropagation();
                  press(event, point.id);
                }}
              />
            );
          })}
        </div>
      }
    />
  );
}
