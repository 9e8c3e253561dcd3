import { CoverSection } from '@/components/drawings/cover-section';
import { FaceMap } from '@/components/drawings/face-map';
import { MarkLegend } from '@/components/drawings/mark-legend';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { formatLength } from '@/lib/concrete/length';
import type { Element, Face, Requirement } from '@/lib/inspection/plan';
import type { FaceState, PointState, Sheet } from '@/lib/inspection/sheet-types';
import { Fold } from './fold';
import { PointsToSee } from './points-to-see';
import { ReadingsTable } from './readings-table';
import { governingFor, readingMark, requirementWords } from './reading-words';
import { RequirementTrail } from './requirement-trail';

/** One face as it stands: each requirement's readings to scale, where they were taken, and all of them in a table. */
export function FaceSheet({
  sheet,
  element,
  face,
  state,
  people,
  timeZone,
}: {
  sheet: Sheet;
  element: Element;
  face: Face;
  state: FaceState;
  people: ReadonlyMap<string, string>;
  timeZone: string;
}) {
  const units = sheet.plan.units;
  const name = `${element.mark}, ${face.name}`;
  const all = [...state.points, ...state.spots];
  return (
    <SheetFrame
      id={`face-${face.id}`}
      heading={name}
      aside={`drawn ${state.drawnRead} of ${state.drawnTotal}, chosen ${state.chosenRead} of ${state.chosenTotal} read${state.spots.length ? `, ${state.spots.length} spot` : ''}`}
    >
      <div className="grid gap-4">
        {face.requirements.map((requirement) => (
          <div key={requirement.id} className="grid gap-1">
            <p className="font-label text-body font-medium">
              {requirementWords(requirement, units)}
              <span className="text-pencil">
                {' '}
                to {requirement.steel}, bar {requirement.barDesignation}
              </span>
            </p>
            <CoverSection
              name={`Cover section of ${name}`}
              unit={units}
              specifiedMm={requirement.specifiedMm}
              leastAcceptedMm={requirement.leastAcceptedMm}
              mostAcceptedMm={requirement.mostAcceptedMm}
              meeting={face.meeting}
              barDiameterMm={requirement.barDiameterMm}
              format={(mm) => formatLength(mm, units, requirement.leastAcceptedMm)}
              readings={sectionReadings(all, requirement, requirement.id === face.requirements[0]?.id)}
            />
            <RequirementTrail requirement={requirement} units={units} />
          </div>
        ))}
        <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,26rem)_minmax(0,1fr)] print:grid-cols-[minmax(0,22rem)_minmax(0,1fr)]">
          <FacePlan face={face} state={state} name={name} units={units} />
          <div className="grid gap-3 *:min-w-0">
            <PointsToSee sheet={sheet} face={state} />
            <MarkLegend kinds={[...new Set(all.map((point) => point.mark))]} />
          </div>
        </div>
        <Fold
          summary={`Every reading of ${name}`}
          aside={`${all.length} ${all.length === 1 ? 'point' : 'points'}`}
        >
          <ReadingsTable {...{ sheet, name, people, timeZone }} face={state} />
        </Fold>
      </div>
    </SheetFrame>
  );
}

/** Readings of one requirement; a point that nobody has read stands under the face's first requirement only. */
function sectionReadings(points: PointState[], requirement: Requirement, first: boolean) {
  return points.flatMap((point) => {
    const reading = governingFor(point, requirement.id);
    if (reading) {
      return [
        {
          id: reading.entry.id,
          label: point.label,
          mm: reading.current?.value?.mm ?? null,
          mark: readingMark(reading),
        },
      ];
    }
    return first && point.governing.length === 0
      ? [{ id: point.key, label: point.label, mm: null, mark: point.mark }]
      : [];
  });
}

/** The map of a face with its points as they stand; `only` keeps the points of one matter in sight. */
export function FacePlan({
  face,
  state,
  name,
  units,
  selectedId,
}: {
  face: Face;
  state: FaceState;
  name: string;
  units: 'mm' | 'in';
  selectedId?: string | null;
}) {
  return (
    <FaceMap
      name={name}
      widthMm={face.widthMm}
      heightMm={face.heightMm}
      openings={face.openings}
      recesses={face.recesses}
      selectedId={selectedId}
      format={(mm) => formatLength(mm, units)}
      points={[...state.points, ...state.spots].map((point) => ({
        id: point.key,
        label: point.label,
        xMm: point.xMm,
        yMm: point.yMm,
        mark: point.mark,
        chosen: point.point?.kind === 'chosen',
        spot: point.point === null,
      }))}
    />
  );
}
