import { useId } from 'react';
import { CoverSectionColumn, type CoverSectionReading } from './cover-section-column';
import { CoverSectionGround, type CoverSectionLayout } from './cover-section-ground';
import { coverSectionScale } from './cover-section-scale';
import { groundWords, type Ground } from './hatch';

export type { CoverSectionReading } from './cover-section-column';

export interface CoverSectionProps {
  /** What is drawn, for its text alternative: "Soffit". */
  name?: string;
  /** Unit in which the lengths are written, said once at the scale. */
  unit: 'mm' | 'in';
  specifiedMm: number;
  leastAcceptedMm: number;
  mostAcceptedMm?: number | null;
  meeting: Ground;
  /** Diameter of the bar that the readings touched; drawn to the scale of the depths. */
  barDiameterMm?: number;
  readings: readonly CoverSectionReading[];
  /** Writes a length without its unit: `(mm) => '38'`, `(mm) => '1 1/2'`. */
  format: (mm: number) => string;
  /** The last reading drops as it arrives. */
  dropId?: string | null;
}

const axisPx = 58;

/**
 * All readings of a face in one line, to scale: the face a heavy line with what lies beyond it hatched, the band below
 * the least accepted cover tinted, each reading a tick from the face to its depth with the bar's disc behind it. A
 * tick that ends inside the band is low cover, seen. It is a list of readings, wraps into as many rows as it needs,
 * and is read out as one.
 */
export function CoverSection({
  name = 'Cover section',
  unit,
  specifiedMm,
  leastAcceptedMm,
  mostAcceptedMm = null,
  meeting,
  barDiameterMm = 16,
  readings,
  format,
  dropId,
}: CoverSectionProps) {
  const id = useId();
  const known = readings.flatMap((reading) => (reading.mm === null ? [] : [reading.mm]));
  const scale = coverSectionScale({
    specifiedMm,
    mostAcceptedMm,
    readingsMm: readings.map((reading) => reading.mm ?? 0),
    barDiameterMm,
    labelLength: Math.max(
      0,
      ...readings.map((reading) => Math.min(reading.label.length, 5)),
      ...known.map((mm) => format(mm).length),
    ),
  });
  const faceUp = meeting === 'finished-top';
  const head = faceUp ? 36 : 20;
  const foot = faceUp ? 28 : 52;
  const body = Math.ceil(scale.depthPx + scale.barPx + 4);
  const layout: CoverSectionLayout = {
    ...scale,
    bandPx: Math.max(0, leastAcceptedMm) * scale.perMm,
    faceUp,
    faceY: faceUp ? head : head + body,
    height: head + body + foot,
  };
  // Never more rows than this: the narrowest screen still holds three readings in a row.
  const rows = Math.max(1, Math.ceil(readings.length / 3));
  const withUnit = (mm: number) => `${format(mm)} ${unit}`;
  const most = mostAcceptedMm === null ? '' : ` to ${withUnit(mostAcceptedMm)}`;

  return (
    <figure
      aria-label={`${name}: specified ${withUnit(specifiedMm)}, accepted from ${withUnit(leastAcceptedMm)}${most}, ${groundWords[meeting]}`}
    >
      <div className="relative overflow-hidden">
        <CoverSectionGround
          {...{ id, layout, rows, meeting, specifiedMm, leastAcceptedMm, mostAcceptedMm, format, axisPx }}
        />
        <ol
          className="relative grid"
          style={{
            paddingLeft: axisPx,
            minHeight: layout.height,
            gridTemplateColumns: `repeat(${readings.length < 6 ? 'auto-fill' : 'auto-fit'}, minmax(${readings.length < 6 ? Math.max(scale.columnPx, 64) : scale.columnPx}px, 1fr))`,
          }}
        >
          {readings.map((reading, index) => (
            <CoverSectionColumn
              key={reading.id ?? `${reading.label}-${index}`}
              reading={reading}
              layout={layout}
              text={reading.mm === null ? null : format(reading.mm)}
              unit={unit}
              drop={dropId !== undefined && dropId !== null && dropId === reading.id}
            />
          ))}
        </ol>
      </div>
      <figcaption className="mt-1 font-label text-label font-medium text-pencil">
        {`${unit}, ${groundWords[meeting]}; bar ${format(barDiameterMm)} to scale`}
      </figcaption>
    </figure>
  );
}
