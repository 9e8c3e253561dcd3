import { CoverSection } from '@/components/drawings/cover-section';
import { formatLength } from '@/lib/concrete/length';
import type { EntryOf } from '@/lib/inspection/entry';
import { judgedCheck, judgedMeasurement, judgedReading } from '@/lib/inspection/judged-words';
import { limitWords } from '@/lib/inspection/measured-words';
import type { Element, Face } from '@/lib/inspection/plan';
import type { FaceState, Sheet } from '@/lib/inspection/sheet-types';
import type { facesConcerned } from './acceptable-entries';
import { FacePlan } from './face-sheet';
import { byName } from './judged-by-name';
import { JudgedDetails } from './judged-details';
import { governingFor, readingMark, readingText, requirementWords } from './reading-words';
import { TrailBody } from './requirement-trail';
import { TrailSteps } from './trail-steps';
import { subjectWords, type WordContext } from './entry-words';

type Concerned = ReturnType<typeof facesConcerned>[number];

const placeOf = (sheet: Sheet, one: Concerned): { element: Element; face: Face; state: FaceState } | null => {
  const element = sheet.plan.elements.find((candidate) => candidate.id === one.elementId);
  const face = element?.faces.find((candidate) => candidate.id === one.faceId);
  const state = sheet.faces.find((candidate) => candidate.faceId === one.faceId);
  return element && face && state ? { element, face, state } : null;
};

const instrumentOf = (sheet: Sheet, { instrumentId }: EntryOf<'reading'>['body']) =>
  sheet.instruments.find((one) => one.instrumentId === instrumentId) ?? null;

/** The requirement with its trail, and the readings concerned drawn against it; measurements and checks with their limits. */
export function RequirementPart({
  sheet,
  body,
  concerned,
}: {
  sheet: Sheet;
  body: EntryOf<'nonconformance'>['body'];
  concerned: Concerned[];
}) {
  const units = sheet.plan.units;
  const measurements = sheet.measurements.filter((state) =>
    body.about.some((subject) => subject.kind === 'measurement' && subject.id === state.item.id),
  );
  const checks = sheet.checks.filter((check) =>
    body.about.some((subject) => subject.kind === 'check' && subject.id === check.item.id),
  );
  return (
    <div className="grid gap-5 *:min-w-0">
      {concerned.map((one) => {
        const place = placeOf(sheet, one);
        if (!place) return null;
        const points = [...place.state.points, ...place.state.spots].filter(
          (point) => one.points.length === 0 || one.points.includes(point.key),
        );
        return (
          <section key={one.faceId} className="grid gap-3">
            <h3 className="text-lead">
              {place.element.mark}, {place.face.name}
            </h3>
            {place.face.requirements.map((requirement) => {
              const readings = points.flatMap((point) => {
                const reading = governingFor(point, requirement.id);
                return reading?.current ? [{ point, reading, current: reading.current }] : [];
              });
              return (
                <div key={requirement.id} className="grid gap-2">
                  <p className="font-label font-semibold">
                    {requirement.steel}: {requirementWords(requirement, units)}
                  </p>
                  {readings.length > 0 && (
                    <>
                      <CoverSection
                        name={`Readings concerned on ${place.face.name}`}
                        unit={units}
                        specifiedMm={requirement.specifiedMm}
                        leastAcceptedMm={requirement.leastAcceptedMm}
                        mostAcceptedMm={requirement.mostAcceptedMm}
                        meeting={place.face.meeting}
                        barDiameterMm={requirement.barDiameterMm}
                        format={(mm) => formatLength(mm, units, requirement.leastAcceptedMm)}
                        readings={readings.map(({ point, reading, current }) => ({
                          id: reading.entry.id,
                          label: point.label,
                          mm: current.value?.mm ?? null,
                          mark: readingMark(reading),
                        }))}
                      />
                      <ul>
                        {readings.map(({ point, reading, current }) => (
                          <li key={reading.entry.id}>
                            <span className="font-label font-semibold">{point.label}</span>{' '}
                            <span className="font-figure">{readingText(current, units)}</span>:{' '}
                            {reading.judged.reason}
                            <JudgedDetails
                              about={point.label}
                              judged={byName(
                                judgedReading(reading, sheet.plan, instrumentOf(sheet, current), units),
                                point.faceId,
                                requirement.id,
                              )}
                            />
                          </li>
                        ))}
                      </ul>
                    </>
                  )}
                  <TrailBody requirement={requirement} units={units} />
                </div>
              );
            })}
          </section>
        );
      })}
      {measurements.map((state) => (
        <section key={state.item.id}>
          <h3 className="text-lead">{state.item.title}</h3>
          <p>Limits: {limitWords(state.item, units)}</p>
          <ul>
            {state.governing.map((place) => (
              <li key={place.entry.id}>
                {place.current?.place || 'place not named'}: {place.reason}
                <JudgedDetails
                  about={`${state.item.title}, ${place.current?.place || 'place not named'}`}
                  judged={{ ...judgedMeasurement(state.item, place, units), sources: [] }}
                />
              </li>
            ))}
          </ul>
          <TrailSteps trail={state.item.trail} />
        </section>
      ))}
      {checks.map((check) => (
        <section key={check.item.id}>
          <h3 className="text-lead">{check.item.question}</h3>
          <p>Rests on: {check.item.basis}</p>
          <p>
            {check.governing ? `Answered: ${check.governing.body.answer.replace('-', ' ')}` : 'Not answered'}
            {check.governing?.body.note && `. ${check.governing.body.note}`}
          </p>
          <JudgedDetails about={check.item.question} judged={judgedCheck(check)} />
        </section>
      ))}
      {concerned.length + measurements.length + checks.length === 0 && (
        <p>
          Nothing of the plan is named by it. What is required stands in the drawings:{' '}
          {[
            ...new Set(sheet.plan.elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`)),
          ].join(', ')}
          .
        </p>
      )}
    </div>
  );
}

/** How far it reaches and where it is: the words of whoever raised it, and the faces with the points concerned. */
export function ExtentPart({
  sheet,
  body,
  concerned,
  context,
}: {
  sheet: Sheet;
  body: EntryOf<'nonconformance'>['body'];
  concerned: Concerned[];
  context: WordContext;
}) {
  return (
    <div className="grid gap-4 *:min-w-0">
      <div>
        <p className="text-lead">{body.extent}</p>
        {body.where.text && <p>{body.where.text}</p>}
        {body.description && <p>{body.description}</p>}
        <p className="text-pencil">About: {body.about.map((one) => subjectWords(context, one)).join('; ')}</p>
      </div>
      <div className="grid gap-6 md:grid-cols-2 print:max-w-md print:grid-cols-1">
        {concerned.map((one) => {
          const place = placeOf(sheet, one);
          return (
            place && (
              <div key={one.faceId} className="min-w-0">
                <p className="font-label font-semibold">
                  {place.element.mark}, {place.face.name}, drawing {place.element.drawing.number} rev{' '}
                  {place.element.drawing.revision}
                </p>
                <FacePlan
                  face={place.face}
                  state={place.state}
                  name={place.face.name}
                  units={sheet.plan.units}
                  selectedId={one.points[0] ?? null}
                />
              </div>
            )
          );
        })}
      </div>
    </div>
  );
}
