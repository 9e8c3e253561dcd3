'use client';

import { CoverSection, type CoverSectionReading } from '@/components/drawings/cover-section';
import { FaceMapInteractive } from '@/components/drawings/face-map-interactive';
import { FaceMapTable } from '@/components/drawings/face-map-table';
import type { FaceMapPoint } from '@/components/drawings/face-map';
import { MarkLegend } from '@/components/drawings/mark-legend';
import { formatLength, MM_PER_INCH, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { markOfReading } from '@/lib/inspection/judge-point';
import type { Requirement } from '@/lib/inspection/plan';
import type { FaceState, PointState } from '@/lib/inspection/sheet-types';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import type { FaceOfPlan } from './open-sheet';
import { Disclosure } from './disclosure';

/** A distance on the form to the nearest mark of a tape: whole millimetres, or sixteenths of an inch. */
export function onTape(mm: number, unit: LengthUnit): string {
  const step = unit === 'mm' ? 1 : MM_PER_INCH / 16;
  return formatLength(Math.round(mm / step) * step, unit);
}

export const NEW_SPOT = 'new-spot';

function mapPoints(state: FaceState, spot: { xMm: number; yMm: number } | null): FaceMapPoint[] {
  const placed = (point: PointState): FaceMapPoint => ({
    id: point.key,
    label: point.recheck ? `${point.label} again` : point.label,
    xMm: point.xMm,
    yMm: point.yMm,
    mark: point.mark,
    chosen: point.point?.kind === 'chosen',
    spot: point.point === null,
  });
  return [
    ...state.points.map(placed),
    ...state.spots.map(placed),
    ...(spot ? [{ id: NEW_SPOT, label: 'spot', mark: 'unread' as const, spot: true, ...spot }] : []),
  ];
}

/** The face map to work on: tap a point to read it, tap elsewhere for a spot reading. */
export function WorkingMap({
  place,
  state,
  unit,
  selected,
  spot,
  onPoint,
  onSpot,
}: {
  place: FaceOfPlan;
  state: FaceState;
  unit: LengthUnit;
  selected: string | null;
  spot: { xMm: number; yMm: number } | null;
  onPoint: (key: string) => void;
  onSpot: (spot: { xMm: number; yMm: number }) => void;
}) {
  const { face } = place;
  return (
    <FaceMapInteractive
      name={`${place.element.mark}, ${face.name}`}
      widthMm={face.widthMm}
      heightMm={face.heightMm}
      points={mapPoints(state, spot)}
      openings={face.openings}
      recesses={face.recesses}
      selectedId={selected}
      format={(mm) => onTape(mm, unit)}
      onSelect={onPoint}
      onSpot={onSpot}
    />
  );
}

function sectionReadings(state: FaceState, requirement: Requirement): CoverSectionReading[] {
  return [...state.points, ...state.spots].flatMap((point): CoverSectionReading[] => {
    const own = point.readings.filter(
      (reading) => reading.current && (reading.requirement?.id ?? null) === requirement.id,
    );
    const governing = point.governing.find((reading) => reading.requirement?.id === requirement.id);
    const shown = governing ?? own.at(-1);
    if (!shown) {
      const readElsewhere = point.governing.length > 0;
      return readElsewhere ? [] : [{ id: point.key, label: point.label, mm: null, mark: 'unread' }];
    }
    return [
      {
        id: shown.entry.id,
        label: point.label,
        mm: bodyShown(shown).value?.mm ?? null,
        mark: markOfReading(shown.judged),
      },
    ];
  });
}

/** All readings of a face to one steel, in one line to scale. */
export function FaceSection({
  place,
  state,
  requirement,
  unit,
  dropId,
}: {
  place: FaceOfPlan;
  state: FaceState;
  requirement: Requirement;
  unit: LengthUnit;
  dropId: string | null;
}) {
  return (
    <section className="grid gap-1 px-3 pb-4">
      <h2 className="text-heading">Cover section</h2>
      <p className="font-label text-label font-medium text-pencil">
        specified {withUnit(requirement.specifiedMm, unit)} · accepted from{' '}
        {withUnit(requirement.leastAcceptedMm, unit)}
        {requirement.mostAcceptedMm !== null && ` to ${withUnit(requirement.mostAcceptedMm, unit)}`} · to{' '}
        {requirement.steel}
      </p>
      <CoverSection
        name={place.face.name}
        unit={unit}
        specifiedMm={requirement.specifiedMm}
        leastAcceptedMm={requirement.leastAcceptedMm}
        mostAcceptedMm={requirement.mostAcceptedMm}
        meeting={place.face.meeting}
        barDiameterMm={requirement.barDiameterMm}
        readings={sectionReadings(state, requirement)}
        format={(mm) => formatLength(mm, unit, requirement.leastAcceptedMm)}
        dropId={dropId}
      />
    </section>
  );
}

/** What the marks mean, and the map's points as a table. */
export function FaceTable({ place, state, unit }: { place: FaceOfPlan; state: FaceState; unit: LengthUnit }) {
  const values = Object.fromEntries(
    [...state.points, ...state.spots].map((point) => [
      point.key,
      point.governing.map((reading) => readingText(bodyShown(reading))).join('; '),
    ]),
  );
  return (
    <div className="grid gap-2 px-3 pb-4">
      <MarkLegend />
      <Disclosure className="border-t border-rule pt-1" summary="The points as a table">
        <FaceMapTable
          caption={`Points of ${place.face.name}`}
          points={mapPoints(state, null)}
          format={(mm) => onTape(mm, unit)}
          values={values}
        />
      </Disclosure>
    </div>
  );
}
