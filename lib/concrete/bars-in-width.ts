import { notNegative, positive, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { formatLength, withUnit, type LengthUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic } from '@/lib/concrete/trail-source';

/**
 * How many bars of one layer fit between the legs of a tie at their least clear distance, and the clear distance that
 * a given number leaves. Arithmetic on straight legs: where a corner bar lies in the bend of the tie it stands further
 * in, and there is less room than this. Lengths in mm.
 * @param layer.bars bars that are to lie there; `clearMm` is null without them, and for a single bar
 * @throws ConcreteError where cover and ties leave no room for one bar, or the bars asked for are wider than the room
 */
export function barsInWidth(layer: {
  widthMm: number;
  sideCoverMm: number;
  /** 0 where there are no ties. */
  tieDiameterMm: number;
  diameterMm: number;
  leastClearMm: number;
  bars?: number;
  showIn?: LengthUnit;
}): { mostBars: number; clearMm: number | null; trail: TrailStep[] } {
  const width = positive('width', layer.widthMm);
  const cover = notNegative('side cover', layer.sideCoverMm);
  const tie = notNegative('tie', layer.tieDiameterMm);
  const bar = positive('bar diameter', layer.diameterMm);
  const least = positive('least clear distance', layer.leastClearMm);
  const showIn = layer.showIn ?? 'mm';
  const shown = (mm: number) => formatLength(mm, showIn);
  const room = width - 2 * (cover + tie);
  if (room < bar)
    throw new ConcreteError('width', 'Cover and ties on both sides leave no room for one of these bars.');
  const mostBars = Math.floor((room + least) / (bar + least) + 1e-9);
  const trail = [
    arithmetic(
      'Room between the ties = width − 2 × (side cover + tie)',
      `${shown(width)} − 2 × (${shown(cover)} + ${shown(tie)}) = ${withUnit(room, showIn)}`,
    ),
    arithmetic(
      'Most bars = (room + least clear distance) / (bar + least clear distance), down',
      `(${shown(room)} + ${shown(least)}) / (${shown(bar)} + ${shown(least)}), down = ${mostBars}`,
    ),
  ];
  const bars = layer.bars === undefined ? null : whole('bars', layer.bars, 1);
  if (bars === null || bars === 1) return { mostBars, clearMm: null, trail };
  const clearMm = (room - bars * bar) / (bars - 1);
  if (clearMm < 0)
    throw new ConcreteError('bars', 'Laid side by side they are wider than the room between the ties.');
  trail.push(
    arithmetic(
      'Clear distance = (room − bars × bar) / (bars − 1)',
      `(${shown(room)} − ${bars} × ${shown(bar)}) / ${bars - 1} = ${withUnit(clearMm, showIn, least)}`,
    ),
  );
  return { mostBars, clearMm, trail };
}
