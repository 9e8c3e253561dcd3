'use client';

import { FaceMap } from '@/components/drawings/face-map';
import { formatLength } from '@/lib/concrete/length';
import { CalculationSheet } from '../calculation-sheet';
import type { OpenedLink } from '../link';
import { readingsCalculation, type ReadingsScene } from './readings-calculation';

/** The face with its points drawn for an example; a pour draws its own. */
function ReadingsDrawing({ scene }: { scene: ReadingsScene }) {
  const { units, widthMm, heightMm, points } = scene;
  return (
    <div>
      <FaceMap
        name="Face"
        widthMm={widthMm}
        heightMm={heightMm}
        maxHeightRem={15}
        labels={points.length <= 25}
        format={(mm) => `${formatLength(mm, units)} ${units}`}
        points={points.map(({ cell, xMm, yMm }) => ({ id: cell, label: cell, xMm, yMm, mark: 'unread' }))}
      />
      <p className="text-label text-pencil">
        {points.length} {points.length === 1 ? 'place' : 'places'}, one drawn in each cell: an example. Each
        pour draws its own.
      </p>
    </div>
  );
}

/** The sheet of the number of readings. */
export function ReadingsSheet({ opened }: { opened: OpenedLink }) {
  return (
    <CalculationSheet
      slug="readings"
      calculation={readingsCalculation}
      opened={opened}
      draw={(scene) => <ReadingsDrawing scene={scene} />}
    />
  );
}
