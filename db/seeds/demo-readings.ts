import type { BodyOf } from '@/lib/inspection/entry';
import type { Face, Plan } from '@/lib/inspection/plan';
import { withUnit, type LengthUnit } from '@/lib/concrete/length';
import { seeded } from './draw-picture';

/** A value near `mean`, spread as placing spreads it. */
export function nearby(random: () => number, mean: number, spread: number): number {
  const normal = Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
  return mean + spread * normal;
}

/** A length as a tape or a gauge would give it: whole millimetres, or sixteenths of an inch. */
export function asRead(mm: number, unit: LengthUnit): NonNullable<BodyOf<'reading'>['value']> {
  const exact = unit === 'mm' ? Math.round(mm) : (Math.round((mm / 25.4) * 16) / 16) * 25.4;
  return { text: withUnit(exact, unit), unit, mm: exact };
}

export interface FaceReadings {
  plan: Plan;
  faceId: string;
  instrumentId: string;
  meanMm: number;
  spreadMm: number;
  /** Readings that are not left to chance, by the point's label. */
  fixed?: Record<string, number>;
  /** Labels that are left unread. */
  skip?: string[];
  /** Labels read with another instrument. */
  other?: Record<string, string>;
  phase?: 'before' | 'after';
  seed: number;
  at: number;
}

/** Readings of a whole face, point by point, two minutes apart. */
export function faceReadings(of: FaceReadings): { type: 'reading'; body: BodyOf<'reading'>; at: number }[] {
  const face = of.plan.elements
    .flatMap((element): Face[] => element.faces)
    .find((one) => one.id === of.faceId);
  const requirement = face?.requirements[0];
  if (!face || !requirement) throw new Error(`The demo plan has no face ${of.faceId}.`);
  const random = seeded(of.seed);
  return face.points
    .filter((point) => !of.skip?.includes(point.label))
    .map((point, index) => {
      const at = of.at + index * 120_000;
      const mm =
        of.fixed?.[point.label] ??
        Math.max(requirement.leastAcceptedMm + 0.5, nearby(random, of.meanMm, of.spreadMm));
      return {
        type: 'reading' as const,
        at,
        body: {
          faceId: of.faceId,
          requirementId: requirement.id,
          steel: requirement.steel,
          pointId: point.id,
          spot: null,
          value: asRead(mm, of.plan.units),
          goNoGo: null,
          instrumentId: of.other?.[point.label] ?? of.instrumentId,
          phase: of.phase ?? 'before',
          measuredAt: new Date(at).toISOString(),
          asFoundBar: null,
          measurer: null,
        },
      };
    });
}
